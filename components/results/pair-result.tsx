import { shortName, showP, showPercent } from '@/lib/results/format';
import type { PairFoundView, SampleView } from '@/lib/results/types';
import { SetsBySeat } from './choice-seats';

/** Two samples and how often each was chosen. */
export function PairResult({ pair, samples }: { pair: PairFoundView; samples: SampleView[] }) {
  if (pair.whyNot) return <p>{pair.whyNot}</p>;
  const nameOf = (sample: number) => shortName(samples.find((view) => view.sample === sample)!);
  return (
    <div style={{ maxWidth: 640 }}>
      <p className="soft pb-2" id="pair-is">{pair.asks === 'liked' ? 'Which was liked better' : `Which has more ${pair.trait?.toLowerCase()}`}. Exact binomial test, two-sided, chance 1/2.</p>
      <table className="ledger folds" aria-describedby="pair-is">
        <thead><tr>{pair.chosen.map(({ sample }) => <th key={sample} scope="col" className="num">{nameOf(sample)}</th>)}<th scope="col" className="num">Needed</th><th scope="col" className="num"><i>p</i></th><th scope="col" className="num">Share for {nameOf(pair.chosen[0]!.sample)} (95 % exact limits)</th></tr></thead>
        <tbody>
          <tr>
            {pair.chosen.map(({ sample, count }) => <td key={sample} className="num" data-label={`${nameOf(sample)}:`}>{count} of {pair.n}</td>)}
            <td className="num" data-label="Needed:">{pair.needed ?? 'none would do'}</td>
            <td className="num" data-label="p:">{pair.p === null ? '–' : showP(pair.p)}</td>
            <td className="num" data-label="Share:">{pair.share ? `${showPercent(pair.share.value)} (${showPercent(pair.share.low)} to ${showPercent(pair.share.high)})` : '–'}</td>
          </tr>
        </tbody>
      </table>
    </div>
  );
}

/** Which one each seat chose. */
export function PairSeats({ pair, samples }: { pair: PairFoundView; samples: SampleView[] }) {
  return (
    <SetsBySeat
      sets={pair.sets} seats={pair.bySeat}
      said={(seat, set) => {
        const answer = pair.bySeat.find((entry) => entry.seat === seat)?.sets.find((entry) => entry.set === set);
        const sample = samples.find((view) => view.sample === answer?.sample);
        return sample ? { text: `${shortName(sample)}${answer?.isGuess ? ', guessed' : ''}`, isMissing: false } : { text: 'no answer', isMissing: true };
      }}
    />
  );
}
