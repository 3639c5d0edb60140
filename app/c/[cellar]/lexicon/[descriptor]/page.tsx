import type { Metadata } from 'next';
import Link from 'next/link';
import { DescriptorForm } from '@/components/lexicon/descriptor-form';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { loadDescriptor, loadFamilies } from '@/lib/lexicon/loaders';
import { orNotFound } from '@/lib/not-found';

export const metadata: Metadata = { title: 'Change a descriptor' };

export default async function DescriptorPage({ params }: PageProps<'/c/[cellar]/lexicon/[descriptor]'>) {
  const { cellar, descriptor } = await params;
  const { entry } = await orNotFound(loadDescriptor(cellar, descriptor));
  const { families } = await loadFamilies(cellar);
  const { id, version, isArchived: _, ...values } = entry;
  return (
    <LedgerPage>
      <LedgerHead margin="Lexicon" title={entry.name} actions={<Link className="btn btn-bare" href={`/c/${cellar}/lexicon`}>Back without saving</Link>} />
      <LedgerRow question="What is meant?" note="Sealed sessions keep the words that they were sealed with."><DescriptorForm cellar={cellar} families={families} defaults={values} id={id} version={version} /></LedgerRow>
    </LedgerPage>
  );
}
