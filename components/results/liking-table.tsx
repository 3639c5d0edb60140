import { shortName, showP } from '@/lib/results/format';
import type { LineView, SampleView } from '@/lib/results/types';

/** The overall liking that was asked beside other questions. */
export function LikingTable({ line, samples, alpha }: { line: LineView; samples: SampleView[]; alpha: number }) {
  if (line.cells.length === 0) return null;
  const isShown = line.product !== null && line.product.p <= alpha;
  return (
    <div style={{ maxWidth: 480 }}>
      <p className="soft pb-2" id="liking-is">Overall liking, 1 to 9. {line.product ? `Analysis of variance, p ${showP(line.product.p)}.` : line.whyNot}</p>
      <table className="ledger folds" aria-describedby="liking-is">
        <thead><tr><th scope="col">Sample</th><th scope="col" className="num">Mean</th><th scope="col" className="num">Answers</th></tr></thead>
        <tbody>
          {[...line.cells].sort((a, b) => b.mean - a.mean).map((cell) => (
            <tr key={cell.sample}>
              <th scope="row">{shortName(samples.find((view) => view.sample === cell.sample)!)}</th>
              <td className="num" data-label="Mean:">{cell.mean.toFixed(1)} <span className={isShown ? 'let' : 'dim'}>{cell.letters}</span></td>
              <td className="num" data-label="Answers:">{cell.n}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
