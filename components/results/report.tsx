import Link from 'next/link';
import type { ReportItem } from '@/lib/results/types';

/** How the session was run: the items that a report of the test owes. */
export function Report({ items }: { items: ReportItem[] }) {
  return (
    <dl className="facts">
      {items.map((item, index) => (
        <div key={index} style={{ display: 'contents' }}>
          <dt>{item.name}</dt>
          <dd style={{ overflowWrap: 'anywhere', margin: 0 }}>{item.href ? <Link href={item.href}>{item.text}</Link> : item.text}</dd>
        </div>
      ))}
    </dl>
  );
}
