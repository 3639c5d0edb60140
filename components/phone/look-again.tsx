'use client';

import { useRouter } from 'next/navigation';
import { useEffect } from 'react';
import { useWords } from '@/components/i18n/words';

/** Asks the server again every few seconds, until the page behind it changes. */
export function LookAgain({ seconds }: { seconds: number }) {
  const t = useWords();
  const router = useRouter();
  useEffect(() => {
    const timer = setInterval(() => router.refresh(), seconds * 1000);
    return () => clearInterval(timer);
  }, [router, seconds]);
  return <p className="hint" role="status">{t('join.again', { n: seconds })}</p>;
}
