import { beforeAll, describe, expect, it } from 'vitest';
import type { Db } from '@/db/client';
import { verifyAuditChain } from '@/lib/audit/verify';
import { fillDemo } from '@/lib/demo/fill';
import { testDb } from '../../support/db';

let db: Db;
beforeAll(async () => {
  db = testDb();
  await fillDemo();
  // The demo may be removed as a whole; a real cellar's evidence may not.
  db.$client.exec('UPDATE cellars SET is_demo = 0');
});

describe('evidence is append-only, also for somebody with the database in hand', () => {
  it.each(['operations', 'seals', 'serving_samples', 'audit_events', 'servings'])('%s', (table) => {
    const before = db.$client.prepare(`SELECT count(*) FROM ${table}`).pluck().get();
    expect(before).toBeGreaterThan(0);
    expect(() => db.$client.exec(`UPDATE ${table} SET cellar_id = cellar_id`)).toThrow(/append-only/);
    expect(() => db.$client.exec(`DELETE FROM ${table}`)).toThrow(/append-only/);
    expect(db.$client.prepare(`SELECT count(*) FROM ${table}`).pluck().get()).toBe(before);
  });

  it('takes no counted answer into a session that is not open', () => {
    const copy = (state: string) => db.$client.prepare(`
      INSERT INTO operations (op_id, cellar_id, session_id, seat_id, token_generation, device_id, seq, kind, body_hash, client_at, received_at, admission)
      SELECT lower(hex(randomblob(16))), o.cellar_id, o.session_id, o.seat_id, 1, 'd', 9999, 'submit', 'h', 0, 0, 'counted'
      FROM operations o JOIN sessions s ON s.id = o.session_id WHERE s.state = ? LIMIT 1`).run(state);
    expect(() => copy('unsealed')).toThrow(/while the session is open/);
    expect(copy('open').changes).toBe(1);
  });

  it('writes no key and moves no state out of order', () => {
    expect(() => db.$client.exec("INSERT INTO serving_samples SELECT v.id, v.cellar_id, (SELECT id FROM samples WHERE session_id = v.session_id LIMIT 1) FROM servings v JOIN sessions s ON s.id = v.session_id WHERE s.state = 'open' LIMIT 1")).toThrow(/only after unsealing/);
    for (const [from, to] of [['open', 'unsealed'], ['open', 'sealed'], ['unsealed', 'open'], ['draft', 'open']]) {
      expect(() => db.$client.prepare("UPDATE sessions SET state = ? WHERE state = ?").run(to, from)).toThrow(/a session goes/);
    }
    expect(() => db.$client.exec("UPDATE ballot_items SET name = 'x' WHERE session_id IN (SELECT id FROM sessions WHERE state = 'open')")).toThrow(/fixed by sealing/);
  });

  it('shows a changed entry of the audit log where the chain breaks', () => {
    const { cellarId } = db.$client.prepare('SELECT cellar_id AS cellarId FROM audit_events LIMIT 1').get() as { cellarId: string };
    const whole = verifyAuditChain(db, cellarId);
    expect(whole.brokenAt).toBeNull();
    expect(whole.entries).toBeGreaterThan(8);
    // Somebody with the file in hand can drop the trigger; the chain still tells.
    db.$client.exec("DROP TRIGGER audit_events_no_update; UPDATE audit_events SET action = 'session.opened ' WHERE seq = 5");
    expect(verifyAuditChain(db, cellarId).brokenAt).toBe(5);
  });
});
