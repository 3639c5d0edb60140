import type { Metadata } from 'next';
import { DesignForm } from '@/components/sessions/design-form';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { loadNewDesign } from '@/lib/sessions/loaders';

export const metadata: Metadata = { title: 'Plan a session' };

export default async function NewSessionPage({ params, searchParams }: PageProps<'/c/[cellar]/sessions/new'>) {
  const { cellar } = await params;
  const { choices, defaults } = await loadNewDesign(cellar, (await searchParams).method);
  return (
    <LedgerPage>
      <LedgerHead margin="Session" title="Plan a session" />
      <LedgerRow question="What is asked, and how?" note="A draft can be changed until it is sealed."><DesignForm cellar={cellar} choices={choices} defaults={defaults} /></LedgerRow>
    </LedgerPage>
  );
}
