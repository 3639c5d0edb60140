import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { LeaveForm } from '@/components/phone/join-forms';
import { PhonePage } from '@/components/phone/phone-page';
import { phoneWords } from '@/lib/i18n/server';
import { findSeat } from '@/lib/seats/access';

export async function generateMetadata(): Promise<Metadata> {
  return { title: (await phoneWords('leave')).t('leave.title') };
}

export default async function LeavePage({ params }: PageProps<'/t/[joinKey]/leave'>) {
  const { joinKey } = await params;
  if (!(await findSeat(joinKey))) redirect('/j');
  const { t, list } = await phoneWords('leave');
  return (
    <PhonePage title={t('leave.ask')} list={list}>
      <p>{t('leave.words')}</p>
      <LeaveForm joinKey={joinKey} />
      <p><Link href={`/t/${joinKey}`}>{t('leave.back')}</Link></p>
    </PhonePage>
  );
}
