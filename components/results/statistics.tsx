import { sayP, showP } from '@/lib/results/format';
import type { LineView, ProfileView, TestView } from '@/lib/results/types';

const test = (view: TestView | null) => (view ? `F(${view.df1}, ${view.df2}) = ${view.F.toFixed(2)}, ${sayP(view.p)}` : 'not estimable');
const figure = (value: number | null) => (value === null ? 'no value' : value.toFixed(2));

function Row({ line }: { line: LineView }) {
  return (
    <tr>
      <th scope="row">{line.name}</th>
      <td data-label="Sample">{line.whyNot ?? test(line.product)}</td>
      <td data-label="Panelist × sample">{line.product ? test(line.interaction) : ''}</td>
      <td className="num" data-label="Kendall’s W">{figure(line.kendallW)}{line.kendallP !== null && <span className="hint"> ({showP(line.kendallP)})</span>}</td>
      <td className="num" data-label="ICC(2,k)">{figure(line.icc)}</td>
      <td className="num" data-label="Panelists">{line.assessors}</td>
      <td data-label="Left out">{line.leftOut.length > 0 ? `seats ${line.leftOut.join(', ')}` : <span className="hint">nobody</span>}</td>
    </tr>
  );
}

/** The tests behind the answer, by their proper names. */
export function Statistics({ profile }: { profile: ProfileView }) {
  const isSingle = profile.replicates === 1;
  return (
    <details>
      <summary className="link">The statistics by name</summary>
      <div className="stack pt-3">
        <p className="soft" style={{ maxWidth: '80ch' }}>
          Two-way analysis of variance, panelists random and samples fixed. The sample is tested over the panelist × sample
          {isSingle ? ' residual (with one replicate interaction and error are one)' : ' interaction, the interaction over the error'}. Pairs by Tukey’s honestly significant
          difference at {Math.round(profile.alpha * 100)} %; bars are each mean ± half of it. W, with Friedman’s test in brackets, and ICC(2,k) are of the panelists’ means by sample.
        </p>
        <div className="scroll-x" tabIndex={0} role="region" aria-label="Statistics by line">
          <table className="ledger folds">
            <thead>
              <tr><th scope="col">Line</th><th scope="col">Sample</th><th scope="col">Panelist × sample</th><th scope="col" className="num">Kendall’s W</th><th scope="col" className="num">ICC(2,k)</th><th scope="col" className="num n">Panelists</th><th scope="col">Left out</th></tr>
            </thead>
            <tbody>{profile.lines.map((line) => <Row key={line.item} line={line} />)}</tbody>
          </table>
        </div>
      </div>
    </details>
  );
}
