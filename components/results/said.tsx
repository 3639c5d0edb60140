import { Marker } from '@/components/charts/marker';
import type { SampleStyle } from '@/components/charts/styles';
import { shortName } from '@/lib/results/format';
import type { SaidView, SampleView } from '@/lib/results/types';

interface Props {
  said: SaidView;
  samples: SampleView[];
  styles: Map<number, SampleStyle>;
}

function Faults({ said, samples }: Omit<Props, 'styles'>) {
  return (
    <div>
      <p className="soft pb-2" id="faults-are">Faults noted, out of the glasses that were answered.</p>
      <table className="ledger folds" aria-describedby="faults-are">
        <thead>
          <tr><th scope="col">Fault</th>{samples.map((sample) => <th scope="col" className="num" key={sample.sample}>{shortName(sample)}</th>)}</tr>
        </thead>
        <tbody>
          {said.faults.map((fault) => (
            <tr key={fault.name}>
              <th scope="row">{fault.name}</th>
              {samples.map((sample) => {
                const c = fault.counts.find((entry) => entry.sample === sample.sample);
                return <td key={sample.sample} className={`num max-md:inline-block max-md:mr-4 ${c && c.noted > 0 ? 'mid' : 'hint'}`} data-label={`${shortName(sample)}:`}>{c ? `${c.noted} of ${c.of}` : ''}</td>;
              })}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** What panelists wrote, by sample, and the faults they noted. */
export function Said({ said, samples, styles }: Props) {
  const bySample = samples.map((sample) => ({ sample, comments: said.comments.filter((comment) => comment.sample === sample.sample) })).filter((group) => group.comments.length > 0);
  return (
    <div className="stack">
      {said.faults.length > 0 && <Faults said={said} samples={samples} />}
      {bySample.map(({ sample, comments }) => (
        <section key={sample.sample} className="stack tight">
          <h3 className="row"><Marker style={styles.get(sample.sample)!} />{sample.label}</h3>
          <ul className="stack tight">
            {comments.map((comment) => (
              <li key={`${comment.seat}-${comment.where}`} style={{ overflowWrap: 'anywhere' }}>{comment.text} <span className="hint">seat {comment.seat}{comment.name && `, ${comment.name}`}, {comment.where}</span></li>
            ))}
          </ul>
        </section>
      ))}
      {bySample.length === 0 && <p className="soft">Nobody wrote a comment.</p>}
    </div>
  );
}
