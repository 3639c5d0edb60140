import type { Metadata } from 'next';
import Link from 'next/link';
import { CallFilterForm } from '@/components/calls/call-filter';
import { CallsTable } from '@/components/calls/calls-table';
import { Empty } from '@/components/ui/empty';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { loadAccess } from '@/lib/auth/access';
import { allows } from '@/lib/auth/permissions';
import { loadCalls } from '@/lib/calls/loaders';
import { callFilterSchema } from '@/lib/calls/schema';

export const metadata: Metadata = { title: 'Calls' };

export default async function CallsPage({ params, searchParams }: PageProps<'/c/[cellar]/calls'>) {
  const { cellar } = await params;
  const access = await loadAccess(cellar, 'cellar.view');
  const filter = callFilterSchema.parse(await searchParams);
  const { calls, total, ever } = loadCalls(access, filter);
  const base = `/c/${access.cellar.slug}/calls`;
  const mayCall = allows(access.roles, 'call.make');
  const hrefOf = (sort: string) => {
    const query = new URLSearchParams({ show: filter.show, sort, find: filter.find, ...(filter.kind && { kind: filter.kind }) });
    return `${base}?${query}`;
  };
  return (
    <LedgerPage>
      <LedgerHead margin="Calls" title="What was decided, and what comes next" actions={mayCall && <Link className="btn btn-main" href={`${base}/new`}>Record a call</Link>} />
      <LedgerRow question="Which calls?" note={total > calls.length ? `The first ${calls.length} of ${total}.` : `${total} of ${ever} ever made.`}>
        <CallFilterForm filter={filter} />
        {calls.length > 0 && <CallsTable cellar={access.cellar.slug} calls={calls} sort={filter.sort} hrefOf={hrefOf} />}
        {calls.length === 0 && ever > 0 && <Empty>No call fits. <Link href={base}>Show the standing ones.</Link></Empty>}
        {ever === 0 && (
          <Empty action={mayCall && <Link className="btn" href={`${base}/new`}>Record the first call</Link>}>
            No call yet. After a session is unsealed, its results lead here: bottle, hold, rack, top, treat, blend or declassify, with reasons and the next date.
          </Empty>
        )}
      </LedgerRow>
    </LedgerPage>
  );
}
