import type { Metadata } from 'next';
import { SetUpForm } from '@/components/setup/set-up-form';
import { Door } from '@/components/ui/door';
import { isFirstOwnerToken } from '@/lib/setup/first-owner';

export const metadata: Metadata = { title: 'Set up the cellar' };

export default async function SetUpPage({ params }: PageProps<'/setup/[token]'>) {
  const { token } = await params;
  if (!isFirstOwnerToken(token)) {
    return (
      <Door title="This link has run out">
        <p>It was used before, or it is older than a week. Start the server again: while there is no cellar, it prints a new link.</p>
      </Door>
    );
  }
  return (
    <Door title="Set up the cellar">
      <p className="soft">You become its owner. People, barrels and sessions come after. This link works once.</p>
      <SetUpForm token={token} timeZones={Intl.supportedValuesOf('timeZone')} timeZone={Intl.DateTimeFormat().resolvedOptions().timeZone} />
    </Door>
  );
}
