import { beforeAll, describe, expect, it } from 'vitest';
import { readResults } from '@/lib/results/loaders';
import type { LineView, ResultsView } from '@/lib/results/types';
import { closeSession, unsealSession } from '@/lib/sessions/lifecycle';
import { TREATMENTS, wineCase, wineScores } from '../../support/wine-bitterness';
import { makeScene, openTasting } from './scene';

/** Pairs of samples that share a letter. */
const sharing = (letters: readonly string[]) =>
  letters.flatMap((a, i) => letters.slice(i + 1).map((b, j) => `${i}-${i + 1 + j}:${[...a].some((letter) => b.includes(letter))}`));

let results: ResultsView;
let line: LineView;

beforeAll(() => {
  const scene = makeScene(TREATMENTS);
  const tasting = openTasting(scene, {
    method: 'profile', barrels: TREATMENTS, seats: 9, replicates: 2,
    lines: [{ name: 'Bitter', phase: 'palate' }, { name: 'Bitter class', phase: 'palate' }],
  });
  for (const { judge, product, replicate, response, rating } of wineScores()) {
    const place = { block: replicate, position: tasting.positionOf(judge, replicate, product) };
    tasting.say(judge, { kind: 'score', ...place, item: 1, value: response });
    tasting.say(judge, { kind: 'score', ...place, item: 2, value: rating });
  }
  for (let seat = 1; seat <= 9; seat += 1) tasting.submit(seat);
  closeSession(scene.as('leader'), tasting.sessionId, null);
  unsealSession(scene.as('leader'), tasting.sessionId);
  results = readResults(scene.as('winemaker'), tasting.sessionId);
  line = results.profile!.lines[0]!;
});

// Expected values: tests/reference/cases, computed in R 4.2.2 (aov with Error strata, ptukey by quadrature).
describe('the wine bitterness panel, from ballots to results', () => {
  const { expected } = wineCase('09_anova_balanced.json', (c) => c.inputs.response === 'response');

  it('tests the samples over the panelist × sample interaction', () => {
    expect(line.product!.F).toBeCloseTo(expected.anova.product.F, 8);
    expect(line.product!.p / expected.anova.product.p).toBeCloseTo(1, 8);
    expect([line.product!.df1, line.product!.df2]).toEqual([expected.anova.product.df, expected.anova.interaction.df]);
    expect(line.interaction!.F).toBeCloseTo(expected.anova.interaction.F, 8);
    expect(line.interaction!.p).toBeCloseTo(expected.anova.interaction.p, 8);
    expect(line.assessor!.F).toBeCloseTo(expected.anova.assessor.F_over_interaction, 8);
  });

  it('gives the means, the smallest difference and the letters', () => {
    line.cells.forEach((cell, i) => expect(cell.mean).toBeCloseTo(expected.posthoc.means[i], 10));
    expect(line.smallestDifference!).toBeCloseTo(expected.posthoc.HSD, 7);
    expect(sharing(line.cells.map((cell) => cell.letters))).toEqual(sharing(TREATMENTS.map((name) => expected.posthoc.letters_tukey[name])));
    expect(line.cells.every((cell) => cell.n === 18)).toBe(true);
  });

  it('draws bars that overlap exactly where no difference was shown', () => {
    line.cells.forEach((a, i) =>
      line.cells.slice(i + 1).forEach((b, j) => {
        const overlap = a.low! <= b.high! && b.low! <= a.high!;
        const pair = expected.posthoc.pairs.p_tukey[expected.posthoc.pairs.a.findIndex((name: string, k: number) => name === TREATMENTS[i] && expected.posthoc.pairs.b[k] === TREATMENTS[i + 1 + j])];
        expect(overlap).toBe(pair > 0.05);
      }),
    );
  });

  it('gives Kendall’s W of the ratings', () => {
    const ranks = wineCase('06_ranks.json').expected;
    const rating = results.profile!.lines[1]!;
    expect(rating.kendallW!).toBeCloseTo(ranks.chisq / (ranks.blocks * (ranks.treatments - 1)), 10);
  });

  it('says so in a sentence, and names the samples', () => {
    expect(results.verdict.headline).toContain('told the samples apart');
    expect(results.verdict.sentences.join(' ')).toContain('Barrel warm_yes stands above all the others in bitter');
    expect(JSON.stringify(results)).not.toMatch(/the same as|identical/);
  });

  it('counts nine panelists and 144 answers', () => {
    expect(results.counts).toMatchObject({ counted: 144, late: 0, unanswered: 0, seatsTaken: 9, seatsSubmitted: 9, seatsEmpty: [] });
    expect(results.profile!.panel.panelists.map((p) => p.seat)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9]);
  });
});
