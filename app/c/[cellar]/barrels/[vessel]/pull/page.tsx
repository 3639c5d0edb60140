import type { Metadata } from 'next';
import Link from 'next/link';
import { PullForm } from '@/components/register/pull-form';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { orNotFound } from '@/lib/not-found';
import { VESSEL_WORDS } from '@/lib/register/format';
import { loadPullForm } from '@/lib/register/loaders';

export const metadata: Metadata = { title: 'Record a pull' };

export default async function PullPage({ params }: PageProps<'/c/[cellar]/barrels/[vessel]/pull'>) {
  const { cellar, vessel: vesselId } = await params;
  const { vessel, lot, at } = await orNotFound(loadPullForm(cellar, vesselId));
  const name = `${VESSEL_WORDS[vessel.kind].toLowerCase()} ${vessel.name}`;
  return (
    <LedgerPage>
      <LedgerHead margin="Pull" title={`Pull from ${name}`} actions={<Link className="btn btn-bare" href={`/c/${cellar}/barrels/${vesselId}`}>Back</Link>} />
      <LedgerRow question="Drawn clean?" note={lot ? `It holds ${lot}.` : 'It is empty now; a pull of an earlier day still fits.'}>
        <div style={{ maxWidth: 640 }}><PullForm cellar={cellar} vesselId={vesselId} vessel={name} at={at} /></div>
      </LedgerRow>
    </LedgerPage>
  );
}
