import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { operations, seats } from '@/db/schema';
import type { Operation, OperationBody } from '@/lib/ballots/schema';
import { takeDelivery } from '@/lib/ballots/mutations';
import { handoverKey } from '@/lib/handover/key';
import { packHandover } from '@/lib/handover/pack';
import { receiveHandover } from '@/lib/handover/receive';
import type { SeatAccess } from '@/lib/seats/access';
import { findSession } from '@/lib/sessions/find';
import { makeScene, type Scene } from '../blind/scene';

let scene: Scene;
beforeEach(async () => {
  scene = await makeScene([0, 1, 2], 3);
});

function seatOf(number: number, sessionId = scene.profileId): SeatAccess {
  const row = scene.db.select().from(seats).where(eq(seats.sessionId, sessionId)).all().find((seat) => seat.number === number)!;
  scene.db.update(seats).set({ claimedAt: new Date(), consentedAt: new Date(), seatRole: 'taste', tokenGeneration: 1 }).where(eq(seats.id, row.id)).run();
  return { seat: { ...row, claimedAt: new Date(), tokenGeneration: 1 }, session: findSession(scene.db, scene.cellarId, sessionId) };
}

const deviceId = randomUUID();
const op = (seq: number, value: number): Operation => ({ opId: randomUUID(), deviceId, seq, clientAt: 5, body: { kind: 'score', block: 1, position: 1, item: 1, value } satisfies OperationBody });
const rows = () => scene.db.select().from(operations).all();
const textOf = (from: SeatAccess, ops: Operation[]) => packHandover({ joinKey: from.session.joinKey!, ops }, handoverKey(from.seat));

describe('a sheet handed over by code', () => {
  it('counts like one that came over the network, and once if both come', async () => {
    const seat = seatOf(1);
    const ops = [op(1, 30), op(2, 60)];
    const text = await textOf(seat, ops);
    expect(receiveHandover(scene.access('ines'), scene.profileId, text)).toMatchObject({ seat: '1', received: 2, late: 0, refused: [] });
    receiveHandover(scene.access('ines'), scene.profileId, text);
    const over = takeDelivery(seat, { protocol: 1, joinKey: seat.session.joinKey!, at: null, onPhone: 0, ops });
    expect(over.receipts).toHaveLength(2);
    expect(rows()).toHaveLength(2);
    expect(rows().every((row) => row.seatId === seat.seat.id)).toBe(true);
  });

  it('can’t be read into another seat, nor added to, nor made without the phone', async () => {
    const seat = seatOf(1);
    const other = seatOf(2);
    const [kind, data, mark] = (await textOf(seat, [op(1, 30)])).split('.');
    const forged = Buffer.from(JSON.stringify({ joinKey: seat.session.joinKey, ops: [op(1, 99)] })).toString('base64url');
    for (const text of [`p.${forged}.${mark}`, `${kind}.${data}.${'0'.repeat(32)}`, await packHandover({ joinKey: seat.session.joinKey!, ops: [op(1, 1)] }, handoverKey({ ...other.seat, tokenGeneration: 2 }))]) {
      expect(() => receiveHandover(scene.access('ines'), scene.profileId, text)).toThrow(/no seat in this session/);
    }
    expect(rows()).toHaveLength(0);
  });

  it('of another session, or torn, is refused', async () => {
    const seat = seatOf(1, scene.triangleId);
    await expect(async () => receiveHandover(scene.access('ines'), scene.profileId, await textOf(seat, [op(1, 1)]))).rejects.toThrow(/no seat in this session/);
    expect(() => receiveHandover(scene.access('ines'), scene.profileId, `d.${Buffer.from('torn').toString('base64url')}.${'0'.repeat(32)}`)).toThrow(/fit together/);
  });
});
