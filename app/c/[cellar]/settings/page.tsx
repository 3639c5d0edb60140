import type { Metadata } from 'next';
import { AddMemberForm, CellarForm, EndMembershipForm, PasswordLink, RemoveDemoForm, RolesForm } from '@/components/members/member-forms';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { loadSettings } from '@/lib/members/loaders';

export const metadata: Metadata = { title: 'Settings' };

export default async function SettingsPage({ params }: PageProps<'/c/[cellar]/settings'>) {
  const { cellar } = await params;
  const { access, members, version } = await loadSettings(cellar);
  return (
    <LedgerPage>
      <LedgerHead margin="Settings" title={access.cellar.name} />
      <LedgerRow question="Who works here?" note="Roles add up. An owner alone sees this page.">
        <ul>
          {members.map((member) => (
            <li key={member.id} style={{ borderBottom: '1px solid var(--rule)' }}>
              <details>
                <summary className="apart" style={{ minHeight: 'var(--touch)' }}>
                  <span><b>{member.name}</b> <span className="soft">{member.email}</span></span>
                  <span className="soft">{member.roles.join(', ').replaceAll('_', ' ')}{!member.hasPassword && <span className="warn">, no password yet</span>}</span>
                </summary>
                <div className="stack" style={{ padding: 'var(--s-3) 0 var(--s-5)' }}>
                  <RolesForm cellar={cellar} userId={member.id} roles={member.roles} />
                  <PasswordLink cellar={cellar} userId={member.id} hasPassword={member.hasPassword} />
                  <div style={{ maxWidth: 420 }}><EndMembershipForm cellar={cellar} userId={member.id} /></div>
                </div>
              </details>
            </li>
          ))}
        </ul>
      </LedgerRow>
      <LedgerRow question="Somebody new?"><AddMemberForm cellar={cellar} /></LedgerRow>
      <LedgerRow question="What is it called, and where?" note="Times are shown in this zone."><CellarForm cellar={cellar} version={version} name={access.cellar.name} timeZone={access.cellar.timeZone} zones={Intl.supportedValuesOf('timeZone')} /></LedgerRow>
      {access.cellar.isDemo && <LedgerRow question="Done with the demo?"><div style={{ maxWidth: 420 }}><RemoveDemoForm cellar={cellar} name={access.cellar.name} /></div></LedgerRow>}
    </LedgerPage>
  );
}
