import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { DesignForm } from '@/components/sessions/design-form';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { orNotFound } from '@/lib/not-found';
import { loadDesign } from '@/lib/sessions/loaders';

export const metadata: Metadata = { title: 'Design of a session' };

export default async function DesignPage({ params }: PageProps<'/c/[cellar]/sessions/[session]/design'>) {
  const { cellar, session } = await params;
  const design = await orNotFound(loadDesign(cellar, session));
  const back = `/c/${cellar}/sessions/${session}`;
  if (!design) redirect(back);
  return (
    <LedgerPage>
      <LedgerHead margin="Session" title={design.title} actions={<Link className="btn btn-bare" href={back}>Back without saving</Link>} />
      <LedgerRow question="What is asked, and how?" note="A draft can be changed until it is sealed.">
        <DesignForm cellar={cellar} choices={design.choices} defaults={design.defaults} sessionId={design.sessionId} version={design.version} />
      </LedgerRow>
    </LedgerPage>
  );
}
