import Link from 'next/link';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { Ring } from '@/components/ui/ring';
import type { NotYetView } from '@/lib/results/types';

/** In place of results before the key is open: what is missing, and nothing of any answer. */
export function NotYet({ notYet, sessionHref }: { notYet: NotYetView; sessionHref: string }) {
  const isOver = notYet.state === 'abandoned';
  return (
    <LedgerPage>
      <LedgerHead margin="Results" title={notYet.title} actions={<Link className="btn" href={sessionHref}>To the session</Link>} />
      <LedgerRow question={isOver ? 'Why are there none?' : 'What is missing?'} note={`The session is ${notYet.state}.`}>
        <div className="stack">
          <p className="verdict">{isOver ? 'No results come of this session.' : 'Nobody reads a score before the key is open.'}</p>
          <ol className="stack tight">
            {notYet.missing.map((step, index) => (
              <li key={step} className="row"><Ring state={!isOver && index === 0 ? 'waits' : 'to-come'} label={index === 0 ? 'next' : 'later'} />{step}</li>
            ))}
          </ol>
        </div>
      </LedgerRow>
    </LedgerPage>
  );
}
