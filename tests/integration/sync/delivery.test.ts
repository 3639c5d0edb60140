import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { operations, seats } from '@/db/schema';
import { loadSheet } from '@/lib/ballots/loaders';
import { takeDelivery } from '@/lib/ballots/mutations';
import type { OperationBody } from '@/lib/ballots/schema';
import type { SeatAccess } from '@/lib/seats/access';
import { findSession } from '@/lib/sessions/find';
import { closeSession, seatsThatOwe } from '@/lib/sessions/lifecycle';
import { makeScene, type Scene } from '../blind/scene';

let scene: Scene;
let seq = 0;
beforeEach(async () => {
  scene = await makeScene([0, 1, 2], 3);
  seq = 0;
});

function seatOf(sessionId: string, number: number): SeatAccess {
  scene.db.update(seats).set({ claimedAt: new Date(), consentedAt: new Date(), seatRole: 'taste', tokenGeneration: 1 }).where(eq(seats.id, scene.db.select().from(seats).where(eq(seats.sessionId, sessionId)).all().find((seat) => seat.number === number)!.id)).run();
  const seat = scene.db.select().from(seats).where(eq(seats.sessionId, sessionId)).all().find((row) => row.number === number)!;
  return { seat, session: findSession(scene.db, scene.cellarId, sessionId) };
}

const deviceId = randomUUID();
const op = (body: OperationBody, at = (seq += 1)) => ({ opId: randomUUID(), deviceId, seq: at, clientAt: 5, body });
const deliver = (to: SeatAccess, ops: ReturnType<typeof op>[]) => takeDelivery(to, { protocol: 1, joinKey: to.session.joinKey!, at: null, onPhone: 0, ops });
const score = (value: number, position = 1, item = 1) => ({ kind: 'score' as const, block: 1, position, item, value });
const rows = () => scene.db.select().from(operations).all();

describe('a delivery', () => {
  it('twice has one effect and one receipt, whatever the order', () => {
    const seat = seatOf(scene.profileId, 1);
    const ops = [op(score(10)), op(score(20, 2)), op(score(30, 1, 2))];
    const first = deliver(seat, ops);
    const again = deliver(seat, [...ops].reverse());
    expect(again.receipts.map((r) => r.receiptNo).sort()).toEqual(first.receipts.map((r) => r.receiptNo).sort());
    expect(rows()).toHaveLength(3);
  });

  it('with the same id and another content is refused, and the first content stays', () => {
    const seat = seatOf(scene.profileId, 1);
    const first = op(score(10));
    deliver(seat, [first]);
    for (const changed of [{ ...first, body: score(11) }, { ...first, seq: 99 }, { ...first, clientAt: 6 }]) {
      expect(deliver(seat, [changed])).toMatchObject({ receipts: [], refused: [{ opId: first.opId, code: 'body_changed' }] });
    }
    expect(rows().map((row) => row.valueNumber)).toEqual([10]);
  });

  it('of another seat’s operation tells nothing of it', () => {
    const first = op(score(10));
    deliver(seatOf(scene.profileId, 1), [first]);
    expect(deliver(seatOf(scene.profileId, 2), [first])).toMatchObject({ receipts: [], refused: [{ code: 'body_changed' }] });
    expect(rows()).toHaveLength(1);
  });

  it('takes what is sound and refuses the rest one by one', () => {
    const seat = seatOf(scene.profileId, 1);
    const answer = deliver(seat, [op(score(1, 4)), op(score(1, 1, 3)), op({ kind: 'fault', block: 1, position: 1, item: 1, isNoted: true }), op({ kind: 'choice', block: 1, position: 1, isGuess: false }), op(score(50))]);
    expect(answer.refused.map((refusal) => refusal.code)).toEqual(['no_such_glass', 'no_such_line', 'no_such_line', 'not_this_method']);
    expect(answer.receipts).toHaveLength(1);
  });

  it('of an older answer that arrives late changes nothing: the phone’s own count decides', () => {
    const seat = seatOf(scene.profileId, 1);
    deliver(seat, [op(score(80), 2)]);
    deliver(seat, [op(score(20), 1)]);
    expect(loadSheet(seat, 'en').answers.scores).toEqual([{ block: 1, position: 1, item: 1, value: 80 }]);
    deliver(seat, [op({ kind: 'clear', block: 1, position: 1, item: 1 }, 3)]);
    expect(loadSheet(seat, 'en').answers.scores).toEqual([]);
    expect(rows()).toHaveLength(3);
  });

  it('of a second choice in a triangle is refused: a locked set stays (ISO 4120, 7.5)', () => {
    const seat = seatOf(scene.triangleId, 1);
    deliver(seat, [op({ kind: 'choice', block: 1, position: 2, isGuess: true })]);
    expect(deliver(seat, [op({ kind: 'choice', block: 1, position: 3, isGuess: false })]).refused).toMatchObject([{ code: 'set_locked' }]);
    expect(loadSheet(seat, 'en').answers.choices).toEqual([{ block: 1, position: 2, isGuess: true }]);
  });

  it('after close is kept, said to be late, and never counted', () => {
    const seat = seatOf(scene.profileId, 1);
    deliver(seat, [op(score(40)), op({ kind: 'submit' })]);
    closeSession(scene.access('odo'), scene.profileId, null);
    const answer = deliver(seat, [op(score(99))]);
    expect(answer).toMatchObject({ state: 'closed', receipts: [{ admission: 'late' }], refused: [] });
    expect(loadSheet(seat, 'en').answers.scores).toMatchObject([{ value: 40 }]);
    expect(rows().filter((row) => row.admission === 'late')).toHaveLength(1);
  });

  it('of a phone whose seat was given to another is refused, and writes nothing', () => {
    const seat = seatOf(scene.profileId, 1);
    scene.db.update(seats).set({ tokenGeneration: 2 }).where(eq(seats.id, seat.seat.id)).run();
    expect(() => deliver(seat, [op(score(40))])).toThrow(expect.objectContaining({ code: 'unauthenticated' }));
    expect(rows()).toHaveLength(0);
  });

  it('of the new phone wins over the old one’s higher count', () => {
    const old = seatOf(scene.profileId, 1);
    deliver(old, [op(score(10), 500)]);
    scene.db.update(seats).set({ tokenGeneration: 2 }).where(eq(seats.id, old.seat.id)).run();
    const fresh = { ...old, seat: { ...old.seat, tokenGeneration: 2 } };
    deliver(fresh, [op(score(70), 1)]);
    expect(loadSheet(fresh, 'en').answers.scores).toMatchObject([{ value: 70 }]);
  });

  it('of somebody who had left brings the seat back among those that owe', () => {
    const seat = seatOf(scene.profileId, 1);
    scene.db.update(seats).set({ leftAt: new Date() }).where(eq(seats.id, seat.seat.id)).run();
    const left = { ...seat, seat: { ...seat.seat, leftAt: new Date() } };
    deliver(left, []);
    expect(seatsThatOwe(scene.db, scene.profileId)).toEqual([]);
    deliver(left, [op(score(10))]);
    expect(seatsThatOwe(scene.db, scene.profileId)).toEqual([1]);
  });
});
