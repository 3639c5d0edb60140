import type { Metadata } from 'next';
import { LotForm } from '@/components/register/lot-form';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { loadAccess } from '@/lib/auth/access';

export const metadata: Metadata = { title: 'Add a lot' };

export default async function NewLotPage({ params }: PageProps<'/c/[cellar]/lots/new'>) {
  const { cellar } = await params;
  const access = await loadAccess(cellar, 'register.edit');
  return (
    <LedgerPage>
      <LedgerHead margin="Lots" title="Add a lot" />
      <LedgerRow question="What is it?"><LotForm cellar={cellar} defaults={{ drink: access.cellar.drink }} /></LedgerRow>
    </LedgerPage>
  );
}
