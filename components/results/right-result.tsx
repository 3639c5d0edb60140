import { shortName, showP, showPercent } from '@/lib/results/format';
import type { RightSideView, RightView, SampleView } from '@/lib/results/types';
import { LikingTable } from './liking-table';

function Side({ side, label }: { side: RightSideView; label: string }) {
  return (
    <td className={`num ${side.isMarked ? 'mid' : ''}`} data-label={`${label}:`}>
      {showPercent(side.share)}
      {side.drop !== null && <span className={side.isMarked ? '' : 'hint'}>, {side.drop >= 0 ? '−' : '+'}{Math.abs(side.drop).toFixed(1)}{side.p !== null && ` (p ${showP(side.p)})`}</span>}
    </td>
  );
}

/** Too little, just right, too much: shares and what each side cost in liking. */
export function RightResult({ right, samples }: { right: RightView; samples: SampleView[] }) {
  if (right.whyNot) return <p>{right.whyNot}</p>;
  return (
    <div className="stack">
      <div className="scroll-x" tabIndex={0} role="region" aria-label="How much is right">
        <p className="soft pb-2" id="right-is">Shares of the people, and the liking lost against those who found it just right (points of nine; Welch’s t test). In bold: a fifth of the people or more, and a loss that was shown.</p>
        <table className="ledger folds" aria-describedby="right-is">
          <thead><tr><th scope="col">Trait</th><th scope="col">Sample</th><th scope="col" className="num">Too little</th><th scope="col" className="num">Just right</th><th scope="col" className="num">Too much</th><th scope="col" className="num">Answers</th></tr></thead>
          <tbody>
            {right.lines.flatMap((line) => line.cells.map((cell) => (
              <tr key={`${line.item}-${cell.sample}`}>
                <th scope="row">{line.name}</th>
                <td data-label="Sample:">{shortName(samples.find((view) => view.sample === cell.sample)!)}</td>
                <Side side={cell.low} label="Too little" />
                <td className="num" data-label="Just right:">{showPercent(cell.right)}</td>
                <Side side={cell.high} label="Too much" />
                <td className="num" data-label="Answers:">{cell.n}</td>
              </tr>
            )))}
          </tbody>
        </table>
      </div>
      {right.liking && <LikingTable line={right.liking} samples={samples} alpha={right.alpha} />}
    </div>
  );
}
