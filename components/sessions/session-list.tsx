import Link from 'next/link';
import { Empty } from '@/components/ui/empty';
import { Ring, type RingState } from '@/components/ui/ring';
import type { SessionState } from '@/db/enums';
import { factsOf } from '@/lib/methods/facts';
import type { SessionSort } from '@/lib/sessions/loaders';
import type { SessionListItem } from '@/lib/sessions/types';

const RING: Record<SessionState, RingState> = { draft: 'to-come', sealed: 'to-come', open: 'open', closed: 'waits', unsealed: 'done', abandoned: 'waits' };

interface Props {
  base: string;
  items: SessionListItem[];
  isFiltered: boolean;
  mayDesign: boolean;
  sort: SessionSort;
  hrefOf(sort: SessionSort): string;
}

export function SessionList({ base, items, isFiltered, mayDesign, sort, hrefOf }: Props) {
  const head = (by: SessionSort, label: string) => <Link href={hrefOf(by)} aria-current={sort === by ? 'true' : undefined}>{label}</Link>;
  if (items.length === 0) {
    return isFiltered ? (
      <Empty action={<Link href={base}>Show all sessions</Link>}>No session fits that.</Empty>
    ) : (
      <Empty action={mayDesign && <Link className="btn btn-main" href={`${base}/new`}>Plan a session</Link>}>No session yet. The first one starts with a question and two pulls.</Empty>
    );
  }
  return (
    <table className="ledger folds">
      <thead><tr><th scope="col">{head('title', 'Session')}</th><th scope="col">{head('state', 'State')}</th><th scope="col">Method</th><th scope="col">{head('when', 'When')}</th><th scope="col">{head('leader', 'Leader')}</th></tr></thead>
      <tbody>
        {items.map((item) => (
          <tr key={item.id}>
            <th scope="row"><Link href={`${base}/${item.id}`}>{item.title}</Link></th>
            <td data-label="State"><span className={`row ${item.state === 'open' ? 'live' : ''}`} style={{ display: 'inline-flex' }}><Ring state={RING[item.state]} size={12} />{item.state}</span></td>
            <td data-label="Method">{factsOf(item.method).name}</td>
            <td data-label="When" className="soft">{item.when}</td>
            <td data-label="Leader" className="soft">{item.leader}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
