import { shortName, showP } from '@/lib/results/format';
import type { SampleView, TicksView } from '@/lib/results/types';
import { LikingTable } from './liking-table';

/** Words by sample: how often each was ticked or named. */
export function TicksResult({ ticks, samples }: { ticks: TicksView; samples: SampleView[] }) {
  if (ticks.lines.length === 0) return <p>{ticks.whyNot ?? 'No word of the lexicon was confirmed.'}</p>;
  const hasLift = ticks.lines.some((line) => line.lift);
  return (
    <div className="stack">
      <div className="scroll-x" tabIndex={0} role="region" aria-label="Words by sample">
        <p className="soft pb-2" id="ticks-are">{ticks.kind === 'check' ? 'Times ticked' : 'Times named and confirmed'}, out of the glasses that were answered{ticks.kind === 'term' && '; in brackets the mean strength, 1 slight to 3 strong'}. Samples that share a letter were not shown to differ (McNemar’s exact test, Holm).</p>
        <table className="ledger folds" aria-describedby="ticks-are">
          <thead>
            <tr>
              <th scope="col">Word</th>
              {samples.map((sample) => <th key={sample.sample} scope="col" className="num">{shortName(sample)}</th>)}
              <th scope="col" className="num"><i>p</i></th>
              {hasLift && <th scope="col" className="num">Liking with it</th>}
            </tr>
          </thead>
          <tbody>
            {ticks.lines.map((line) => (
              <tr key={line.item}>
                <th scope="row">{line.name}</th>
                {line.counts.map((cell) => (
                  <td key={cell.sample} className="num max-md:inline-block max-md:mr-4" data-label={`${shortName(samples.find((view) => view.sample === cell.sample)!)}:`}>
                    {cell.ticked} of {cell.of}{cell.strength !== null && ` (${cell.strength.toFixed(1)})`} <span className={line.p !== null && line.p <= ticks.alpha ? 'let' : 'dim'}>{cell.letters}</span>
                  </td>
                ))}
                <td className={`num ${line.p !== null && line.p <= ticks.alpha ? '' : 'hint'}`} data-label="p:">{line.p === null ? '–' : showP(line.p)}</td>
                {hasLift && <td className="num soft" data-label="Liking with it:">{line.lift ? `${line.lift.difference >= 0 ? '+' : '−'}${Math.abs(line.lift.difference).toFixed(1)}` : '–'}</td>}
              </tr>
            ))}
          </tbody>
        </table>
        <p className="hint pt-2"><i>p</i>: Cochran’s Q over people who answered every sample.{hasLift && ' Liking with it: mean liking of glasses with the word less that of glasses without it.'}</p>
      </div>
      {ticks.liking && <LikingTable line={ticks.liking} samples={samples} alpha={ticks.alpha} />}
    </div>
  );
}
