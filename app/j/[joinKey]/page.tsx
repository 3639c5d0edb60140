import type { Metadata } from 'next';
import { notFound, redirect } from 'next/navigation';
import { ClaimForm } from '@/components/phone/join-forms';
import { LookAgain } from '@/components/phone/look-again';
import { Door } from '@/components/ui/door';
import { currentUser } from '@/lib/auth/access';
import { findSeat } from '@/lib/seats/access';
import { ALLERGEN_WORDS } from '@/lib/seats/allergens';
import { joinView } from '@/lib/seats/loaders';

export const metadata: Metadata = { title: 'Join a tasting' };

export default async function JoinSessionPage({ params }: PageProps<'/j/[joinKey]'>) {
  const { joinKey } = await params;
  const session = joinView(joinKey);
  if (!session) notFound();
  if (await findSeat(joinKey)) redirect(`/t/${joinKey}`);
  if (session.state === 'sealed') {
    return (
      <Door title={session.title}>
        <p>The session is not open yet. Stay here; your seat comes up as soon as the leader opens it.</p>
        <LookAgain seconds={5} />
      </Door>
    );
  }
  if (session.state !== 'open') {
    return <Door title={session.title}><p>This session is closed. Nobody can join any more.</p></Door>;
  }
  const user = await currentUser();
  return (
    <Door title={session.title}>
      <div className="stack tight">
        <h2>Before you taste</h2>
        <ul className="stack tight">
          <li>{session.allergens.length > 0 ? <>There may be <b>{session.allergens.map((allergen) => ALLERGEN_WORDS[allergen]).join(', ')}</b> in what is served.</> : 'The leader declared no allergens. Ask if you need to be sure.'}</li>
          <li><b>Spit.</b> Even so some alcohol is taken up: plan your way home without driving.</li>
          <li>Pregnancy, medication, faith, or no reason at all: smell only, or leave, at any time.</li>
          <li>Taste alone, and say nothing of the glasses until the session is closed.</li>
        </ul>
      </div>
      <ClaimForm joinKey={joinKey} name={user?.name ?? ''} />
    </Door>
  );
}
