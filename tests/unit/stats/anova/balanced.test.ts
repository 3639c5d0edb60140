import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { balancedScores, meanHalfWidth, mixedAssessorModel, oneWayAnova, profileAnova, StatsError, tQuantile, twoWayTypes } from '@/stats';

/** Table of whole scores laid out with the replicate fastest. */
const table = fc
  .record({ assessors: fc.integer({ min: 2, max: 5 }), products: fc.integer({ min: 3, max: 5 }), replicates: fc.integer({ min: 2, max: 3 }) })
  .chain((size) =>
    fc.array(fc.integer({ min: 0, max: 100 }), { minLength: size.assessors * size.products * size.replicates, maxLength: size.assessors * size.products * size.replicates }).map((scores) => ({ ...size, scores })),
  );

const long = ({ assessors, products, replicates, scores }: { assessors: number; products: number; replicates: number; scores: number[] }) => ({
  assessor: scores.map((_, at) => Math.floor(at / (products * replicates)) % assessors),
  product: scores.map((_, at) => Math.floor(at / replicates) % products),
  score: scores,
});

describe('the balanced analysis', () => {
  it('splits the total', () => {
    fc.assert(
      fc.property(table, (t) => {
        const a = profileAnova(t);
        expect(a.assessor.ss + a.product.ss + a.interaction.ss + a.error!.ss).toBeCloseTo(a.total.ss, 6);
        expect(a.assessor.df + a.product.df + a.interaction.df + a.error!.df).toBe(a.total.df);
      }),
      { seed: 1 },
    );
  });

  it('has the same sums of squares as all three types, which agree on complete data', () => {
    fc.assert(
      fc.property(table, (t) => {
        const a = profileAnova(t);
        const types = twoWayTypes(long(t));
        for (const split of [types.typeI!, types.typeII!, types.typeIII!]) {
          expect(split.assessor.ss).toBeCloseTo(a.assessor.ss, 5);
          expect(split.product.ss).toBeCloseTo(a.product.ss, 5);
          expect(split.interaction.ss).toBeCloseTo(a.interaction.ss, 5);
          expect(split.residual.ss).toBeCloseTo(a.error!.ss, 5);
        }
      }),
      { seed: 2 },
    );
  });

  it('gives scaling and disagreement that make up the interaction, and slopes of mean 1', () => {
    fc.assert(
      fc.property(table, (t) => {
        const a = profileAnova(t);
        fc.pre(a.product.ss > 1);
        const model = mixedAssessorModel(t);
        expect(model.scaling.ss + model.disagreement.ss).toBeCloseTo(a.interaction.ss, 5);
        expect(model.slopes.reduce((x, y) => x + y, 0) / t.assessors).toBeCloseTo(1, 8);
      }),
      { seed: 3 },
    );
  });

  it('ignores an assessor’s own level', () => {
    fc.assert(
      fc.property(table, fc.integer({ min: -50, max: 50 }), (t, shift) => {
        const perAssessor = t.products * t.replicates;
        const moved = { ...t, scores: t.scores.map((y, at) => (at < perAssessor ? y + shift : y)) };
        expect(profileAnova(moved).product.ss).toBeCloseTo(profileAnova(t).product.ss, 5);
        expect(profileAnova(moved).interaction.ss).toBeCloseTo(profileAnova(t).interaction.ss, 5);
      }),
      { seed: 4 },
    );
  });

  it.each([
    ['a gap', () => balancedScores({ assessor: [0, 0, 1], product: [0, 1, 0], score: [1, 2, 3] })],
    ['NaN', () => profileAnova({ scores: [1, NaN, 3, 4], assessors: 2, products: 2, replicates: 1 })],
    ['too few scores', () => profileAnova({ scores: [1, 2, 3], assessors: 2, products: 2, replicates: 1 })],
    ['one product', () => profileAnova({ scores: [1, 2], assessors: 2, products: 1, replicates: 1 })],
    ['two products for scaling', () => mixedAssessorModel({ scores: [1, 2, 3, 5], assessors: 2, products: 2, replicates: 1 })],
    ['products that never differ', () => mixedAssessorModel({ scores: [1, 1, 1, 2, 2, 2], assessors: 2, products: 3, replicates: 1 })],
  ])('refuses %s', (_, work) => expect(work).toThrow(StatsError));
});

describe('one-way analysis', () => {
  it('is t² for two groups', () => {
    // R 4.2: t.test(c(5, 7, 6, 9), c(8, 10, 11), var.equal = TRUE): t = -2.3313, df = 5, p = 0.06711
    const { between, within } = oneWayAnova([0, 0, 0, 0, 1, 1, 1], [5, 7, 6, 9, 8, 10, 11]);
    expect(Math.sqrt(between.f!)).toBeCloseTo(2.3313, 3);
    expect(within.df).toBe(5);
    expect(between.p).toBeCloseTo(0.06711, 5);
  });
});

describe('limits of a mean', () => {
  it('are t √(ms / n) wide', () => expect(meanHalfWidth({ ms: 16, df: 12, n: 4, level: 0.95 })).toBeCloseTo(2 * tQuantile(0.975, 12), 12));
  it.each([
    ['a negative mean square', { ms: -1, df: 3, n: 4, level: 0.95 }],
    ['no degrees of freedom', { ms: 1, df: 0, n: 4, level: 0.95 }],
    ['a level of 1', { ms: 1, df: 3, n: 4, level: 1 }],
  ])('refuse %s', (_, question) => expect(() => meanHalfWidth(question)).toThrow(StatsError));
});
