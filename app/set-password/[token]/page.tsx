import type { Metadata } from 'next';
import { SetPasswordForm } from '@/components/auth/password-forms';
import { Door } from '@/components/ui/door';
import { linkState } from '@/lib/auth/loaders';

export const metadata: Metadata = { title: 'Set a password' };

export default async function SetPasswordPage({ params }: PageProps<'/set-password/[token]'>) {
  const { token } = await params;
  const person = linkState(token);
  return person ? (
    <Door title={`Set a password, ${person.name}`}>
      <p className="soft">For {person.email}. This link works once.</p>
      <SetPasswordForm token={token} />
    </Door>
  ) : (
    <Door title="This link has run out">
      <p>It was used before, or it is older than a week. An owner of the cellar can make a new one under Settings, People.</p>
    </Door>
  );
}
