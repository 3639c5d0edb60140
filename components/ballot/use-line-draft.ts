'use client';

import { useMemo, useState } from 'react';
import { scoreKey } from '@/lib/offline/answers';
import { PendingScore, type Draft } from '@/lib/offline/pending-score';
import type { SheetStore } from '@/lib/offline/store';

/** Keys and fine steps come in bursts: the last of a burst is what is kept. */
const BURST_MS = 250;

/** What the touched line was before its last burst, for Undo. */
export interface Before {
  item: number;
  value: number | null;
}

/** The lines of one glass under the finger. `acts` are the same at every render, so that untouched lines are not drawn again. */
export function useLineDraft(store: SheetStore, block: number, position: number) {
  const [draft, setDraft] = useState<Draft | null>(null);
  const [touched, setTouched] = useState<number | null>(null);
  const [before, setBefore] = useState<Before | null>(null);
  const acts = useMemo(() => {
    const pending = new PendingScore(BURST_MS, ({ item, value }) => void store.record({ kind: 'score', block, position, item, value }), setDraft);
    // The store's own word, not the last drawing's: a tap may come before its predecessor is drawn.
    const kept = (item: number): number | null => {
      const op = store.getState().answers.get(scoreKey(block, position, item))?.op;
      return op?.kind === 'score' ? op.value : null;
    };
    const erase = (item: number) => void store.record({ kind: 'clear', block, position, item });
    return {
      set(item: number, value: number) {
        if (!pending.of(item)) setBefore({ item, value: kept(item) });
        setTouched(item);
        pending.set(item, value);
      },
      touch(item: number) {
        pending.settleOthers(item);
        setTouched(item);
      },
      clear(item: number) {
        setBefore({ item, value: pending.of(item)?.value ?? kept(item) });
        pending.drop(item);
        erase(item);
      },
      undo({ item, value }: Before) {
        setBefore(null);
        pending.drop(item);
        if (value === null) erase(item);
        else void store.record({ kind: 'score', block, position, item, value });
      },
      settle: () => pending.settle(),
    };
  }, [store, block, position]);
  return { draft, touched, before, acts };
}
