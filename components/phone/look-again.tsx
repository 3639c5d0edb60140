'use client';

import { useRouter } from 'next/navigation';
import { useEffect } from 'react';

/** Asks the server again every few seconds, until the page behind it changes. */
export function LookAgain({ seconds }: { seconds: number }) {
  const router = useRouter();
  useEffect(() => {
    const timer = setInterval(() => router.refresh(), seconds * 1000);
    return () => clearInterval(timer);
  }, [router, seconds]);
  return <p className="hint" role="status">This page looks again every {seconds} seconds.</p>;
}
