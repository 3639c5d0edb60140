import type { Metadata } from 'next';
import Link from 'next/link';
import { ForgetPages } from '@/components/phone/forget-pages';
import { PhonePage } from '@/components/phone/phone-page';
import { phoneWords } from '@/lib/i18n/server';

export async function generateMetadata(): Promise<Metadata> {
  return { title: (await phoneWords('leave')).t('leave.leftTitle') };
}

export default async function LeftPage({ params }: PageProps<'/t/[joinKey]/left'>) {
  const { joinKey } = await params;
  const { t, list } = await phoneWords('leave');
  return (
    <PhonePage title={t('leave.leftTitle')} list={list}>
      <p>{t('leave.left')}</p>
      <p>{t('leave.changed')} <Link href={`/t/${joinKey}`}>{t('leave.back')}</Link></p>
      <ForgetPages which="sheets" />
    </PhonePage>
  );
}
