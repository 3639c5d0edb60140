import type { Metadata } from 'next';
import Link from 'next/link';
import { CallStatus } from '@/components/calls/calls-table';
import { WithdrawForm } from '@/components/calls/withdraw-form';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { loadAccess } from '@/lib/auth/access';
import { allows } from '@/lib/auth/permissions';
import { CALL_CAUTIONS, CALL_WORDS, NEXT_DAY_WORDS } from '@/lib/calls/format';
import { loadCall } from '@/lib/calls/loaders';
import { VESSEL_WORDS } from '@/lib/register/format';
import { showCalendarDay } from '@/lib/time';

export const metadata: Metadata = { title: 'Call' };

export default async function CallPage({ params }: PageProps<'/c/[cellar]/calls/[call]'>) {
  const { cellar, call: callId } = await params;
  const access = await loadAccess(cellar, 'cellar.view');
  const call = loadCall(access, callId);
  const home = `/c/${access.cellar.slug}`;
  const caution = CALL_CAUTIONS[call.kind];
  const mayCall = allows(access.roles, 'call.make');
  return (
    <LedgerPage>
      <LedgerHead margin="Call" title={`${CALL_WORDS[call.kind]} ${VESSEL_WORDS[call.vessel.kind].toLowerCase()} ${call.vessel.name}`} actions={<Link className="btn" href={`${home}/calls`}>All calls</Link>} />
      <LedgerRow question="Why?"><p style={{ whiteSpace: 'pre-line', maxWidth: '70ch' }}>{call.reasons}</p></LedgerRow>
      <LedgerRow question="Where does it stand?">
        <dl className="facts">
          <dt>State</dt><dd><CallStatus call={call} /></dd>
          <dt>{NEXT_DAY_WORDS[call.kind]}</dt><dd>{call.nextDay ? showCalendarDay(call.nextDay) : 'no date'}</dd>
          <dt>{VESSEL_WORDS[call.vessel.kind]}</dt><dd><Link href={`${home}/barrels/${call.vessel.id}`}>{call.vessel.name}</Link>, lot <Link href={`${home}/lots/${call.lot.id}`}>{call.lot.code}</Link></dd>
          <dt>Decided</dt><dd>{call.decidedOn} by {call.decidedBy}</dd>
          <dt>Evidence</dt><dd>{call.session ? <Link href={`${home}/sessions/${call.session.id}/results`}>{call.session.title}</Link> : 'no session: decided without a blind tasting'}</dd>
        </dl>
        {caution && call.status === 'standing' && <p className="caution mt-3">{caution}</p>}
      </LedgerRow>
      {call.withdrawn && (
        <LedgerRow question="Why was it taken back?"><p>{call.withdrawn.reason} <span className="soft">{call.withdrawn.on}, {call.withdrawn.by}</span></p></LedgerRow>
      )}
      {!call.withdrawn && mayCall && (
        <LedgerRow question="No longer right?" note="Nothing is deleted.">
          <div className="stack" style={{ maxWidth: 560 }}>
            <p><Link href={`${home}/calls/new?vessel=${call.vessel.id}`}>Record a newer call</Link> <span className="soft">and this one gives way to it.</span></p>
            <WithdrawForm cellar={access.cellar.slug} callId={call.id} />
          </div>
        </LedgerRow>
      )}
    </LedgerPage>
  );
}
