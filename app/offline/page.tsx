import type { Metadata } from 'next';
import { PhonePage } from '@/components/phone/phone-page';
import { phoneWords } from '@/lib/i18n/server';

export async function generateMetadata(): Promise<Metadata> {
  return { title: (await phoneWords('offline')).t('offline.title') };
}

/** What the service worker shows in place of a page that this device has not kept. */
export default async function OfflinePage() {
  const { t, list } = await phoneWords('offline');
  return (
    <PhonePage title={t('offline.title')} list={list}>
      <p>{t('offline.words')}</p>
      <p><a className="btn btn-main" href="">{t('offline.again')}</a></p>
    </PhonePage>
  );
}
