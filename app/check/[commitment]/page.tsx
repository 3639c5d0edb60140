import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { CheckForm } from '@/components/check/check-form';
import { Door } from '@/components/ui/door';
import { Hash } from '@/components/ui/hash';
import { findCommitment } from '@/lib/blind/read-key';

export const metadata: Metadata = { title: 'Check a plan' };

export default async function CheckCommitmentPage({ params }: PageProps<'/check/[commitment]'>) {
  const { commitment } = await params;
  const found = findCommitment(commitment);
  if (!found) notFound();
  return (
    <Door title={found.title}>
      <p>Sealed {found.sealedAt.toISOString().slice(0, 16).replace('T', ' ')} UTC under</p>
      <p className="hash"><Hash hex={commitment} /></p>
      {found.isPublished ? (
        <>
          <p><a className="btn btn-main" href={`/api/v1/commitments/${commitment}`} download>Get the plan file</a></p>
          <p className="soft"><code>sha256sum</code> of it prints the number above. Or check here:</p>
          <CheckForm commitment={commitment} />
        </>
      ) : (
        <p>The plan file is published when the key is opened, after the session is closed. Come back then and hold it against this number.</p>
      )}
    </Door>
  );
}
