import { and, eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { auditEvents, sessionPourers, sessions } from '@/db/schema';
import type { Method, Role } from '@/db/enums';
import { isPourer, readHalfKey, readKeyForPouring, type HalfKey } from '@/lib/blind/read-key';
import { takeOut } from '@/lib/blind/vault';
import { readResults } from '@/lib/results/loaders';
import { closeSession, openSession, sealSession, unsealSession } from '@/lib/sessions/lifecycle';
import { draftSchema } from '@/lib/sessions/schema';
import { addDraft, makeScene, type Scene } from '../results/scene';

const BARRELS = ['12', '31', '41', '47'];
const ROLES = ['owner', 'winemaker', 'leader', 'cellar_hand', 'panelist'] as const;
let scene: Scene;
beforeEach(() => {
  scene = makeScene(BARRELS);
});

/** A sealed session in two steps: the cellar hand has the letters, the panelist the codes. */
function twoStep(method: Method = 'profile', people: readonly [Role, 'letters' | 'codes'][] = [['cellar_hand', 'letters'], ['panelist', 'codes']]): string {
  const sessionId = addDraft(scene, { method, barrels: BARRELS.slice(0, method === 'triangle' ? 2 : 4), seats: 4, replicates: 1, ...(method === 'profile' && { lines: [{ name: 'Sour', phase: 'palate' }] }) });
  scene.db.update(sessions).set({ coding: 'two_step' }).where(eq(sessions.id, sessionId)).run();
  scene.db.delete(sessionPourers).where(eq(sessionPourers.sessionId, sessionId)).run();
  for (const [role, step] of people) scene.db.insert(sessionPourers).values({ cellarId: scene.cellarId, sessionId, userId: scene.as(role).user.id, step }).run();
  return sessionId;
}

const codeOf = (work: () => unknown): unknown => {
  try {
    return work() ?? 'nothing';
  } catch (error) {
    return (error as { code?: string }).code ?? String(error);
  }
};
const half = <Step extends HalfKey['step']>(role: Role, sessionId: string, step: Step) => {
  const key = readHalfKey(scene.as(role), sessionId);
  expect(key?.step).toBe(step);
  return key as Extract<HalfKey, { step: Step }>;
};

describe('two-step coding (DESIGN: the blind, 3)', () => {
  it('gives each of the two one half, and the two together are the key', () => {
    const sessionId = twoStep();
    sealSession(scene.as('leader'), sessionId);
    const letters = half('cellar_hand', sessionId, 'letters');
    const codes = half('panelist', sessionId, 'codes');
    // Barrels without codes; codes without barrels.
    const plan = takeOut(scene.db, scene.cellarId, sessionId);
    expect(letters.bottles.map((bottle) => bottle.label)).toEqual(BARRELS.map((name) => `Barrel ${name}`));
    for (const { code } of plan.servings) expect(JSON.stringify(letters.bottles)).not.toContain(code);
    expect(JSON.stringify([codes.bottles, codes.servings])).not.toMatch(/Barrel|sample|label/i);
    expect(letters.bottles.map((bottle) => bottle.letter).sort()).toEqual(['A', 'B', 'C', 'D']);
    const labelOf = new Map(letters.bottles.map(({ letter, label }) => [letter, label]));
    const letterOf = new Map(codes.bottles.map(({ code, letter }) => [code, letter]));
    for (const { code, sample } of plan.servings) expect(labelOf.get(letterOf.get(code)!)).toBe(plan.samples[sample - 1]!.label);
  });

  it('gives the whole key to nobody before unsealing, and halves to nobody else', () => {
    const sessionId = twoStep();
    sealSession(scene.as('leader'), sessionId);
    openSession(scene.as('leader'), sessionId);
    for (const role of ROLES) expect(codeOf(() => readKeyForPouring(scene.as(role), sessionId))).toBe('forbidden');
    for (const role of ['owner', 'winemaker', 'leader'] as const) expect(codeOf(() => readHalfKey(scene.as(role), sessionId))).toBe('nothing');
    // Neither is kept from a seat, as a reader of the whole key is.
    for (const role of ['cellar_hand', 'panelist'] as const) expect(isPourer(scene.db, sessionId, scene.as(role).user.id)).toBe(false);
    closeSession(scene.as('leader'), sessionId, 'enough');
    unsealSession(scene.as('leader'), sessionId);
    expect(readKeyForPouring(scene.as('owner'), sessionId).samples).toHaveLength(4);
    expect(readResults(scene.as('owner'), sessionId).report.find((item) => item.name === 'Two-step coding')!.text).toContain('The cellar_hand filled lettered bottles and saw no code; The panelist marked letters with codes');
  });

  it('logs each reading by its step', () => {
    const sessionId = twoStep();
    sealSession(scene.as('leader'), sessionId);
    half('cellar_hand', sessionId, 'letters');
    half('panelist', sessionId, 'codes');
    half('panelist', sessionId, 'codes');
    const logged = scene.db.select({ action: auditEvents.action }).from(auditEvents).where(and(eq(auditEvents.sessionId, sessionId))).all().map((row) => row.action);
    expect(logged.filter((action) => action.startsWith('key.'))).toEqual(['key.read_letters', 'key.read_codes', 'key.read_codes']);
  });

  it('draws the letters afresh: over many sessions a sample gets each letter about equally often', () => {
    const sessionsRun = 120;
    const counts = [0, 0, 0, 0];
    for (let i = 0; i < sessionsRun; i += 1) {
      const sessionId = twoStep();
      sealSession(scene.as('leader'), sessionId);
      counts['ABCD'.indexOf(takeOut(scene.db, scene.cellarId, sessionId).letters!.find((pair) => pair.sample === 1)!.letter)]! += 1;
    }
    // Binomial(120, 1/4): standard deviation 4.7; four of them on either side.
    for (const count of counts) expect(Math.abs(count - sessionsRun / 4)).toBeLessThan(19);
  });

  it('is refused before sealing, for sets of glasses, and with a person missing', () => {
    expect(codeOf(() => readHalfKey(scene.as('cellar_hand'), twoStep()))).toBe('wrong_state');
    expect(() => sealSession(scene.as('leader'), twoStep('triangle'))).toThrow(/can’t be coded in two steps/);
    expect(() => sealSession(scene.as('leader'), twoStep('profile', [['cellar_hand', 'letters']]))).toThrow(/Nobody is named to mark letters with codes/);
    expect(() => sealSession(scene.as('leader'), twoStep('profile', [['panelist', 'codes']]))).toThrow(/Nobody is named to fill the lettered bottles/);
  });

  it('takes two people: one for both steps is refused by the form', () => {
    const person = scene.as('panelist').user.id;
    const draft = { cellar: 'pellow', method: 'profile', title: 'T', instruction: 'I', privateQuestion: 'Q', leaderId: person, seatsPlanned: 4, reservesPlanned: 0, replicates: 1, alpha: 0.05, servingVolumeMl: 30, restS: 60, coding: 'two_step' };
    const same = draftSchema.safeParse({ ...draft, letteredBy: person, codedBy: person });
    expect(same.error?.issues[0]).toMatchObject({ path: ['codedBy'] });
    expect(draftSchema.safeParse({ ...draft, letteredBy: person, codedBy: scene.as('owner').user.id }).success).toBe(true);
  });
});
