import type { Metadata } from 'next';
import Link from 'next/link';
import { VesselForm } from '@/components/register/vessel-form';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { orNotFound } from '@/lib/not-found';
import { VESSEL_WORDS } from '@/lib/register/format';
import { loadVesselForm } from '@/lib/register/loaders';

export const metadata: Metadata = { title: 'Change a vessel' };

export default async function EditVesselPage({ params }: PageProps<'/c/[cellar]/barrels/[vessel]/edit'>) {
  const { cellar, vessel: vesselId } = await params;
  const { vessel } = await orNotFound(loadVesselForm(cellar, vesselId));
  const { id, version, isArchived: _, ...values } = vessel;
  const defaults = Object.fromEntries(Object.entries(values).map(([name, value]) => [name, value ?? '']));
  return (
    <LedgerPage>
      <LedgerHead margin="Barrels" title={`${VESSEL_WORDS[vessel.kind]} ${vessel.name}`} actions={<Link className="btn btn-bare" href={`/c/${cellar}/barrels/${id}`}>Back without saving</Link>} />
      <LedgerRow question="What is it?"><VesselForm cellar={cellar} defaults={defaults} id={id} version={version} /></LedgerRow>
    </LedgerPage>
  );
}
