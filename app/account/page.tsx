import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { ChangePasswordForm } from '@/components/auth/password-forms';
import { Empty } from '@/components/ui/empty';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { Masthead } from '@/components/ui/masthead';
import { currentUser, listCellars } from '@/lib/auth/access';
import { signOutAction, signOutEverywhereAction } from '@/lib/auth/actions';

export const metadata: Metadata = { title: 'Your account' };

export default async function AccountPage() {
  const user = await currentUser();
  if (!user) redirect('/sign-in?next=/account');
  const cellars = listCellars(user);
  return (
    <div className="desk">
      <Masthead home="/account" items={[]} cellarName={user.name} />
      <LedgerPage>
        <LedgerHead
          margin="Account"
          title={user.name}
          actions={
            <>
              <form action={signOutEverywhereAction}><button className="btn btn-bare">Sign out everywhere</button></form>
              <form action={signOutAction}><button className="btn">Sign out</button></form>
            </>
          }
        />
        <LedgerRow question="Which cellar?">
          {cellars.length === 0 ? (
            <Empty>You belong to no cellar yet. An owner adds you with {user.email}.</Empty>
          ) : (
            <ul className="stack tight">
              {cellars.map((cellar) => (
                <li key={cellar.id}><Link className="mid" href={`/c/${cellar.slug}`}>{cellar.name}</Link> {cellar.isDemo && <span className="hint">invented, for trying out</span>}</li>
              ))}
            </ul>
          )}
        </LedgerRow>
        <LedgerRow question="A new password?" note={user.email}>
          <div style={{ maxWidth: 420 }}><ChangePasswordForm /></div>
        </LedgerRow>
      </LedgerPage>
    </div>
  );
}
