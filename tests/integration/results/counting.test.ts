import { beforeEach, describe, expect, it } from 'vitest';
import { readResults } from '@/lib/results/loaders';
import { closeSession, unsealSession } from '@/lib/sessions/lifecycle';
import { makeScene, numbersIn, openTasting, type Scene, type Tasting } from './scene';

let scene: Scene;
const BARRELS = ['12', '31', '47'];

function profile(seats: number, replicates: number, taken = seats): Tasting {
  return openTasting(scene, {
    method: 'profile', barrels: BARRELS, seats, replicates,
    lines: [{ name: 'Length', phase: 'after' }, { name: 'Vinegar', phase: 'nose', kind: 'flag' }],
  }, taken);
}

/** Scores every glass: 20 points for each step of the sample's number, plus a little for each seat and block. */
function scoreAll(tasting: Tasting, seat: number, replicates: number, value = (sample: number, block: number) => 20 * sample + ((seat * 7 + block * 3 + sample * seat) % 5)): void {
  for (let block = 1; block <= replicates; block += 1) {
    for (let sample = 1; sample <= BARRELS.length; sample += 1) {
      tasting.say(seat, { kind: 'score', block, position: tasting.positionOf(seat, block, sample), item: 1, value: value(sample, block) });
    }
  }
}

function finish(tasting: Tasting) {
  closeSession(scene.as('leader'), tasting.sessionId, 'the hour was over');
  unsealSession(scene.as('leader'), tasting.sessionId);
  return readResults(scene.as('winemaker'), tasting.sessionId);
}

const noFalseNumbers = (value: unknown) => expect(numbersIn(value).filter((n) => !Number.isFinite(n.value))).toEqual([]);

beforeEach(() => {
  scene = makeScene(BARRELS);
});

describe('what counts', () => {
  it('takes the latest value by generation and count, whatever came in first', () => {
    const tasting = profile(3, 1);
    for (const seat of [1, 2, 3]) scoreAll(tasting, seat, 1);
    const place = { block: 1, position: tasting.positionOf(1, 1, 1), item: 1 };
    tasting.say(1, { kind: 'score', ...place, value: 3 }, { seq: 90, generation: 2 });
    tasting.say(1, { kind: 'score', ...place, value: 99 }, { seq: 500, generation: 1 });
    tasting.say(1, { kind: 'score', ...place, value: 98 }, { seq: 80, generation: 2 });
    const results = finish(tasting);
    const others = [2, 3].map((seat) => 20 + ((seat * 7 + 3 + seat) % 5));
    expect(results.profile!.lines[0]!.cells[0]!.mean).toBeCloseTo((3 + others[0]! + others[1]!) / 3, 12);
    expect(results.counts.replaced).toBe(3);
  });

  it('sets late answers aside and counts them', () => {
    const tasting = profile(3, 1);
    for (const seat of [1, 2, 3]) scoreAll(tasting, seat, 1);
    const place = { block: 1, position: tasting.positionOf(2, 1, 3), item: 1 };
    const before = 20 * 3 + ((2 * 7 + 3 + 3 * 2) % 5);
    tasting.say(2, { kind: 'score', ...place, value: 0 }, { seq: 900, isLate: true });
    const results = finish(tasting);
    const cell = results.profile!.lines[0]!.cells[2]!;
    const others = [1, 3].map((seat) => 60 + ((seat * 7 + 3 + 3 * seat) % 5));
    expect(cell.mean).toBeCloseTo((before + others[0]! + others[1]!) / 3, 12);
    expect(results.counts.late).toBe(1);
    expect(results.seats.find((seat) => seat.number === 2)!.late).toBe(1);
    expect(results.warnings.join(' ')).toContain('never counted');
  });

  it('keeps a panelist with a gap in the line, by the mixed model, and says who', () => {
    const tasting = profile(4, 2);
    for (const seat of [1, 2, 3, 4]) scoreAll(tasting, seat, 2);
    tasting.say(3, { kind: 'clear', block: 2, position: tasting.positionOf(3, 2, 2), item: 1 });
    const results = finish(tasting);
    const line = results.profile!.lines[0]!;
    expect(line).toMatchObject({ assessors: 4, gaps: [3], leftOut: [], method: 'mixed' });
    expect(line.cells.map((cell) => cell.n)).toEqual([8, 7, 8]);
    expect(results.counts).toMatchObject({ cleared: 1, unanswered: 1 });
    expect(results.warnings.join(' ')).toContain('seat 3');
  });

  it('names seats that answered nothing and seats that nobody took', () => {
    const tasting = profile(5, 1, 4);
    for (const seat of [1, 2, 3]) scoreAll(tasting, seat, 1);
    const results = finish(tasting);
    expect(results.counts).toMatchObject({ seatsSilent: [4], seatsEmpty: [5], seatsTaken: 4 });
    const panel = results.report.find((item) => item.name === 'Panel')!.text;
    expect(panel).toContain('nobody came to 5');
    expect(panel).toContain('4 answered nothing');
    expect(results.report.find((item) => item.name === 'Closed early')!.text).toBe('the hour was over');
  });

  it('counts faults noted out of the glasses answered, and keeps comments by sample', () => {
    const tasting = profile(3, 1);
    for (const seat of [1, 2, 3]) scoreAll(tasting, seat, 1);
    const at = (seat: number, sample: number) => ({ block: 1, position: tasting.positionOf(seat, 1, sample) });
    tasting.say(1, { kind: 'fault', ...at(1, 2), item: 2, isNoted: true });
    tasting.say(2, { kind: 'fault', ...at(2, 2), item: 2, isNoted: true });
    tasting.say(2, { kind: 'fault', ...at(2, 2), item: 2, isNoted: false });
    tasting.say(3, { kind: 'comment', ...at(3, 2), text: '  nail varnish ' });
    const { said } = finish(tasting);
    expect(said.faults).toEqual([{ name: 'Vinegar', counts: [{ sample: 1, noted: 0, of: 3 }, { sample: 2, noted: 1, of: 3 }, { sample: 3, noted: 0, of: 3 }] }]);
    expect(said.comments).toMatchObject([{ sample: 2, seat: 3, text: 'nail varnish' }]);
  });
});

