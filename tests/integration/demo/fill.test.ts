import { readFileSync, statSync } from 'node:fs';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Db } from '@/db/client';
import { operations, pulls, seals, servingSamples, sessions, vessels } from '@/db/schema';
import { verifyAuditChain } from '@/lib/audit/verify';
import { fillDemo } from '@/lib/demo/fill';
import { testDb } from '../../support/db';

let db: Db;
beforeAll(async () => {
  db = testDb();
  expect(await fillDemo()).toBe(true);
});

describe('the demo cellar', () => {
  it('has 84 barrels, months of pulls, two finished sessions, one open and one draft', () => {
    expect(db.select().from(vessels).all()).toHaveLength(84);
    const days = db.select({ at: pulls.pulledAt }).from(pulls).all().map((row) => row.at.getTime());
    expect((Math.max(...days) - Math.min(...days)) / 86_400_000).toBeGreaterThan(150);
    const states = db.select({ state: sessions.state }).from(sessions).all().map((row) => row.state).sort();
    expect(states).toEqual(['draft', 'open', 'unsealed', 'unsealed']);
    expect(db.select().from(operations).all().length).toBeGreaterThan(700);
  });

  it('writes the key of finished sessions only', () => {
    const finished = db.select().from(sessions).all().filter((row) => row.state === 'unsealed').map((row) => row.id);
    expect(db.select().from(seals).all()).toHaveLength(3);
    expect(db.select().from(servingSamples).all()).toHaveLength(10 * 6 * 2 + 14 * 3);
    expect(finished).toHaveLength(2);
  });

  it('keeps an unbroken audit chain', () => {
    const cellarId = db.select().from(vessels).get()!.cellarId;
    expect(verifyAuditChain(db, cellarId)).toMatchObject({ brokenAt: null });
  });

  it('keeps its passwords in a file that only the owner reads, and fills nothing twice', async () => {
    const file = process.env.TERCET_DEMO_FILE!;
    expect(statSync(file).mode & 0o777).toBe(0o600);
    const { signIns, joinPath, joinCode } = JSON.parse(readFileSync(file, 'utf8'));
    expect(signIns).toHaveLength(4);
    expect(new Set(signIns.map((s: { password: string }) => s.password)).size).toBe(4);
    expect(joinPath).toMatch(/^\/j\/[a-z2-7]{16}$/);
    expect(joinCode).toMatch(/^\d{6}$/);
    expect(await fillDemo()).toBe(false);
    expect(db.select().from(vessels).all()).toHaveLength(84);
  });
});
