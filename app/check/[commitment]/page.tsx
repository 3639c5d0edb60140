import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { CheckForm } from '@/components/check/check-form';
import { PhonePage } from '@/components/phone/phone-page';
import { Hash } from '@/components/ui/hash';
import { findCommitment } from '@/lib/blind/read-key';
import { phoneWords } from '@/lib/i18n/server';

export async function generateMetadata(): Promise<Metadata> {
  return { title: (await phoneWords('check')).t('check.title') };
}

export default async function CheckCommitmentPage({ params }: PageProps<'/check/[commitment]'>) {
  const { commitment } = await params;
  const found = findCommitment(commitment);
  if (!found) notFound();
  const { t, list } = await phoneWords('check');
  return (
    <PhonePage title={found.title} list={list}>
      <p>{t('check.sealed', { when: found.sealedAt.toISOString().slice(0, 16).replace('T', ' ') })}</p>
      <p className="hash"><Hash hex={commitment} /></p>
      {found.isPublished ? (
        <>
          <p><a className="btn btn-main" href={`/api/v1/commitments/${commitment}`} download>{t('check.get')}</a></p>
          <p className="soft">{t('check.prints')}</p>
          <CheckForm commitment={commitment} />
        </>
      ) : (
        <p>{t('check.later')}</p>
      )}
    </PhonePage>
  );
}
