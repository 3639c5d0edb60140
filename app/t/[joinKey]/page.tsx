import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { SheetApp } from '@/components/ballot/sheet-app';
import { loadSheet } from '@/lib/ballots/loaders';
import type { Ballot } from '@/lib/ballots/types';
import { phoneWords } from '@/lib/i18n/server';
import type { Area } from '@/lib/i18n/words';
import { factsOf } from '@/lib/methods/facts';
import { findSeat } from '@/lib/seats/access';

/** What each kind of ballot says beside what all say. */
const WORDS_OF: Record<Ballot['kind'], Area[]> = {
  glasses: ['points', 'category', 'rate', 'right', 'liking'], note: ['points', 'rate', 'note', 'category', 'right', 'liking'], pick: ['pick', 'ask', 'picked', 'choose'], order: ['pick', 'order'],
};

export async function generateMetadata(): Promise<Metadata> {
  return { title: (await phoneWords('sheet')).t('sheet.title') };
}

export default async function SheetPage({ params }: PageProps<'/t/[joinKey]'>) {
  const { joinKey } = await params;
  const access = await findSeat(joinKey);
  if (!access) redirect(`/j/${encodeURIComponent(joinKey)}`);
  const { ballot } = factsOf(access.session.method);
  const { list } = await phoneWords('sheet', 'phases', 'kept', 'trouble', 'scale', 'rest', 'review', 'done', 'handover', ...WORDS_OF[ballot.kind]);
  return <SheetApp sheet={loadSheet(access, list.locale)} list={list} />;
}
