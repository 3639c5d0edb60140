import Link from 'next/link';
import type { VesselListItem, VesselSort } from '@/lib/register/loaders';

const HEADS: { sort: VesselSort; label: string }[] = [
  { sort: 'name', label: 'Vessel' },
  { sort: 'lot', label: 'Holds' },
  { sort: 'cooper', label: 'Wood' },
  { sort: 'year', label: 'Made' },
  { sort: 'last', label: 'Last pull' },
];

/** The register as a ledger; each head sorts by its column. */
export function VesselTable({ base, items, sort, hrefOf }: { base: string; items: VesselListItem[]; sort: VesselSort; hrefOf(sort: VesselSort): string }) {
  return (
    <table className="ledger folds">
      <thead>
        <tr>{HEADS.map((head) => <th key={head.sort} scope="col" aria-sort={sort === head.sort ? 'ascending' : undefined}><Link href={hrefOf(head.sort)} aria-current={sort === head.sort ? 'true' : undefined}>{head.label}</Link></th>)}<th scope="col">Where</th></tr>
      </thead>
      <tbody>
        {items.map((item) => (
          <tr key={item.id}>
            <th scope="row"><Link href={`${base}/${item.id}`}><b>{item.name}</b></Link> <span className="soft">{item.kind}, {item.volumeL} L</span>{item.isArchived && <span className="hint"> archived</span>}</th>
            <td data-label="Holds">{item.lot ? <>{item.lot} <span className="soft">{item.lotName}</span></> : <span className="hint">empty</span>}</td>
            <td data-label="Wood" className="soft">{[item.cooper, item.toast].filter(Boolean).join(', ')}</td>
            <td data-label="Made" className="soft">{item.year}</td>
            <td data-label="Last pull" className="soft">{item.lastPull ?? 'never'}</td>
            <td data-label="Where" className="soft">{item.location}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
