import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { SheetApp } from '@/components/ballot/sheet-app';
import { loadSheet } from '@/lib/ballots/loaders';
import { findSeat } from '@/lib/seats/access';

export const metadata: Metadata = { title: 'Tasting sheet' };

export default async function SheetPage({ params }: PageProps<'/t/[joinKey]'>) {
  const { joinKey } = await params;
  const access = await findSeat(joinKey);
  if (!access) redirect(`/j/${encodeURIComponent(joinKey)}`);
  return <SheetApp sheet={loadSheet(access)} />;
}
