import type { Metadata } from 'next';
import Link from 'next/link';
import { SessionList } from '@/components/sessions/session-list';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { SESSION_STATES } from '@/db/enums';
import { allows } from '@/lib/auth/permissions';
import { loadSessions, SESSION_SORTS, type SessionSort } from '@/lib/sessions/loaders';

export const metadata: Metadata = { title: 'Sessions' };

export default async function SessionsPage({ params, searchParams }: PageProps<'/c/[cellar]/sessions'>) {
  const { cellar } = await params;
  const { q, state, sort: by } = await searchParams;
  const query = typeof q === 'string' ? q : '';
  const wanted = SESSION_STATES.find((candidate) => candidate === state) ?? '';
  const sort = SESSION_SORTS.find((candidate) => candidate === by) ?? 'when';
  const { access, items } = await loadSessions(cellar, query, wanted, sort);
  const base = `/c/${cellar}/sessions`;
  const hrefOf = (order: SessionSort) => `${base}?${new URLSearchParams({ ...(query && { q: query }), ...(wanted && { state: wanted }), sort: order })}`;
  const mayDesign = allows(access.roles, 'session.design');
  return (
    <LedgerPage>
      <LedgerHead margin="Sessions" title="What was tasted, and what comes" actions={mayDesign && <><Link className="btn" href={`/c/${cellar}/plan`}>Plan a test</Link><Link className="btn btn-main" href={`${base}/new`}>Plan a session</Link></>} />
      <LedgerRow question="Which session?">
        <form className="toolbar" role="search">
          <input className="input" type="search" name="q" defaultValue={query} placeholder="Title or leader" aria-label="Title or leader" />
          <select className="input" name="state" defaultValue={wanted} aria-label="State">
            <option value="">every state</option>
            {SESSION_STATES.map((value) => <option key={value} value={value}>{value}</option>)}
          </select>
          <button className="btn">Show</button>
        </form>
        <SessionList base={base} items={items} sort={sort} hrefOf={hrefOf} isFiltered={query !== '' || wanted !== ''} mayDesign={mayDesign} />
      </LedgerRow>
    </LedgerPage>
  );
}
