'use client';

import { useEffect, useState, useSyncExternalStore } from 'react';
import type { Sheet } from '@/lib/ballots/types';
import { openPhoneDatabase } from '@/lib/offline/database';
import { deliverByFetch } from '@/lib/offline/deliver';
import { localMirror } from '@/lib/offline/mirror';
import { startPump } from '@/lib/offline/pump';
import { SheetStore, type SheetState } from '@/lib/offline/store';

/** The sheet's store, running for as long as the page is open. */
export function useSheet(sheet: Sheet): { store: SheetStore; state: SheetState } {
  const [store] = useState(() => new SheetStore({ sheet, database: openPhoneDatabase(), mirror: localMirror(), deliver: deliverByFetch }));
  const state = useSyncExternalStore(store.subscribe, store.getState, store.getState);
  useEffect(() => {
    let stop = () => {};
    let isGone = false;
    void store.load().then(() => {
      if (!isGone) stop = startPump(store);
    });
    return () => {
      isGone = true;
      stop();
    };
  }, [store]);
  return { store, state };
}
