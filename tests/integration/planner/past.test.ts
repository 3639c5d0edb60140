import { beforeAll, describe, expect, it } from 'vitest';
import { readPlannerFacts } from '@/lib/planner/loaders';
import { closeSession, unsealSession } from '@/lib/sessions/lifecycle';
import { TREATMENTS, wineCase, wineScores } from '../../support/wine-bitterness';
import { addCellar, makeScene, openTasting, type Scene } from '../results/scene';

let scene: Scene;
let other: Scene;

/** The wine bitterness panel, tasted and closed, its key still shut. */
function tasteAndClose(): string {
  const tasting = openTasting(scene, { method: 'profile', barrels: TREATMENTS, seats: 9, replicates: 2, lines: [{ name: 'Bitter', phase: 'palate' }] });
  for (const { judge, product, replicate, response } of wineScores()) {
    tasting.say(judge, { kind: 'score', block: replicate, position: tasting.positionOf(judge, replicate, product), item: 1, value: response });
  }
  for (let seat = 1; seat <= 9; seat += 1) tasting.submit(seat);
  closeSession(scene.as('leader'), tasting.sessionId, null);
  return tasting.sessionId;
}

beforeAll(() => {
  scene = makeScene(TREATMENTS);
  other = addCellar(scene.db, 'other', ['1']);
});

describe('what the planner knows of the panel', () => {
  it('is nothing before a profile is unsealed, and then its own mean squares', () => {
    expect(readPlannerFacts(scene.as('owner'))).toEqual({ members: 5, ballots: 0, panel: 5, past: { lines: [], sessions: 0, leftOut: 0 } });
    const sessionId = tasteAndClose();
    expect(readPlannerFacts(scene.as('leader')).past).toEqual({ lines: [], sessions: 0, leftOut: 0 });
    unsealSession(scene.as('leader'), sessionId);

    const { past, panel, ballots } = readPlannerFacts(scene.as('leader'));
    expect([panel, ballots, past!.sessions]).toEqual([9, 9, 1]);
    // tests/reference/cases/09, R's aov with Error strata: mean squares of the error and of the interaction.
    const { error, interaction } = wineCase('09_anova_balanced.json', (c) => c.inputs.response === 'response').expected.anova;
    const line = past!.lines[0]!;
    expect(line).toMatchObject({ name: 'Bitter (palate)', sessions: 1 });
    expect(line.repeatability ** 2 / error.MS).toBeCloseTo(1, 6);
    expect(line.disagreement ** 2).toBeCloseTo(Math.max(0, (interaction.MS - error.MS) / 2), 4);
  });

  it('never comes from another cellar, nor to those who design nothing', () => {
    expect(readPlannerFacts(other.as('winemaker'))).toMatchObject({ ballots: 0, past: { lines: [], sessions: 0, leftOut: 0 } });
    for (const role of ['cellar_hand', 'panelist'] as const) expect(() => readPlannerFacts(scene.as(role))).toThrow(expect.objectContaining({ code: 'forbidden' }));
  });
});
