import type { Metadata } from 'next';
import Link from 'next/link';
import { EmptyForm, FillForm } from '@/components/register/fill-forms';
import { Empty } from '@/components/ui/empty';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { orNotFound } from '@/lib/not-found';
import { VESSEL_WORDS } from '@/lib/register/format';
import { loadFillForm } from '@/lib/register/loaders';

export const metadata: Metadata = { title: 'Fill a vessel' };

export default async function FillPage({ params }: PageProps<'/c/[cellar]/barrels/[vessel]/fill'>) {
  const { cellar, vessel: vesselId } = await params;
  const { vessel, present, lots, today } = await orNotFound(loadFillForm(cellar, vesselId));
  return (
    <LedgerPage>
      <LedgerHead margin="Barrels" title={`Fill ${VESSEL_WORDS[vessel.kind].toLowerCase()} ${vessel.name}`} actions={<Link className="btn btn-bare" href={`/c/${cellar}/barrels/${vesselId}`}>Back</Link>} />
      {present && (
        <LedgerRow question="What is in it?">
          <p className="mid">{present.lot}, {present.lotName}, since {present.from}.</p>
          <p className="note">A new fill ends this one on its day. Or empty it:</p>
          <EmptyForm cellar={cellar} vesselId={vesselId} fill={present} today={today} />
        </LedgerRow>
      )}
      <LedgerRow question="What goes in?">
        {lots.length > 0 ? <FillForm cellar={cellar} vesselId={vesselId} lots={lots} today={today} /> : <Empty action={<Link className="btn" href={`/c/${cellar}/lots/new`}>Add a lot</Link>}>No lot yet. A fill joins a vessel and a lot.</Empty>}
      </LedgerRow>
    </LedgerPage>
  );
}
