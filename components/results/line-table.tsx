import { IntervalPlot, PlotAxis, rangeOf, type Range } from '@/components/charts/interval-plot';
import { Marker } from '@/components/charts/marker';
import type { SampleStyle } from '@/components/charts/styles';
import { PHASE_WORDS, shortName, showP, showScore } from '@/lib/results/format';
import type { LineView, SampleView, ScaleView } from '@/lib/results/types';

interface Props {
  lines: LineView[];
  samples: SampleView[];
  styles: Map<number, SampleStyle>;
  alpha: number;
  scale: ScaleView;
}

function Row({ line, range, samples, styles, alpha }: { line: LineView; range: Range } & Omit<Props, 'lines'>) {
  const isShown = line.product !== null && line.product.p <= alpha;
  const cellOf = (sample: number) => line.cells.find((cell) => cell.sample === sample);
  return (
    <tr>
      <th scope="row"><span className="mid">{line.name}</span> <span className="hint">{PHASE_WORDS[line.phase]}</span></th>
      <td><div className="md:hidden"><PlotAxis range={range} /></div><IntervalPlot intervals={line.cells} range={range} styles={styles} isDim={!isShown} /></td>
      {samples.map((sample) => {
        const cell = cellOf(sample.sample);
        return (
          <td key={sample.sample} className="num whitespace-nowrap max-md:inline-block max-md:mr-4" data-label={shortName(sample)}>
            {cell ? <>{showScore(cell.mean)} <span className={isShown ? 'let' : 'dim'} style={{ display: 'inline-block', minWidth: '1.3em', textAlign: 'left' }}>{cell.letters}</span></> : <span className="hint">none</span>}
          </td>
        );
      })}
      {line.product ? (
        <>
          <td className={`num max-md:inline-block max-md:mr-4 ${isShown ? '' : 'hint'}`} data-label="p">{showP(line.product.p)}</td>
          <td className="num soft max-md:inline-block" data-label="could show">{showScore(line.smallestDifference!)}</td>
        </>
      ) : <td colSpan={2} className="soft">{line.whyNot}</td>}
    </tr>
  );
}

/** Means, letters, intervals and p of each line of the ballot. */
export function LineTable(props: Props) {
  const { lines, samples, styles, scale } = props;
  const range = rangeOf(lines.flatMap((line) => line.cells), scale);
  return (
    <div className="scroll-x" tabIndex={0} role="region" aria-label="Means by descriptor">
      <p className="soft pb-2" id="means-are">Mean scores from {scale.low} to {scale.high}. Samples that share a letter were not shown to differ.</p>
      <table className="ledger folds" aria-describedby="means-are">
        <thead>
          <tr>
            <th scope="col">Descriptor</th>
            <th scope="col"><PlotAxis range={range} /><span className="visually-hidden">Interval</span></th>
            {samples.map((sample) => (
              <th scope="col" key={sample.sample} className="num">
                <span className="row" style={{ justifyContent: 'flex-end', gap: 4 }}><Marker style={styles.get(sample.sample)!} /><b>{shortName(sample)}</b></span>
              </th>
            ))}
            <th scope="col" className="num"><i>p</i></th>
            <th scope="col" className="num">could show</th>
          </tr>
        </thead>
        <tbody>{lines.map((line) => <Row key={line.item} line={line} range={range} {...props} />)}</tbody>
      </table>
    </div>
  );
}
