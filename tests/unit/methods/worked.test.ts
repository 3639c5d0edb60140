import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { Method } from '@/db/enums';
import { methodOf } from '@/lib/methods';
import type { ItemFact } from '@/lib/results/data';
import { countAnswers, type GlassFact, type OperationFact } from '@/lib/results/evidence';
import type { Found } from '@/lib/results/found';
import { itemFact, operationFact, seatFact } from '../../support/facts';

/*
 * Worked examples of tests/reference/cases/worked-examples.json (each names its source there), answered by the
 * methods' own analyses from glasses and answers, as a session's results are.
 */
interface Worked {
  id: string;
  inputs: Record<string, never>;
  verified: Record<string, never>;
}
const CASES = JSON.parse(readFileSync('tests/reference/cases/worked-examples.json', 'utf8')) as Worked[];
const worked = <Inputs, Verified>(id: string) => CASES.find((one) => one.id === id) as unknown as { inputs: Inputs; verified: Verified };

/** Analyses answers by `people`; `orders` say which sample stands where for each. */
function found(method: Method, orders: readonly (readonly number[])[], answers: readonly OperationFact[], items: readonly ItemFact[] = []): Found {
  const glasses = orders.flatMap((order, i) => order.map((sample, place): GlassFact => ({ seatId: `s${i + 1}`, block: 1, position: place + 1, code: String(100 + place), sample })));
  const samples = [...new Set(orders.flat())].sort((a, b) => a - b);
  return methodOf(method).analyse({ answers: countAnswers(answers), glasses, seats: orders.map((_, i) => seatFact(i + 1)), items, samples, replicates: 1, alpha: 0.05 });
}

const pick = (seat: number, position: number) => operationFact(`s${seat}`, 1, position, { kind: 'choice' });
const score = (seat: number, position: number, number: number) => operationFact(`s${seat}`, 1, position, { item: 1, number });
const range = (n: number) => Array.from({ length: n }, (_, i) => i + 1);

/** A forced choice: `correct` of `n` pick the glass at `right`, the others the one at `wrong`. */
function choice(method: Method, order: readonly number[], { n, correct }: { n: number; correct: number }, right: number, wrong: number) {
  const result = found(method, range(n).map(() => order), range(n).map((seat) => pick(seat, seat <= correct ? right : wrong)));
  if (result.kind !== 'choice') throw new Error(result.kind);
  return result.choice;
}

describe('worked examples through the methods’ own analyses', () => {
  it.each(['tri-bitter-1953', 'tri-malt', 'tri-24-13-ERRATUM'])('%s', (id) => {
    const { inputs, verified } = worked<{ n: number; correct: number }, { p?: number; p_exact?: number; min_correct?: number; min_correct_5pct?: number }>(id);
    const view = choice('triangle', [1, 2, 2], inputs, 1, 2);
    expect(view).toMatchObject({ n: inputs.n, correct: inputs.correct, isShown: true });
    expect(view.p).toBeCloseTo((verified.p ?? verified.p_exact)!, 5);
    const least = verified.min_correct ?? verified.min_correct_5pct;
    if (least !== undefined) expect(view.minimumCorrect).toBe(least);
  });

  it('duo-tissue', () => {
    const { inputs, verified } = worked<{ n: number; correct: number }, { p: number; min_correct: number }>('duo-tissue');
    const view = choice('duo_trio', [1, 2, 1], inputs, 3, 2);
    expect(view).toMatchObject({ correct: inputs.correct, isShown: false, minimumCorrect: verified.min_correct });
    expect(view.p).toBeCloseTo(verified.p, 5);
  });

  it('paired-bitter, two-sided', () => {
    const { inputs, verified } = worked<{ n: number; agreeing: number }, { p_two: number }>('paired-bitter');
    const result = found('directional_pair', range(inputs.n).map(() => [1, 2]), range(inputs.n).map((seat) => pick(seat, seat <= inputs.agreeing ? 1 : 2)), [itemFact(1, 'ask', 'Bitter')]);
    expect(result.kind === 'pair' && result.pair.p).toBeCloseTo(verified.p_two, 5);
    expect(result.kind === 'pair' && result.pair.isShown).toBe(true);
  });

  it('kendall-w, as three people’s orders of six', () => {
    const { inputs, verified } = worked<{ ranks: number[][] }, { W: number }>('kendall-w');
    const orders = inputs.ranks.map((ranks) => ranks.map((_, i) => i + 1));
    const answers = inputs.ranks.map((ranks, i) => operationFact(`s${i + 1}`, 1, null, { kind: 'order', text: range(6).map((rank) => ranks.indexOf(rank) + 1).join(',') }));
    const result = found('ranking', orders, answers, [itemFact(1, 'ask', 'Merit')]);
    expect(result.kind === 'order' && result.order.kendallW).toBeCloseTo(verified.W, 4);
    expect(result.kind === 'order' && result.order.cells.map((cell) => cell.rankSum)).toEqual(range(6).map((sample) => inputs.ranks.reduce((sum, ranks) => sum + ranks[sample - 1]!, 0)));
  });

  it('cochran-12x3, as ticks', () => {
    const { inputs, verified } = worked<{ data: number[][] }, { totals: number[]; p: number }>('cochran-12x3');
    const answers = inputs.data.flatMap((row, i) => row.map((value, j) => score(i + 1, j + 1, value)));
    const result = found('check_all', inputs.data.map(() => [1, 2, 3]), answers, [itemFact(1, 'check', 'Oak')]);
    if (result.kind !== 'ticks') throw new Error(result.kind);
    expect(result.ticks.lines[0]!.counts.map((cell) => cell.ticked)).toEqual(verified.totals);
    // Eight informative people times three samples is just enough for chi-square.
    expect(result.ticks.lines[0]!.isExact).toBe(false);
    expect(result.ticks.lines[0]!.p).toBeCloseTo(verified.p, 5);
  });

  it('anova-10x3, as a profile of one line', () => {
    const { inputs, verified } = worked<{ scores: number[][] }, { F_products: number; F_assessors: number; df: [number, number]; p: number }>('anova-10x3');
    const answers = inputs.scores.flatMap((row, i) => row.map((value, j) => score(i + 1, j + 1, value)));
    const result = found('profile', inputs.scores.map(() => [1, 2, 3]), answers, [itemFact(1, 'line', 'Sweet')]);
    if (result.kind !== 'profile') throw new Error(result.kind);
    const line = result.profile.lines[0]!;
    expect(line.product!.F).toBeCloseTo(verified.F_products, 3);
    expect([line.product!.df1, line.product!.df2]).toEqual(verified.df);
    expect(line.product!.p).toBeCloseTo(verified.p, 5);
    expect(line.assessor!.F).toBeCloseTo(verified.F_assessors, 3);
  });
});
