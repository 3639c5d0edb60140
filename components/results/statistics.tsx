import { listWords, sayP, shortName, showP, showScore } from '@/lib/results/format';
import type { LimitedView, LineView, ProfileView, SampleView, TestView } from '@/lib/results/types';

/** Degrees of freedom: whole ones as they are, estimated ones to one decimal. */
const showDf = (df: number) => (Math.abs(df - Math.round(df)) < 1e-9 ? String(Math.round(df)) : df.toFixed(1));
const figure = (value: number | null) => (value === null ? 'no value' : value.toFixed(2));
const limited = (view: LimitedView | null) => (view ? `${view.value.toFixed(2)} (${view.low.toFixed(2)} to ${view.high.toFixed(2)})` : 'no value');

function Test({ view }: { view: TestView | null }) {
  if (!view) return <span className="hint">not estimable</span>;
  return <><span className="whitespace-nowrap">F({showDf(view.df1)}, {showDf(view.df2)}) = {view.F.toFixed(2)},</span> <span className="whitespace-nowrap">{sayP(view.p)}</span></>;
}

function Row({ line }: { line: LineView }) {
  const missing = [...line.gaps, ...line.leftOut];
  return (
    <tr>
      <th scope="row">{line.name}</th>
      <td data-label="Sample">{line.whyNot ?? <Test view={line.product} />}{line.method === 'mixed' && <span className="hint"> REML</span>}</td>
      <td data-label="Panelist × sample">{line.method === 'anova' && <Test view={line.interaction} />}</td>
      <td data-label="Scale use">{line.scaling && <Test view={line.scaling} />}</td>
      <td data-label="Place in the flight">{line.position && <Test view={line.position} />}</td>
      <td className="num" data-label="Kendall’s W">{figure(line.kendallW)}{line.kendallP !== null && <span className="hint"> ({showP(line.kendallP)})</span>}</td>
      <td className="num whitespace-nowrap" data-label="ICC(2,k)">{limited(line.icc)}</td>
      <td className="num" data-label="Panelists">{line.assessors}</td>
      <td data-label="Scores missing">{missing.length > 0 ? `${line.leftOut.length > 0 ? 'left out: ' : ''}seats ${listWords(missing)}` : <span className="hint">none</span>}</td>
    </tr>
  );
}

function Pairs({ line, names }: { line: LineView; names: ReadonlyMap<number, string> }) {
  return (
    <details>
      <summary className="link">{line.name}: all pairs</summary>
      <div className="scroll-x pt-2" tabIndex={0} role="region" aria-label={`Pairs on ${line.name}`}>
        <table className="ledger folds" style={{ maxWidth: 640 }}>
          <thead><tr><th scope="col">Pair</th><th scope="col" className="num">Difference</th><th scope="col" className="num">Limits</th><th scope="col" className="num"><i>p</i>, adjusted</th></tr></thead>
          <tbody>
            {line.pairs.map((pair) => (
              <tr key={`${pair.a}-${pair.b}`}>
                <th scope="row">{names.get(pair.b)} less {names.get(pair.a)}</th>
                <td className="num" data-label="Difference">{showScore(pair.difference)}</td>
                <td className="num whitespace-nowrap" data-label="Limits">{showScore(pair.low)} to {showScore(pair.high)}</td>
                <td className="num" data-label="p, adjusted">{showP(pair.p)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}

function Method({ profile }: { profile: ProfileView }) {
  const isSingle = profile.replicates === 1;
  const hasGaps = profile.lines.some((line) => line.method === 'mixed');
  return (
    <p className="soft" style={{ maxWidth: '80ch' }}>
      Two-way analysis of variance, panelists random and samples fixed. The sample is tested over the panelist × sample
      {isSingle ? ' residual (with one replicate interaction and error are one)' : ' interaction, the interaction over the error'}. Pairs by Tukey’s honestly significant
      difference at {Math.round(profile.alpha * 100)} %; bars are each mean ± half of it.
      {hasGaps && ' Lines with missing scores: the same model by REML with Kenward and Roger’s degrees of freedom, estimated marginal means, each pair by its own error; their bars show half the largest difference that a pair needed.'}
      {' '}Scale use is the scaling part of the mixed assessor model, over what is left of the disagreement; the place in the flight is tested with samples and panelists allowed for.
      W, with Friedman’s test in brackets, and ICC(2,k), with 95 % limits, are of the panelists’ means by sample, over those who scored every glass.
    </p>
  );
}

/** The tests behind the answer, by their proper names. */
export function Statistics({ profile, samples }: { profile: ProfileView; samples: readonly SampleView[] }) {
  const names = new Map(samples.map((sample) => [sample.sample, shortName(sample)]));
  return (
    <details>
      <summary className="link">The statistics by name</summary>
      <div className="stack pt-3">
        <Method profile={profile} />
        <div className="scroll-x" tabIndex={0} role="region" aria-label="Statistics by line">
          <table className="ledger folds">
            <thead>
              <tr>
                <th scope="col">Line</th><th scope="col">Sample</th><th scope="col">Panelist × sample</th><th scope="col">Scale use</th><th scope="col">Place in the flight</th>
                <th scope="col" className="num">Kendall’s W</th><th scope="col" className="num">ICC(2,k)</th><th scope="col" className="num n">Panelists</th><th scope="col">Scores missing</th>
              </tr>
            </thead>
            <tbody>{profile.lines.map((line) => <Row key={line.item} line={line} />)}</tbody>
          </table>
        </div>
        {profile.lines.filter((line) => line.pairs.length > 0).map((line) => <Pairs key={line.item} line={line} names={names} />)}
      </div>
    </details>
  );
}
