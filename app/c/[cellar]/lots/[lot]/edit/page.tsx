import type { Metadata } from 'next';
import Link from 'next/link';
import { LotForm } from '@/components/register/lot-form';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { requireCapability } from '@/lib/auth/access';
import { orNotFound } from '@/lib/not-found';
import { loadLot } from '@/lib/register/loaders';

export const metadata: Metadata = { title: 'Change a lot' };

export default async function EditLotPage({ params }: PageProps<'/c/[cellar]/lots/[lot]/edit'>) {
  const { cellar, lot: lotId } = await params;
  const { access, lot } = await orNotFound(loadLot(cellar, lotId));
  requireCapability(access, 'register.edit');
  const { id, version, isArchived: _, vintage, ...values } = lot;
  return (
    <LedgerPage>
      <LedgerHead margin="Lots" title={`${lot.code}, ${lot.name}`} actions={<Link className="btn btn-bare" href={`/c/${cellar}/lots/${id}`}>Back without saving</Link>} />
      <LedgerRow question="What is it?"><LotForm cellar={cellar} defaults={{ ...values, vintage: vintage ?? '' }} id={id} version={version} /></LedgerRow>
    </LedgerPage>
  );
}
