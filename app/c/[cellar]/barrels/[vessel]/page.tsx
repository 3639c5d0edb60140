import type { Metadata } from 'next';
import Link from 'next/link';
import { CallsTable } from '@/components/calls/calls-table';
import { ArchiveForm } from '@/components/register/fill-forms';
import { VesselFacts } from '@/components/register/vessel-facts';
import { FillTable, PullTable } from '@/components/register/vessel-history';
import { Empty } from '@/components/ui/empty';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { allows } from '@/lib/auth/permissions';
import { listCallsOfVessel } from '@/lib/calls/data';
import { orNotFound } from '@/lib/not-found';
import { VESSEL_WORDS } from '@/lib/register/format';
import { loadVessel } from '@/lib/register/loaders';

export const metadata: Metadata = { title: 'Barrel' };

export default async function BarrelPage({ params }: PageProps<'/c/[cellar]/barrels/[vessel]'>) {
  const { cellar, vessel: vesselId } = await params;
  const { access, vessel, history, present, pulls, sessions } = await orNotFound(loadVessel(cellar, vesselId));
  const base = `/c/${cellar}/barrels/${vesselId}`;
  const mayEdit = allows(access.roles, 'register.edit');
  const mayPull = allows(access.roles, 'pull.record');
  const calls = listCallsOfVessel(access, vesselId);
  return (
    <LedgerPage>
      <LedgerHead
        margin={vessel.isArchived ? 'Archived' : 'Barrel'}
        title={`${VESSEL_WORDS[vessel.kind]} ${vessel.name}`}
        actions={
          <>
            {mayEdit && <ArchiveForm cellar={cellar} kind="vessel" id={vesselId} isArchived={vessel.isArchived} />}
            {mayEdit && <Link className="btn" href={`${base}/edit`}>Change</Link>}
            {mayEdit && <Link className="btn" href={`${base}/fill`}>{present ? 'Empty or refill' : 'Fill'}</Link>}
            {mayPull && <Link className="btn btn-main" href={`${base}/pull`}>Record a pull</Link>}
          </>
        }
      />
      <LedgerRow question="What is it?"><VesselFacts vessel={vessel} present={present} /></LedgerRow>
      <LedgerRow question="What was decided?">
        {calls.length > 0 ? <CallsTable cellar={cellar} calls={calls} /> : <Empty>No call yet.</Empty>}
        {allows(access.roles, 'call.make') && present && <p className="note"><Link href={`/c/${cellar}/calls/new?vessel=${vesselId}`}>Record a call</Link></p>}
      </LedgerRow>
      <LedgerRow question="What did it hold?">{history.length > 0 ? <FillTable cellar={cellar} fills={history} /> : <Empty>Nothing yet.</Empty>}</LedgerRow>
      <LedgerRow question="When was it tasted?" note="Sessions stand here once their key is open.">
        {sessions.length > 0 ? (
          <ul className="stack tight">{sessions.map((session) => <li key={session.id}><Link href={`/c/${cellar}/sessions/${session.id}/results`}>{session.question}</Link> <span className="soft">{session.title}, unsealed {session.on}</span></li>)}</ul>
        ) : <Empty>In no unsealed session yet.</Empty>}
      </LedgerRow>
      <LedgerRow question="What was drawn?" id="pulls">{pulls.length > 0 ? <PullTable cellar={cellar} pulls={pulls} mayEdit={mayPull} /> : <Empty>No pull yet.</Empty>}</LedgerRow>
    </LedgerPage>
  );
}
