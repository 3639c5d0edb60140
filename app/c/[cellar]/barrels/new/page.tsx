import type { Metadata } from 'next';
import { VesselForm } from '@/components/register/vessel-form';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { loadAccess } from '@/lib/auth/access';

export const metadata: Metadata = { title: 'Add a vessel' };

export default async function NewVesselPage({ params }: PageProps<'/c/[cellar]/barrels/new'>) {
  const { cellar } = await params;
  await loadAccess(cellar, 'register.edit');
  return (
    <LedgerPage>
      <LedgerHead margin="Barrels" title="Add a vessel" />
      <LedgerRow question="What is it?"><VesselForm cellar={cellar} defaults={{ kind: 'barrel', volumeL: 225 }} /></LedgerRow>
    </LedgerPage>
  );
}
