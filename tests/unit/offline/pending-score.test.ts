import fc from 'fast-check';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { PendingScore, type Draft } from '@/lib/offline/pending-score';

const BURST_MS = 250;

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

function start() {
  const kept: Draft[] = [];
  const seen: (Draft | null)[] = [];
  return { kept, seen, pending: new PendingScore(BURST_MS, (draft) => kept.push(draft), (draft) => seen.push(draft)) };
}

describe('a value under the finger', () => {
  it('is kept on every line, however soon the next line is tapped', () => {
    const { pending, kept } = start();
    pending.set(0, 20);
    pending.set(1, 40);
    pending.set(2, 60);
    vi.advanceTimersByTime(BURST_MS);
    expect(kept).toEqual([{ item: 0, value: 20 }, { item: 1, value: 40 }, { item: 2, value: 60 }]);
  });

  it('is kept once for a burst, at its last value', () => {
    const { pending, kept, seen } = start();
    for (const value of [50, 51, 52]) {
      pending.set(3, value);
      vi.advanceTimersByTime(BURST_MS - 1);
    }
    expect(kept).toEqual([]);
    vi.advanceTimersByTime(1);
    expect(kept).toEqual([{ item: 3, value: 52 }]);
    expect(seen.at(-1)).toBeNull();
  });

  it('is kept at once on the way to another part, and not again by the clock', () => {
    const { pending, kept } = start();
    pending.set(0, 7);
    pending.settle();
    pending.settle();
    vi.runAllTimers();
    expect(kept).toEqual([{ item: 0, value: 7 }]);
  });

  it('is forgotten when its own line is cleared, not when another is', () => {
    const { pending, kept } = start();
    pending.set(0, 7);
    pending.drop(0);
    pending.set(1, 8);
    pending.drop(0);
    vi.runAllTimers();
    expect(kept).toEqual([{ item: 1, value: 8 }]);
  });

  it('ends as the last value set on each line, for any order and speed of taps', () => {
    fc.assert(
      fc.property(fc.array(fc.tuple(fc.nat(4), fc.nat(100), fc.nat(400)), { maxLength: 40 }), (taps) => {
        const { pending, kept } = start();
        const last = new Map<number, number>();
        for (const [item, value, pauseMs] of taps) {
          pending.set(item, value);
          last.set(item, value);
          vi.advanceTimersByTime(pauseMs);
        }
        vi.runAllTimers();
        expect(new Map(kept.map((draft) => [draft.item, draft.value]))).toEqual(last);
      }),
      { seed: 1 },
    );
  });
});
