import { beforeEach, describe, expect, it } from 'vitest';
import { loadResults, readResults } from '@/lib/results/loaders';
import { abandonSession, closeSession, unsealSession } from '@/lib/sessions/lifecycle';
import { addCellar, addDraft, makeScene, openTasting, type Design, type Scene } from './scene';

const DESIGN: Design = { method: 'profile', barrels: ['12', '31'], seats: 2, replicates: 1, lines: [{ name: 'Length', phase: 'after' }] };
let scene: Scene;

beforeEach(() => {
  scene = makeScene(['12', '31']);
});

describe('results before their time', () => {
  it('are refused in every state before unsealing, to every role', () => {
    const draft = addDraft(scene, DESIGN);
    const open = openTasting(scene, DESIGN);
    open.say(1, { kind: 'score', block: 1, position: 1, item: 1, value: 77 });
    const closed = openTasting(scene, DESIGN);
    closeSession(scene.as('leader'), closed.sessionId, 'enough');
    for (const id of [draft, open.sessionId, closed.sessionId]) {
      for (const role of ['owner', 'winemaker', 'leader', 'cellar_hand', 'panelist'] as const) {
        expect(() => readResults(scene.as(role), id)).toThrow(expect.objectContaining({ code: 'wrong_state' }));
      }
    }
    const page = loadResults(scene.as('owner'), open.sessionId);
    expect(page.results).toBeNull();
    expect(Object.keys(page.notYet!).sort()).toEqual(['id', 'missing', 'state', 'title']);
    const { id: _, ...said } = page.notYet!;
    expect(JSON.stringify(said)).not.toMatch(/77|Barrel|12|31|Length|bitter/);
  });

  it('never come of a session that was given up while sealed', () => {
    const tasting = openTasting(scene, DESIGN);
    abandonSession(scene.as('leader'), tasting.sessionId, 'the power failed');
    expect(() => readResults(scene.as('owner'), tasting.sessionId)).toThrow(expect.objectContaining({ code: 'wrong_state' }));
  });

  it('of another cellar are not found', () => {
    const tasting = openTasting(scene, DESIGN);
    closeSession(scene.as('leader'), tasting.sessionId, 'enough');
    unsealSession(scene.as('leader'), tasting.sessionId);
    const other = addCellar(scene.db, 'other', ['1']);
    expect(() => readResults(other.as('owner'), tasting.sessionId)).toThrow(expect.objectContaining({ code: 'not_found' }));
    expect(() => readResults(other.as('owner'), 'no-such-session')).toThrow(expect.objectContaining({ code: 'not_found' }));
  });

  it('show the private question to the cellar, and the neutral title to those who only taste', () => {
    const tasting = openTasting(scene, DESIGN);
    closeSession(scene.as('leader'), tasting.sessionId, 'enough');
    unsealSession(scene.as('leader'), tasting.sessionId);
    expect(readResults(scene.as('winemaker'), tasting.sessionId).session.question).toBe('Which barrel is the most bitter?');
    expect(JSON.stringify(readResults(scene.as('panelist'), tasting.sessionId))).not.toContain('most bitter');
  });
});
