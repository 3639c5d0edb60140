import type { Metadata } from 'next';
import { PullApp } from '@/components/pull/pull-app';
import { phoneWords } from '@/lib/i18n/server';
import { loadPullSheet } from '@/lib/pulls/loaders';

export async function generateMetadata(): Promise<Metadata> {
  return { title: (await phoneWords('pull')).t('pull.title') };
}

export default async function PullSheetPage({ params }: PageProps<'/pull/[cellar]'>) {
  const { cellar } = await params;
  const view = await loadPullSheet(cellar);
  const { list } = await phoneWords('pull', 'kept', 'trouble', 'sheet');
  return <PullApp view={view} list={list} />;
}
