import type { Metadata } from 'next';
import Link from 'next/link';
import { VesselTable } from '@/components/register/vessel-table';
import { Empty } from '@/components/ui/empty';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { allows } from '@/lib/auth/permissions';
import { loadVessels, VESSEL_SORTS, type VesselSort } from '@/lib/register/loaders';

export const metadata: Metadata = { title: 'Barrels' };

export default async function BarrelsPage({ params, searchParams }: PageProps<'/c/[cellar]/barrels'>) {
  const { cellar } = await params;
  const { q, sort: wanted, archived } = await searchParams;
  const query = typeof q === 'string' ? q : '';
  const sort = VESSEL_SORTS.find((candidate) => candidate === wanted) ?? 'name';
  const { access, items, total } = await loadVessels(cellar, query, sort, archived === 'yes');
  const base = `/c/${cellar}/barrels`;
  const mayEdit = allows(access.roles, 'register.edit');
  const hrefOf = (by: VesselSort) => `${base}?${new URLSearchParams({ ...(query && { q: query }), sort: by, ...(archived === 'yes' && { archived: 'yes' }) })}`;
  return (
    <LedgerPage>
      <LedgerHead margin="Barrels" title="Every vessel and what it holds" actions={(
        <span className="row wrap">
          {allows(access.roles, 'pull.record') && <Link className="btn" href={`/pull/${cellar}`}>Pull sheet</Link>}
          <Link className="btn" href={`${base}/tags`}>Tags</Link>
          {mayEdit && <Link className="btn btn-main" href={`${base}/new`}>Add a vessel</Link>}
        </span>
      )} />
      <LedgerRow question="Which barrel?" note={`${items.length} of ${total}. A head sorts by its column.`}>
        <form className="toolbar" role="search">
          <input className="input" type="search" name="q" defaultValue={query} placeholder="Number, lot, cooper, place" aria-label="Find a vessel" />
          <label className="tick-row"><input type="checkbox" name="archived" value="yes" defaultChecked={archived === 'yes'} /> archived too</label>
          <button className="btn">Find</button>
        </form>
        {items.length > 0 ? <VesselTable base={base} items={items} sort={sort} hrefOf={hrefOf} /> : total === 0 ? (
          <Empty action={mayEdit && <Link className="btn" href={`${base}/new`}>Add the first vessel</Link>}>No vessel yet. Barrels, puncheons, tanks and kegs stand here, each with all that it held.</Empty>
        ) : <Empty action={<Link href={base}>Show all</Link>}>No vessel fits “{query}”.</Empty>}
      </LedgerRow>
    </LedgerPage>
  );
}
