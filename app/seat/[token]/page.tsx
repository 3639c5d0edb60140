import type { Metadata } from 'next';
import { TakeSeatForm } from '@/components/phone/join-forms';
import { Door } from '@/components/ui/door';
import { findSeatLink } from '@/lib/seats/mutations';

export const metadata: Metadata = { title: 'Move a seat to this phone' };

export default async function TakeSeatPage({ params }: PageProps<'/seat/[token]'>) {
  const { token } = await params;
  const link = findSeatLink(token);
  return link ? (
    <Door title={link.title}>
      <p>Seat {link.number} moves to this phone. The former phone can’t answer for it any more; what was received stays.</p>
      <TakeSeatForm token={token} number={link.number} />
    </Door>
  ) : (
    <Door title="This link has run out"><p>It was used before, or it is older than four hours. Ask the leader for a new one.</p></Door>
  );
}
