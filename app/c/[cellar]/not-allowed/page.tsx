import Link from 'next/link';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';

export default async function NotAllowedPage({ params }: PageProps<'/c/[cellar]/not-allowed'>) {
  const { cellar } = await params;
  return (
    <LedgerPage>
      <LedgerHead margin="Roles" title="Your roles do not open that page." />
      <LedgerRow question="What now?">
        <p>An owner of the cellar can give you a further role. <Link href={`/c/${cellar}`}>Back to today.</Link></p>
      </LedgerRow>
    </LedgerPage>
  );
}
