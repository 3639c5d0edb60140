import type { Metadata } from 'next';
import Link from 'next/link';
import { HalfSheet } from '@/components/pour/half-sheet';
import { PourSheet } from '@/components/pour/pour-sheet';
import { PrintButton } from '@/components/pour/print-button';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { orNotFound } from '@/lib/not-found';
import { loadPourSheet } from '@/lib/pour/loaders';

export const metadata: Metadata = { title: 'Pour sheet' };

export default async function PourPage({ params }: PageProps<'/c/[cellar]/sessions/[session]/pour'>) {
  const { cellar, session } = await params;
  const { sheet, half, refusal, title } = await orNotFound(loadPourSheet(cellar, session));
  const back = `/c/${cellar}/sessions/${session}`;
  if (!sheet && !half) {
    return (
      <LedgerPage>
        <LedgerHead margin="Pour sheet" title="You are not a pourer here." />
        <LedgerRow question="Why not?"><p>{refusal} This try is in the audit log.</p><p><Link href={back}>Back to {title}</Link></p></LedgerRow>
      </LedgerPage>
    );
  }
  return (
    <main id="main">
      <div className="no-print toolbar" style={{ paddingTop: 'var(--s-4)' }}>
        <PrintButton />
        <Link className="btn" href={back}>Back</Link>
        <p className="note">A4 or Letter. Big digits; scissors along the dashed line.</p>
      </div>
      {half ? <HalfSheet sheet={half} /> : <PourSheet sheet={sheet!} />}
    </main>
  );
}
