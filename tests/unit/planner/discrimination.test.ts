import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { planDiscrimination, type DiscriminationQuestion } from '@/lib/planner/plan-discrimination';
import { PLANNED_PROTOCOLS } from '@/lib/planner/types';

const ask = (more: Partial<DiscriminationQuestion> = {}): DiscriminationQuestion => ({
  protocol: 'triangle', aim: 'difference', alpha: 0.05, beta: 0.2, size: { by: 'pd', value: 0.3 }, twoSided: false, replicates: 1, panel: 12, ...more,
});
const first = (more: Partial<DiscriminationQuestion>) => planDiscrimination(ask(more)).smallest!.answers;

interface Rows { alpha: number[]; beta: number[]; pd: number[]; n_first: number[]; n_stable: number[] }
const cases = JSON.parse(readFileSync('tests/reference/cases/02_discrimination_tables.json', 'utf8')) as { case: string; inputs: Record<string, unknown>; expected: Record<string, unknown> }[];
const rowsOf = (name: string) => cases.find((c) => c.case === name)!.expected.rows as Rows;

describe('the smallest panel', () => {
  it.each([
    ['triangle', 'sample size for exact power, p0 = 1/3', false],
    ['duo_trio', 'sample size for exact power, p0 = 1/2', false],
    ['two_afc', 'sample size for exact power, p0 = 1/2 two-tailed', true],
    ['two_out_of_five', 'sample size for exact power, p0 = 1/10', false],
  ] as const)('of %s is that of R’s exact binomial (reference 02)', (protocol, name, twoSided) => {
    const { alpha, beta, pd, n_first: expected, n_stable: steady } = rowsOf(name);
    let compared = 0;
    expected.forEach((n, i) => {
      const { smallest } = planDiscrimination(ask({ protocol, alpha: alpha[i]!, beta: beta[i]!, size: { by: 'pd', value: pd[i]! }, twoSided }));
      expect(smallest!.answers, `${alpha[i]} ${beta[i]} ${pd[i]}`).toBe(n);
      expect(smallest!.steadyFrom).toBe(steady[i]);
      compared += 1;
    });
    expect(compared).toBeGreaterThan(40);
  });

  // ISO 4120 table A.3 (worked-examples.json, tri-n-66, recalled) and the trade's table of exact sizes.
  it.each([[0.05, 66], [0.1, 53], [0.2, 40]])('of a triangle at α .05, β %f and pd .30 is %i', (beta, n) => {
    expect(first({ beta })).toBe(n);
  });

  // worked-examples.json, dprime-n; Ennis & Jesionka (2011) for the ratio of tetrad and triangle.
  it.each([['triangle', 202], ['duo_trio', 228], ['tetrad', 61], ['two_afc', 23]] as const)('of %s at d′ 1 and 80 %% is %i', (protocol, n) => {
    expect(first({ protocol, size: { by: 'dPrime', value: 1 } })).toBe(n);
  });

  it('of a similarity test is that of the difference test with the same risks, from either side', () => {
    fc.assert(
      fc.property(fc.constantFrom(...PLANNED_PROTOCOLS), fc.constantFrom(0.05, 0.1, 0.2), fc.constantFrom(0.05, 0.1, 0.2), fc.constantFrom(0.3, 0.4, 0.5), (protocol, alpha, beta, pd) => {
        const q = ask({ protocol, aim: 'similarity', alpha, beta, size: { by: 'pd', value: pd } });
        const n = planDiscrimination(q).smallest!.answers;
        // Walked by the similarity test's own maximum, which the planner's smallest panel never looks at.
        const chanceAt = (panel: number) => planDiscrimination({ ...q, panel }).atHand.power;
        expect(chanceAt(n)).toBeGreaterThanOrEqual(1 - alpha - 1e-12);
        for (let panel = Math.max(1, n - 4); panel < n; panel += 1) expect(chanceAt(panel)).toBeLessThan(1 - alpha);
      }),
      { numRuns: 60 },
    );
  });

  it('is null when more than a million answers would be needed, not an endless wait', () => {
    expect(planDiscrimination(ask({ size: { by: 'dPrime', value: 0.01 } })).smallest).toBeNull();
  });
});

describe('the panel at hand', () => {
  it('gives the fewest correct that show a difference: 8 of 12 in a triangle (ISO 4120, table A.1)', () => {
    expect(planDiscrimination(ask()).atHand.critical).toBe(8);
    expect(planDiscrimination(ask({ panel: 2 })).atHand).toMatchObject({ critical: null, power: 0 });
  });

  // worked-examples.json, similarity-max: exact lower tail at β .05 and pd .30.
  it.each([[30, 11], [60, 25], [66, 28], [90, 39]])('of %i gives the most correct that still show similarity: %i', (panel, most) => {
    expect(planDiscrimination(ask({ aim: 'similarity', beta: 0.05, panel })).atHand.critical).toBe(most);
  });

  it('counts sets for a difference, with both bounds, and never for similarity', () => {
    const twice = planDiscrimination(ask({ replicates: 2 }));
    expect(twice.atHand.answers).toBe(24);
    expect(twice.atHand.power).toBeGreaterThan(twice.atHand.powerIfRepeatsSayNothing);
    expect(twice.people).toEqual({ hopeful: 20, safe: 40 });
    expect(twice.notes.join(' ')).toContain('not independent');
    const alike = planDiscrimination(ask({ aim: 'similarity', replicates: 2 }));
    expect(alike.atHand.answers).toBe(12);
    expect(alike.people!.hopeful).toBe(alike.people!.safe);
    expect(alike.notes.join(' ')).toContain('one answer for each person');
  });
});

describe('the curve', () => {
  it('rises in its envelope, stays a probability and passes the goal within its reach', () => {
    fc.assert(
      fc.property(fc.constantFrom(...PLANNED_PROTOCOLS), fc.constantFrom('difference' as const, 'similarity' as const), fc.double({ min: 0.15, max: 0.8, noNaN: true }), fc.integer({ min: 1, max: 200 }), (protocol, aim, pd, panel) => {
        const { curve, goal, smallest } = planDiscrimination(ask({ protocol, aim, panel, size: { by: 'pd', value: pd } }));
        expect(curve.length).toBeLessThanOrEqual(300);
        let top = 0;
        const tops = curve.map(({ power }) => (top = Math.max(top, power)));
        for (const { power } of curve) expect(power >= 0 && power <= 1 + 1e-12).toBe(true);
        // Saw-teeth fall, but never back to where the curve was a third earlier.
        curve.forEach(({ power, n }, i) => { if (n > 60) expect(power).toBeGreaterThanOrEqual(tops[Math.floor(i / 3)]! - 0.1); });
        if (smallest && smallest.answers < 2000) expect(top).toBeGreaterThanOrEqual(goal - 0.02);
      }),
      { numRuns: 80 },
    );
  });
});