describe('what can’t be computed says why', () => {
  it('one panelist', () => {
    const tasting = profile(2, 2, 1);
    scoreAll(tasting, 1, 2);
    const results = finish(tasting);
    expect(results.profile!.lines[0]).toMatchObject({ method: 'none', product: null, smallestDifference: null });
    expect(results.profile!.lines[0]!.whyNot).toContain('Only one panelist');
    expect(results.profile!.lines[0]!.cells).toHaveLength(3);
    expect(results.verdict.headline).toBe('Nothing could be tested.');
    noFalseNumbers(results);
  });

  it('nobody', () => {
    const results = finish(profile(3, 1, 0));
    expect(results.profile!.lines[0]!.whyNot).toBe('Nobody scored this line.');
    noFalseNumbers(results);
  });

  it('all scores equal', () => {
    const tasting = profile(4, 2);
    for (const seat of [1, 2, 3, 4]) scoreAll(tasting, seat, 2, () => 50);
    const results = finish(tasting);
    expect(results.profile!.lines[0]!.whyNot).toContain('scored all glasses alike');
    noFalseNumbers(results);
  });

  it('panelists in perfect accord', () => {
    const tasting = profile(4, 2);
    for (const seat of [1, 2, 3, 4]) scoreAll(tasting, seat, 2, (sample) => 10 * sample);
    const results = finish(tasting);
    expect(results.profile!.lines[0]!.whyNot).toContain('no error');
    noFalseNumbers(results);
  });

  it('one replicate: no interaction test, no repeatability, and it is said', () => {
    const tasting = profile(6, 1);
    for (const seat of [1, 2, 3, 4, 5, 6]) scoreAll(tasting, seat, 1);
    const results = finish(tasting);
    expect(results.profile!.lines[0]).toMatchObject({ method: 'anova', interaction: null });
    expect(results.profile!.panel.panelists.every((p) => p.repeatability === null && p.discriminated === null)).toBe(true);
    expect(results.warnings.join(' ')).toContain('One replicate');
    noFalseNumbers(results);
  });
});
