import type { VerdictView } from '@/lib/results/types';

/** The answer: what was shown, and how far it reaches. */
export function Verdict({ verdict, warnings }: { verdict: VerdictView; warnings: string[] }) {
  return (
    <div className="stack" style={{ flex: '1 1 480px', maxWidth: 820 }}>
      <p className="verdict"><b>{verdict.headline}</b> {verdict.sentences.join(' ')}</p>
      {verdict.reach.map((sentence) => <p key={sentence} className="soft">{sentence}</p>)}
      {warnings.length > 0 && (
        <ul className="caution stack tight" aria-label="Read this with it">
          {warnings.map((warning) => <li key={warning}>{warning}</li>)}
        </ul>
      )}
    </div>
  );
}
