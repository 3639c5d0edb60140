import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { SheetApp } from '@/components/ballot/sheet-app';
import { loadSheet } from '@/lib/ballots/loaders';
import { phoneWords } from '@/lib/i18n/server';
import { findSeat } from '@/lib/seats/access';

export async function generateMetadata(): Promise<Metadata> {
  return { title: (await phoneWords('sheet')).t('sheet.title') };
}

export default async function SheetPage({ params }: PageProps<'/t/[joinKey]'>) {
  const { joinKey } = await params;
  const access = await findSeat(joinKey);
  if (!access) redirect(`/j/${encodeURIComponent(joinKey)}`);
  const { list } = await phoneWords('sheet', 'phases', 'kept', 'trouble', 'scale', 'triangle', 'rest', 'review', 'done', 'handover');
  return <SheetApp sheet={loadSheet(access, list.locale)} list={list} />;
}
