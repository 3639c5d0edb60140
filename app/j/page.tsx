import type { Metadata } from 'next';
import { JoinCodeForm } from '@/components/phone/join-forms';
import { PhonePage } from '@/components/phone/phone-page';
import { phoneWords } from '@/lib/i18n/server';

export async function generateMetadata(): Promise<Metadata> {
  return { title: (await phoneWords('join')).t('join.title') };
}

export default async function JoinPage() {
  const { t, list } = await phoneWords('join');
  return (
    <PhonePage title={t('join.title')} list={list}>
      <p className="soft">{t('join.scan')}</p>
      <JoinCodeForm />
    </PhonePage>
  );
}
