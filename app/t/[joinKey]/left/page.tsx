import type { Metadata } from 'next';
import Link from 'next/link';
import { Door } from '@/components/ui/door';

export const metadata: Metadata = { title: 'You left the tasting' };

export default async function LeftPage({ params }: PageProps<'/t/[joinKey]/left'>) {
  const { joinKey } = await params;
  return (
    <Door title="You left the tasting">
      <p>What you answered before is kept. Nobody is told a reason.</p>
      <p>Changed your mind? <Link href={`/t/${joinKey}`}>Back to your sheet</Link></p>
    </Door>
  );
}
