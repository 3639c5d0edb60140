import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { calls, fills } from '@/db/schema';
import { verifyAuditChain } from '@/lib/audit/verify';
import { listCalls, listCallsOfVessel } from '@/lib/calls/data';
import { loadCallDraft } from '@/lib/calls/loaders';
import { createCall, withdrawCall } from '@/lib/calls/mutations';
import { createCallSchema } from '@/lib/calls/schema';
import { atMoment } from '@/lib/clock';
import { closeSession, unsealSession } from '@/lib/sessions/lifecycle';
import { addCellar, makeScene, openTasting, type Scene } from './scene';

const TODAY = new Date('2026-05-06T10:00:00Z');
let scene: Scene;
const fillOf = (barrel: string) => scene.barrels.get(barrel)!.fillId;
const bottle = (barrel: string, more = {}) => ({ cellar: 'pellow', fill: fillOf(barrel), kind: 'bottle' as const, reasons: 'Longest of the three.', ...more });
const make = (input: Parameters<typeof createCall>[1], role: 'owner' | 'winemaker' | 'leader' = 'winemaker') => atMoment(TODAY, () => createCall(scene.as(role), input));

beforeEach(() => {
  scene = makeScene(['12', '31', '47']);
});

function unsealed(): string {
  const tasting = openTasting(scene, { method: 'triangle', barrels: ['12', '31'], seats: 2, replicates: 1 }, 0);
  closeSession(scene.as('leader'), tasting.sessionId, null);
  unsealSession(scene.as('leader'), tasting.sessionId);
  return tasting.sessionId;
}

describe('recording a call', () => {
  it('keeps what, why, when and who, with the session as evidence', () => {
    const session = unsealed();
    make(bottle('31', { session, nextDay: '2026-05-20' }));
    expect(listCallsOfVessel(scene.as('cellar_hand'), scene.barrels.get('31')!.vesselId)).toMatchObject([
      { kind: 'bottle', reasons: 'Longest of the three.', nextDay: '2026-05-20', status: 'standing', decidedBy: 'The winemaker', decidedOn: '6 May 2026', session: { id: session } },
    ]);
    expect(verifyAuditChain(scene.db, scene.cellarId)).toMatchObject({ brokenAt: null });
  });

  it('is for the owner and the winemaker', () => {
    expect(() => make(bottle('31'), 'leader')).toThrow(expect.objectContaining({ code: 'forbidden' }));
    expect(make(bottle('31'), 'owner')).toBeTruthy();
  });

  it('refuses evidence that is not open or did not taste the fill', () => {
    const open = openTasting(scene, { method: 'triangle', barrels: ['12', '31'], seats: 2, replicates: 1 });
    expect(() => make(bottle('31', { session: open.sessionId }))).toThrow(expect.objectContaining({ code: 'wrong_state' }));
    expect(() => make(bottle('47', { session: unsealed() }))).toThrow(expect.objectContaining({ code: 'invalid' }));
  });

  it('refuses a past day, a fill that is gone and another cellar’s fill', () => {
    expect(() => make(bottle('31', { nextDay: '2026-05-05' }))).toThrow(expect.objectContaining({ code: 'invalid' }));
    scene.db.update(fills).set({ toDay: '2026-05-01' }).where(eq(fills.id, fillOf('12'))).run();
    expect(() => make(bottle('12'))).toThrow(expect.objectContaining({ code: 'invalid' }));
    const other = addCellar(scene.db, 'other', ['1']);
    expect(() => make({ ...bottle('31'), fill: other.barrels.get('1')!.fillId })).toThrow(expect.objectContaining({ code: 'not_found' }));
  });

  it('asks of a hold until when, and refuses days that do not exist', () => {
    const hold = { cellar: 'pellow', fill: fillOf('31'), kind: 'hold', reasons: 'Still dries.' };
    expect(createCallSchema.safeParse(hold).error!.issues[0]!.path).toEqual(['nextDay']);
    expect(createCallSchema.safeParse({ ...hold, nextDay: '2026-02-30' }).success).toBe(false);
    expect(createCallSchema.safeParse({ ...hold, nextDay: '2026-06-01' }).success).toBe(true);
    expect(createCallSchema.safeParse({ ...hold, kind: 'drink', nextDay: '2026-06-01' }).success).toBe(false);
    expect(createCallSchema.safeParse({ ...hold, reasons: 'x'.repeat(2001), nextDay: '2026-06-01' }).success).toBe(false);
  });
});

describe('what stands', () => {
  it('is the newest call of a fill; one taken back gives way to the one before', () => {
    const first = make(bottle('31'));
    const second = atMoment(new Date(TODAY.getTime() + 1000), () => createCall(scene.as('owner'), { ...bottle('31'), kind: 'rack' }));
    const statusOf = (id: string) => listCalls(scene.as('owner')).find((call) => call.id === id)!.status;
    expect([statusOf(first), statusOf(second)]).toEqual(['superseded', 'standing']);
    withdrawCall(scene.as('owner'), { cellar: 'pellow', call: second, reason: 'Wrong barrel.' });
    expect([statusOf(first), statusOf(second)]).toEqual(['standing', 'withdrawn']);
    expect(scene.db.select().from(calls).all()).toHaveLength(2);
    expect(() => withdrawCall(scene.as('owner'), { cellar: 'pellow', call: second, reason: 'Again.' })).toThrow(expect.objectContaining({ code: 'conflict' }));
  });

  it('can’t be taken back from another cellar', () => {
    const id = make(bottle('31'));
    const other = addCellar(scene.db, 'other', ['1']);
    expect(() => withdrawCall(other.as('owner'), { cellar: 'other', call: id, reason: 'Mine now.' })).toThrow(expect.objectContaining({ code: 'not_found' }));
  });

  it('is offered from results with that barrel chosen', () => {
    const session = unsealed();
    const draft = loadCallDraft(scene.as('winemaker'), { session, vessel: scene.barrels.get('31')!.vesselId });
    expect(draft.fillId).toBe(fillOf('31'));
    expect(draft.options.map((option) => option.label)).toEqual(['Barrel 12, 25-A', 'Barrel 31, 25-A']);
  });
});
