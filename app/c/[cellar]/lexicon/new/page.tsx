import type { Metadata } from 'next';
import { DescriptorForm } from '@/components/lexicon/descriptor-form';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { loadFamilies } from '@/lib/lexicon/loaders';

export const metadata: Metadata = { title: 'Add a descriptor' };

export default async function NewDescriptorPage({ params }: PageProps<'/c/[cellar]/lexicon/new'>) {
  const { cellar } = await params;
  const { families } = await loadFamilies(cellar);
  return (
    <LedgerPage>
      <LedgerHead margin="Lexicon" title="Add a descriptor" />
      <LedgerRow question="What is it?"><DescriptorForm cellar={cellar} families={families} defaults={{ sense: 'aroma', phase: 'nose', lowAnchor: 'none', highAnchor: 'very strong' }} /></LedgerRow>
    </LedgerPage>
  );
}
