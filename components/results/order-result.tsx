import { Marker } from '@/components/charts/marker';
import type { SampleStyle } from '@/components/charts/styles';
import { shortName, showP } from '@/lib/results/format';
import type { OrderView, SampleView } from '@/lib/results/types';

interface Props {
  order: OrderView;
  samples: SampleView[];
  styles: Map<number, SampleStyle>;
}

/** Rank sums from least to most, with what was shown. */
export function OrderResult({ order, samples, styles }: Props) {
  const sorted = [...order.cells].sort((a, b) => a.rankSum - b.rankSum);
  if (sorted.length === 0) return <p>{order.whyNot}</p>;
  const test = order.friedman;
  return (
    <div className="stack" style={{ maxWidth: 640 }}>
      <div>
        <p className="soft pb-2" id="ranks-are">By {order.trait.toLowerCase()}, 1 = least. Samples that share a letter were not shown to differ.</p>
        <table className="ledger folds" aria-describedby="ranks-are">
          <thead><tr><th scope="col">Sample</th><th scope="col" className="num">Rank sum</th><th scope="col" className="num">Mean rank</th></tr></thead>
          <tbody>
            {sorted.map((cell) => (
              <tr key={cell.sample}>
                <th scope="row"><span className="row"><Marker style={styles.get(cell.sample)!} /><b>{shortName(samples.find((view) => view.sample === cell.sample)!)}</b></span></th>
                <td className="num" data-label="Rank sum:">{Number(cell.rankSum.toFixed(2))} <span className={order.isShown ? 'let' : 'dim'}>{cell.letters}</span></td>
                <td className="num" data-label="Mean rank:">{cell.meanRank.toFixed(2)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {test ? (
        <p className="soft">
          Friedman’s test: {test.statistic.toFixed(2)} on {test.df}, <i>p</i> {showP(test.p)} ({test.isExact ? 'every arrangement counted' : 'F of Iman and Davenport, or random arrangements'}). Kendall’s W {order.kendallW?.toFixed(2) ?? '–'}. Rank sums that differ by more than {order.hsd?.toFixed(1)} were shown to differ, all pairs allowed for.
        </p>
      ) : <p>{order.whyNot}</p>}
    </div>
  );
}

/** Each seat's own order. */
export function OrderSeats({ order, samples }: Omit<Props, 'styles'>) {
  const nameOf = (sample: number) => shortName(samples.find((view) => view.sample === sample)!);
  return (
    <table className="ledger folds" style={{ maxWidth: 640 }}>
      <thead><tr><th scope="col">Seat</th><th scope="col">From least to most</th></tr></thead>
      <tbody>
        {order.bySeat.map((seat) => (
          <tr key={seat.seat}>
            <th scope="row"><b>{seat.seat}</b> {seat.name && <span className="soft">{seat.name}</span>}</th>
            <td className={seat.orders.length === 0 ? 'hint' : ''}>{seat.orders.length === 0 ? 'no whole order' : seat.orders.map(({ block, samples: own }) => <span key={block} className="block">{own.map(nameOf).join(', ')}</span>)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
