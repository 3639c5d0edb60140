import { CorrectPlot } from '@/components/charts/correct-plot';
import { showP, showPercent } from '@/lib/results/format';
import type { ChoiceView } from '@/lib/results/types';

const limit = (share: number) => (share <= 0 ? '0 %' : showPercent(share));

/** d′ and its limits; without an upper end when everybody was right. */
function sizeWords({ value, lower, upper }: NonNullable<ChoiceView['dPrime']>): string {
  const low = lower.toFixed(1);
  if (value === null) return `above ${low}`;
  return `${value.toFixed(1)} (${low} to ${upper === null ? 'no end' : upper.toFixed(1)})`;
}

function Numbers({ choice }: { choice: ChoiceView }) {
  const { n, correct, p, minimumCorrect: needed, pd, dPrime: size, chance } = choice;
  return (
    <div>
      <p className="soft pb-2" id="test-is">Exact binomial test, one-sided, chance 1/{Math.round(1 / chance)}.</p>
      <table className="ledger folds" aria-describedby="test-is">
        <thead><tr><th scope="col">Answers</th><th scope="col" className="num">Correct</th><th scope="col" className="num">Needed</th><th scope="col" className="num"><i>p</i></th><th scope="col" className="num">Distinguishers (95 % exact limits)</th><th scope="col" className="num">d′ (95 % limits)</th></tr></thead>
        <tbody>
          <tr>
            <td data-label="Answers:">{n}</td>
            <td className="num" data-label="Correct:">{correct}</td>
            <td className="num" data-label="Needed:">{needed ?? 'none would do'}</td>
            <td className="num" data-label="p:">{p === null ? '–' : showP(p)}</td>
            <td className="num" data-label="Distinguishers:">{pd ? `${limit(pd.value)} (${limit(pd.lower)} to ${limit(pd.upper)})` : '–'}</td>
            <td className="num" data-label="d′:">{size ? sizeWords(size) : '–'}</td>
          </tr>
        </tbody>
      </table>
      <p className="hint pt-2">d′ is the distance between the two in units of one taster’s own scatter (Thurstone): below 1 small, above 2 large, common practice.</p>
    </div>
  );
}

function Power({ choice }: { choice: ChoiceView }) {
  return (
    <div>
      <p className="soft pb-2" id="power-is">What so many answers would have shown (power at {showPercent(choice.alpha)}).</p>
      <table className="ledger folds" aria-describedby="power-is">
        <thead><tr><th scope="col">If this share of people tasted it</th><th scope="col" className="num">chance that it would have been shown</th></tr></thead>
        <tbody>
          {choice.power.map((point) => (
            <tr key={point.pd}><td data-label="If">{showPercent(point.pd)}</td><td className="num" data-label="chance">{showPercent(point.power)}</td></tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** A forced choice: a drawing, the same in numbers, and what could have been missed. */
export function ChoiceResult({ choice }: { choice: ChoiceView }) {
  if (choice.whyNot) return <p>{choice.whyNot}</p>;
  return (
    <div className="stack" style={{ maxWidth: 760 }}>
      <CorrectPlot n={choice.n} correct={choice.correct} needed={choice.minimumCorrect} chance={choice.chance} />
      <Numbers choice={choice} />
      <Power choice={choice} />
    </div>
  );
}
