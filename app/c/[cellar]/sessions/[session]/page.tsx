import type { Metadata } from 'next';
import { SessionSteps } from '@/components/sessions/session-steps';
import { DesignSummary } from '@/components/sessions/design-summary';
import { Openings } from '@/components/sessions/openings';
import { AbandonForm, EarlyRequestForm } from '@/components/sessions/session-forms';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { StatePath } from '@/components/ui/state-path';
import { allows } from '@/lib/auth/permissions';
import { orNotFound } from '@/lib/not-found';
import { loadSession } from '@/lib/sessions/loaders';

export const metadata: Metadata = { title: 'Session' };

export default async function SessionPage({ params }: PageProps<'/c/[cellar]/sessions/[session]'>) {
  const { cellar, session: sessionId } = await params;
  const { access, session } = await orNotFound(loadSession(cellar, sessionId));
  const which = { cellar, sessionId };
  const mayRun = allows(access.roles, 'session.run');
  const isRunning = session.state === 'sealed' || session.state === 'open' || session.state === 'closed';
  return (
    <LedgerPage>
      <LedgerHead margin="Session" title={session.title} actions={<StatePath state={session.state} />} />
      {session.privateQuestion && <LedgerRow question="What does the cellar ask?"><p className="verdict">{session.privateQuestion}</p></LedgerRow>}
      {session.abandonReason && <LedgerRow question="Why was it given up?"><p>{session.abandonReason} <span className="hint">{session.abandonedAt}</span></p></LedgerRow>}
      <SessionSteps access={access} session={session} />
      {session.openings.length > 0 && <LedgerRow question="Was it opened early?"><Openings access={access} openings={session.openings} sessionId={sessionId} /></LedgerRow>}
      <LedgerRow question="How is it planned?"><DesignSummary session={session} /></LedgerRow>
      {mayRun && isRunning && (
        <LedgerRow question="An emergency?" note="Before its time the key opens only with a reason and a second person.">
          <details><summary className="link">Ask to open the key early</summary><div style={{ paddingTop: 'var(--s-3)', maxWidth: 480 }}><EarlyRequestForm {...which} /></div></details>
        </LedgerRow>
      )}
      {mayRun && session.state !== 'abandoned' && session.state !== 'unsealed' && (
        <LedgerRow question="Give it up?" note="Nothing is deleted.">
          <details><summary className="link">Abandon the session</summary><div style={{ paddingTop: 'var(--s-3)', maxWidth: 480 }}><AbandonForm {...which} /></div></details>
        </LedgerRow>
      )}
    </LedgerPage>
  );
}
