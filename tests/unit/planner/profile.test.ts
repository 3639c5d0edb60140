import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { planProfile, poolScatter, profilePower, scatterOfLine, type ProfileQuestion } from '@/lib/planner/plan-profile';
import { tukeyComparisons } from '@/stats';

const ask = (more: Partial<ProfileQuestion> = {}): ProfileQuestion => ({
  scatter: { repeatability: 10, disagreement: 7 }, panelists: 10, samples: 4, replicates: 2, alpha: 0.05, rule: 'tukey', ...more,
});

// R 4.2.2: qtukey(.95, 4, 27) / sqrt(2) * sqrt(2 * 198 / 20); uniroot on pt(., 27, ncp) for 80 %; and the power at 10 points.
describe('the smallest difference of a profile', () => {
  it('by Tukey', () => {
    const plan = planProfile(ask());
    expect(plan).toMatchObject({ ms: 198, df: 27 });
    expect(plan.shown / 12.17693988384).toBeCloseTo(1, 8);
    expect(plan.found / 16.05733099238).toBeCloseTo(1, 4);
    expect(profilePower(ask(), 10)).toBeCloseTo(0.33203709103, 5);
  });

  // R: qt(.975, 2) * sqrt(2 * 64 / 3), and the same search with 2 degrees of freedom, where the tail is heaviest.
  it('by LSD, with hardly any degrees of freedom', () => {
    const q = ask({ scatter: { repeatability: 8, disagreement: 0 }, panelists: 3, samples: 2, replicates: 1, rule: 'lsd' });
    const plan = planProfile(q);
    expect(plan.shown / 28.104809942078).toBeCloseTo(1, 8);
    expect(plan.found / 36.92843724926).toBeCloseTo(1, 4);
    expect(profilePower(q, 20)).toBeCloseTo(0.398497474189, 4);
  });

  it('shrinks with more people, grows with more scatter, and Tukey asks for more than LSD', () => {
    fc.assert(fc.property(fc.integer({ min: 3, max: 30 }), fc.integer({ min: 2, max: 10 }), fc.integer({ min: 1, max: 4 }), fc.double({ min: 1, max: 30, noNaN: true }), (panelists, samples, replicates, repeatability) => {
      const q = ask({ panelists, samples, replicates, scatter: { repeatability, disagreement: 5 } });
      const plan = planProfile(q);
      expect(plan.found).toBeGreaterThan(plan.shown);
      expect(planProfile({ ...q, panelists: panelists + 1 }).shown).toBeLessThan(plan.shown);
      expect(planProfile({ ...q, scatter: { repeatability: repeatability + 1, disagreement: 5 } }).found).toBeGreaterThan(plan.found);
      expect(planProfile({ ...q, rule: 'lsd' }).shown).toBeLessThanOrEqual(plan.shown + 1e-9);
      expect(profilePower(q, plan.found)).toBeCloseTo(0.8, 6);
    }), { numRuns: 40 });
  });

  it('refuses a panel of one', () => {
    expect(() => planProfile(ask({ panelists: 1 }))).toThrow();
  });
});

describe('a past line', () => {
  it('gives its mean squares back from what the results say', () => {
    fc.assert(fc.property(fc.integer({ min: 3, max: 20 }), fc.integer({ min: 2, max: 9 }), fc.integer({ min: 2, max: 4 }), fc.double({ min: 1, max: 400, noNaN: true }), fc.double({ min: 1, max: 5, noNaN: true }), (panelists, samples, replicates, msError, interactionF) => {
      const ms = msError * interactionF;
      const means = Array.from({ length: samples }, (_, i) => i);
      const { criticalDifference } = tukeyComparisons({ means, n: panelists * replicates, ms, df: (panelists - 1) * (samples - 1), alpha: 0.05 });
      const scatter = scatterOfLine({ name: 'Grip', panelists, samples, replicates, alpha: 0.05, smallestDifference: criticalDifference!, interactionF });
      expect(scatter.repeatability ** 2 / msError).toBeCloseTo(1, 6);
      expect((scatter.repeatability ** 2 + replicates * scatter.disagreement ** 2) / ms).toBeCloseTo(1, 6);
      // The same panel, planned anew, comes to the same smallest difference.
      expect(planProfile({ scatter, panelists, samples, replicates, alpha: 0.05, rule: 'tukey' }).shown / criticalDifference!).toBeCloseTo(1, 6);
    }), { numRuns: 40 });
  });

  it('with one replicate is all disagreement', () => {
    expect(scatterOfLine({ name: 'Grip', panelists: 8, samples: 3, replicates: 1, alpha: 0.05, smallestDifference: 20, interactionF: null }).repeatability).toBe(0);
  });

  it('pools squares by degrees of freedom', () => {
    // By hand: (10 · 6² + 30 · 10²) / 40 = 84.
    const pooled = poolScatter([
      { name: 'Grip', df: 10, repeatability: 6, disagreement: 0 }, { name: 'Oak', df: 5, repeatability: 3, disagreement: 1 }, { name: 'Grip', df: 30, repeatability: 10, disagreement: 0 },
    ]);
    expect(pooled.map(({ name, sessions }) => [name, sessions])).toEqual([['Grip', 2], ['Oak', 1]]);
    expect(pooled[0]!.repeatability ** 2).toBeCloseTo(84, 10);
  });
});
