'use client';

import { useEffect, useState, useSyncExternalStore } from 'react';
import { openPhoneDatabase } from '@/lib/offline/database';
import { PullStore, type PullState } from '@/lib/offline/pull-store';
import type { PhonePull, PullsAnswer } from '@/lib/pulls/schema';

const EVERY_MS = 20_000;
const TIMEOUT_MS = 15_000;

async function deliver(cellar: string, pulls: readonly PhonePull[]): Promise<{ status: number; body: PullsAnswer | null }> {
  const response = await fetch(`/api/v1/c/${cellar}/pulls`, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ protocol: 1, pulls }),
    signal: AbortSignal.timeout(TIMEOUT_MS),
    cache: 'no-store',
  });
  return { status: response.status, body: response.ok ? ((await response.json()) as PullsAnswer) : null };
}

/** The pull sheet's store, sending at the start, on coming back, on `online` and on a timer. */
export function usePulls(cellar: string, userId: string): { store: PullStore; state: PullState } {
  const [store] = useState(() => new PullStore({ cellar, userId, database: openPhoneDatabase(), deliver: (pulls) => deliver(cellar, pulls) }));
  const state = useSyncExternalStore(store.subscribe, store.getState, store.getState);
  useEffect(() => {
    const send = () => void store.flush();
    void store.load().then(send);
    const timer = setInterval(send, EVERY_MS);
    addEventListener('online', send);
    addEventListener('pageshow', send);
    document.addEventListener('visibilitychange', send);
    return () => {
      clearInterval(timer);
      removeEventListener('online', send);
      removeEventListener('pageshow', send);
      document.removeEventListener('visibilitychange', send);
    };
  }, [store]);
  return { store, state };
}
