import 'fake-indexeddb/auto';
import { describe, expect, it } from 'vitest';
import { openPhoneDatabase } from '@/lib/offline/database';
import type { OutboxRow, PullRow } from '@/lib/offline/types';
import { countWaiting } from '@/lib/offline/waiting';

describe('what waits on a phone', () => {
  it('is nothing, and makes no database, where there is none', async () => {
    expect(await countWaiting('nothing-here')).toBe(0);
    expect((await indexedDB.databases()).map((database) => database.name)).not.toContain('nothing-here');
  });

  it('counts answers and pulls without a receipt, so that a new build waits for them', async () => {
    const database = openPhoneDatabase('waiting-test');
    const row = (opId: string, state: OutboxRow['state']) => ({ opId, sheetKey: 'k', state, op: {} }) as OutboxRow;
    await database.keep([row('a', 'waiting'), row('b', 'received'), row('c', 'refused')], null);
    expect(await countWaiting('waiting-test')).toBe(1);
    await database.keepPulls([{ opId: 'p', state: 'waiting' } as PullRow]);
    expect(await countWaiting('waiting-test')).toBe(2);
    await database.keep([row('a', 'received')], null);
    await database.keepPulls([{ opId: 'p', state: 'received' } as PullRow]);
    expect(await countWaiting('waiting-test')).toBe(0);
  });
});
