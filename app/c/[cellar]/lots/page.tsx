import type { Metadata } from 'next';
import Link from 'next/link';
import { Empty } from '@/components/ui/empty';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { allows } from '@/lib/auth/permissions';
import { DRINK_WORDS } from '@/lib/register/format';
import { LOT_SORTS, loadLots, type LotSort } from '@/lib/register/loaders';

export const metadata: Metadata = { title: 'Lots' };

export default async function LotsPage({ params, searchParams }: PageProps<'/c/[cellar]/lots'>) {
  const { cellar } = await params;
  const { q, sort: wanted, archived } = await searchParams;
  const query = typeof q === 'string' ? q : '';
  const sort = LOT_SORTS.find((candidate) => candidate === wanted) ?? 'vintage';
  const { access, items } = await loadLots(cellar, query, sort, archived === 'yes');
  const base = `/c/${cellar}/lots`;
  const head = (by: LotSort, label: string) => <Link href={`${base}?${new URLSearchParams({ ...(query && { q: query }), sort: by, ...(archived === 'yes' && { archived: 'yes' }) })}`} aria-current={sort === by ? 'true' : undefined}>{label}</Link>;
  const add = allows(access.roles, 'register.edit') && <Link className="btn btn-main" href={`${base}/new`}>Add a lot</Link>;
  return (
    <LedgerPage>
      <LedgerHead margin="Lots" title="What ages here" actions={add} />
      <LedgerRow question="Which lot?">
        <form className="toolbar" role="search">
          <input className="input" type="search" name="q" defaultValue={query} placeholder="Code, name, year" aria-label="Find a lot" />
          <label className="tick-row"><input type="checkbox" name="archived" value="yes" defaultChecked={archived === 'yes'} /> archived too</label>
          <button className="btn">Find</button>
        </form>
        {items.length === 0 ? <Empty action={query ? <Link href={base}>Show all</Link> : add}>{query ? `No lot fits “${query}”.` : 'No lot yet. A lot is followed from vessel to vessel.'}</Empty> : (
          <table className="ledger folds">
            <thead><tr><th scope="col">{head('code', 'Lot')}</th><th scope="col">{head('name', 'Name')}</th><th scope="col">Drink</th><th scope="col" className="num n">{head('vintage', 'Vintage')}</th><th scope="col" className="num n">{head('vessels', 'Vessels now')}</th></tr></thead>
            <tbody>
              {items.map((lot) => (
                <tr key={lot.id}>
                  <th scope="row"><Link href={`${base}/${lot.id}`}><b>{lot.code}</b></Link>{lot.isArchived && <span className="hint"> archived</span>}</th>
                  <td data-label="Name">{lot.name}</td>
                  <td data-label="Drink" className="soft">{DRINK_WORDS[lot.drink]}</td>
                  <td data-label="Vintage" className="num n soft">{lot.vintage}</td>
                  <td data-label="Vessels now" className="num n">{lot.vessels}</td>
                </tr>
              ))}
            </tbody>
          </table>
        )}
      </LedgerRow>
    </LedgerPage>
  );
}
