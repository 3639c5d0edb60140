import type { Metadata } from 'next';
import { CheckForm } from '@/components/check/check-form';
import { PhonePage } from '@/components/phone/phone-page';
import { phoneWords } from '@/lib/i18n/server';

export async function generateMetadata(): Promise<Metadata> {
  return { title: (await phoneWords('check')).t('check.title') };
}

export default async function CheckPage() {
  const { t, list } = await phoneWords('check');
  return (
    <PhonePage title={t('check.ask')} list={list}>
      <p>{t('check.how')}</p>
      <CheckForm commitment="" />
    </PhonePage>
  );
}
