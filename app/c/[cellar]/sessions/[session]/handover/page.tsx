import type { Metadata } from 'next';
import Link from 'next/link';
import { HandoverScan } from '@/components/handover/handover-scan';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { loadHandover } from '@/lib/handover/loaders';

export const metadata: Metadata = { title: 'Scan a sheet' };

export default async function HandoverPage({ params }: PageProps<'/c/[cellar]/sessions/[session]/handover'>) {
  const { cellar, session } = await params;
  const found = await loadHandover(cellar, session);
  return (
    <LedgerPage>
      <LedgerHead margin="Session" title="Scan a sheet" actions={<Link href={`/c/${cellar}/sessions/${found.id}`}>{found.title}</Link>} />
      <LedgerRow question="A phone without signal?" note="The sheet’s “Hand over by code” shows codes that take turns.">
        <HandoverScan url={`/api/v1/c/${cellar}/sessions/${found.id}/handover`} />
      </LedgerRow>
      <LedgerRow question="What happens">
        <p>The answers come in under the ids that they have on the phone, so what arrives later over the network counts once. They carry the seat’s own mark: nobody can hand over for another seat. Here only their number is shown.</p>
      </LedgerRow>
    </LedgerPage>
  );
}
