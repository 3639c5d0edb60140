import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { LeaveForm } from '@/components/phone/join-forms';
import { Door } from '@/components/ui/door';
import { findSeat } from '@/lib/seats/access';

export const metadata: Metadata = { title: 'Leave the tasting' };

export default async function LeavePage({ params }: PageProps<'/t/[joinKey]/leave'>) {
  const { joinKey } = await params;
  if (!(await findSeat(joinKey))) redirect('/j');
  return (
    <Door title="Leave the tasting?">
      <p>You need no reason. What you answered so far is kept and counts; your other glasses stay empty.</p>
      <LeaveForm joinKey={joinKey} />
      <p><Link href={`/t/${joinKey}`}>Back to your sheet</Link></p>
    </Door>
  );
}
