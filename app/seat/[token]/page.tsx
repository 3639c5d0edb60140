import type { Metadata } from 'next';
import { TakeSeatForm } from '@/components/phone/join-forms';
import { PhonePage } from '@/components/phone/phone-page';
import { phoneWords } from '@/lib/i18n/server';
import { findSeatLink } from '@/lib/seats/mutations';

export async function generateMetadata(): Promise<Metadata> {
  return { title: (await phoneWords('seat')).t('seat.title') };
}

export default async function TakeSeatPage({ params }: PageProps<'/seat/[token]'>) {
  const { token } = await params;
  const link = findSeatLink(token);
  const { t, list } = await phoneWords('seat');
  return link ? (
    <PhonePage title={link.title} list={list}>
      <p>{t('seat.moves', { n: link.number })}</p>
      <TakeSeatForm token={token} number={link.number} />
    </PhonePage>
  ) : (
    <PhonePage title={t('seat.over')} list={list}><p>{t('seat.overWords')}</p></PhonePage>
  );
}
