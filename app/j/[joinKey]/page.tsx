import type { Metadata } from 'next';
import { notFound, redirect } from 'next/navigation';
import { BeforeTasting } from '@/components/phone/before-tasting';
import { ClaimForm } from '@/components/phone/join-forms';
import { LookAgain } from '@/components/phone/look-again';
import { OfflineNotes } from '@/components/phone/offline-notes';
import { PhonePage } from '@/components/phone/phone-page';
import { currentUser } from '@/lib/auth/access';
import { phoneWords } from '@/lib/i18n/server';
import { findSeat } from '@/lib/seats/access';
import { joinView } from '@/lib/seats/loaders';

export async function generateMetadata(): Promise<Metadata> {
  return { title: (await phoneWords('join')).t('join.title') };
}

export default async function JoinSessionPage({ params }: PageProps<'/j/[joinKey]'>) {
  const { joinKey } = await params;
  const session = joinView(joinKey);
  if (!session) notFound();
  if (await findSeat(joinKey)) redirect(`/t/${joinKey}`);
  const { t, list } = await phoneWords('join', 'allergens', 'sheet');
  if (session.state === 'sealed') {
    return (
      <PhonePage title={session.title} list={list}>
        <p>{t('join.notOpen')}</p>
        <LookAgain seconds={5} />
      </PhonePage>
    );
  }
  if (session.state !== 'open') return <PhonePage title={session.title} list={list}><p>{t('join.closed')}</p></PhonePage>;
  const user = await currentUser();
  return (
    <PhonePage title={session.title} list={list}>
      <BeforeTasting allergens={session.allergens} />
      <ClaimForm joinKey={joinKey} name={user?.name ?? ''} />
      <OfflineNotes />
    </PhonePage>
  );
}
