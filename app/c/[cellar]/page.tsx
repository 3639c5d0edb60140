import type { Metadata } from 'next';
import Link from 'next/link';
import { DueTable } from '@/components/today/due-table';
import { Empty } from '@/components/ui/empty';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { Ring } from '@/components/ui/ring';
import { loadToday } from '@/lib/today/loaders';

export const metadata: Metadata = { title: 'Today' };

export default async function TodayPage({ params }: PageProps<'/c/[cellar]'>) {
  const { cellar } = await params;
  const { mayView, mayDesign, waiting, finished, due, more, today } = await loadToday(cellar);
  const base = `/c/${cellar}`;
  const urgent = due.filter((barrel) => barrel.isUrgent).length;
  const count = due.length + more;
  const title = !mayView ? 'Your tastings' : count === 0 ? 'Nothing is overdue.' : `${count} ${count === 1 ? 'barrel is' : 'barrels are'} due${urgent > 0 ? `; ${urgent} ${urgent === 1 ? 'has' : 'have'} a date that came` : ''}.`;
  return (
    <LedgerPage>
      <LedgerHead margin={today} title={title} actions={mayDesign && <Link className="btn btn-main" href={`${base}/sessions/new`}>Plan a session</Link>} />
      <LedgerRow question="Which session?">
        {waiting.length === 0 ? <Empty action={mayDesign && <Link href={`${base}/sessions/new`}>Plan one</Link>}>No session waits.</Empty> : (
          <ul className="stack tight">
            {waiting.map((session) => (
              <li key={session.id} className="row"><Ring state={session.state === 'open' ? 'open' : session.state === 'closed' ? 'waits' : 'to-come'} /><Link className="mid" href={`${base}/sessions/${session.id}`}>{session.title}</Link><span className={session.state === 'open' ? 'live' : 'soft'}>{session.waitsFor}</span></li>
            ))}
          </ul>
        )}
      </LedgerRow>
      {mayView && (
        <LedgerRow question="Which barrel next?" note={<>A date of a call that came, or no pull for six weeks. <Link href={`/pull/${cellar}`}>Pull sheet for the phone</Link></>}>
          {due.length === 0 ? <Empty action={<Link href={`${base}/barrels`}>All barrels</Link>}>Every barrel that holds wine was drawn from lately.</Empty> : <DueTable base={base} due={due} more={more} />}
        </LedgerRow>
      )}
      <LedgerRow question="What came out lately?">
        {finished.length === 0 ? <Empty>No session is unsealed yet.</Empty> : (
          <ul className="stack tight">{finished.map((session) => <li key={session.id} className="row"><Ring state="done" /><Link href={`${base}/sessions/${session.id}/results`}>{session.title}</Link> <span className="soft">{session.on}</span></li>)}</ul>
        )}
      </LedgerRow>
    </LedgerPage>
  );
}
