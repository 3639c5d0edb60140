import Link from 'next/link';
import { Ring } from '@/components/ui/ring';
import type { DueBarrel } from '@/lib/today/loaders';

/** Barrels by urgency, each with its reason in one line. */
export function DueTable({ base, due, more }: { base: string; due: DueBarrel[]; more: number }) {
  return (
    <>
      <table className="ledger folds">
        <thead><tr><th scope="col">Barrel</th><th scope="col">Lot</th><th scope="col">Last pull</th><th scope="col">Why now</th><th scope="col">Next</th></tr></thead>
        <tbody>
          {due.map((barrel) => (
            <tr key={barrel.vesselId} className={barrel.isUrgent ? 'sel' : ''}>
              <th scope="row"><span className="row">{barrel.isUrgent && <Ring state="waits" size={14} label="due" />}<Link href={`${base}/barrels/${barrel.vesselId}`}><b>{barrel.name}</b></Link></span></th>
              <td data-label="Lot">{barrel.lot}</td>
              <td data-label="Last pull" className="soft">{barrel.lastPull}</td>
              <td data-label="Why now">{barrel.reason}</td>
              <td><Link href={`${base}/barrels/${barrel.vesselId}/pull`} aria-label={`Record a pull from barrel ${barrel.name}`}>Pull</Link></td>
            </tr>
          ))}
        </tbody>
      </table>
      {more > 0 && <p className="note">{more} more. <Link href={`${base}/barrels?sort=last`}>All barrels by last pull</Link></p>}
    </>
  );
}
