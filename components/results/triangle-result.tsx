import { CorrectPlot } from '@/components/charts/correct-plot';
import { showP, showPercent } from '@/lib/results/format';
import type { TriangleView } from '@/lib/results/types';

const limit = (share: number) => (share <= 0 ? '0 %' : showPercent(share));

/** d′ and its limits; without an upper end when everybody found the odd glass. */
function sizeWords({ value, lower, upper }: NonNullable<TriangleView['dPrime']>): string {
  const low = lower.toFixed(1);
  if (value === null) return `above ${low}`;
  return `${value.toFixed(1)} (${low} to ${upper === null ? 'no end' : upper.toFixed(1)})`;
}

function Numbers({ triangle }: { triangle: TriangleView }) {
  const { n, correct, p, minimumCorrect: needed, pd, dPrime: size } = triangle;
  return (
    <div>
      <p className="soft pb-2" id="test-is">Exact binomial test, one-sided, chance 1/3.</p>
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

function Power({ triangle }: { triangle: TriangleView }) {
  return (
    <div>
      <p className="soft pb-2" id="power-is">What so many answers would have shown (power at {showPercent(triangle.alpha)}).</p>
      <table className="ledger folds" aria-describedby="power-is">
        <thead><tr><th scope="col">If this share of people tasted it</th><th scope="col" className="num">chance that it would have been shown</th></tr></thead>
        <tbody>
          {triangle.power.map((point) => (
            <tr key={point.pd}><td data-label="If">{showPercent(point.pd)}</td><td className="num" data-label="chance">{showPercent(point.power)}</td></tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** The triangle test: a drawing, the same in numbers, and what could have been missed. */
export function TriangleResult({ triangle }: { triangle: TriangleView }) {
  if (triangle.whyNot) return <p>{triangle.whyNot}</p>;
  return (
    <div className="stack" style={{ maxWidth: 760 }}>
      <CorrectPlot n={triangle.n} correct={triangle.correct} needed={triangle.minimumCorrect} />
      <Numbers triangle={triangle} />
      <Power triangle={triangle} />
    </div>
  );
}

/** Every seat's sets in the order of seats. */
export function TriangleSeats({ triangle }: { triangle: TriangleView }) {
  const word = (isCorrect: boolean | null, isGuess: boolean) => (isCorrect === null ? 'no answer' : `${isCorrect ? 'found it' : 'another glass'}${isGuess ? ', guessed' : ''}`);
  return (
    <div className="stack" style={{ maxWidth: 640 }}>
      <p className="text-16">The answer rests on the count. {triangle.sets === 1 ? 'One set' : 'So few sets'} can’t say of one person whether he or she tastes the difference.</p>
      <table className="ledger folds">
        <thead><tr><th scope="col">Seat</th>{Array.from({ length: triangle.sets }, (_, i) => <th scope="col" key={i}>Set {i + 1}</th>)}</tr></thead>
        <tbody>
          {triangle.bySeat.map((seat) => (
            <tr key={seat.seat}>
              <th scope="row"><b>{seat.seat}</b> {seat.name && <span className="soft">{seat.name}</span>}</th>
              {seat.sets.map((set) => <td key={set.set} data-label={`Set ${set.set}:`} className={set.isCorrect === null ? 'hint' : ''}>{word(set.isCorrect, set.isGuess)}</td>)}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
