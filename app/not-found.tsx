import Link from 'next/link';
import { PhonePage } from '@/components/phone/phone-page';
import { phoneWords } from '@/lib/i18n/server';

export default async function NotFound() {
  const { t, list } = await phoneWords('nothing');
  return (
    <PhonePage title={t('nothing.title')} list={list}>
      <p>{t('nothing.words')}</p>
      <p className="row wrap"><Link href="/">{t('nothing.cellar')}</Link> <Link href="/j">{t('nothing.join')}</Link></p>
    </PhonePage>
  );
}
