import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { describe, expect, it } from 'vitest';
import type { Method } from '@/db/enums';
import { methodOf } from '@/lib/methods';
import { countAnswers, type GlassFact, type OperationFact } from '@/lib/results/evidence';
import type { Found, MethodQuestion } from '@/lib/results/found';
import type { ItemFact } from '@/lib/results/data';
import { CHANCE, power, proportionCorrect } from '@/stats';
import { itemFact as item, operationFact as op, seatFact } from '../../support/facts';
import { normalDraw, pickBy, seeded } from '../../support/tasters';

/*
 * Sessions by simulated people, planned and analysed by the method's own code: how often a difference is shown when
 * there is none (never more than alpha allows), and when there is one of known size (as often as computed).
 */
const SESSIONS = 1_000;
const ALPHA = 0.05;

/** One session: what `answer` says for each block of each seat, felt as sample mean plus error, through plan and analysis. */
function session(method: Method, means: readonly number[], people: number, random: () => number, items: readonly ItemFact[], answer: (felt: readonly number[], glasses: readonly GlassFact[]) => OperationFact[], alpha = ALPHA): Found {
  const description = methodOf(method);
  const seats = Array.from({ length: people }, (_, i) => seatFact(i + 1));
  const plan = description.plan({ sampleCount: means.length, seatCount: people, replicates: 1 }, (n) => Math.floor(random() * n));
  const glasses = plan.map((s): GlassFact => ({ seatId: `s${s.seat}`, block: s.block, position: s.position, code: s.code, sample: s.sample }));
  const operations = seats.flatMap((seat) => {
    const own = glasses.filter((glass) => glass.seatId === seat.id).sort((a, b) => a.position - b.position);
    return answer(own.map((glass) => normalDraw(random, means[glass.sample - 1]!)), own);
  });
  const question: MethodQuestion = { answers: countAnswers(operations), glasses, seats, items, samples: means.map((_, i) => i + 1), replicates: 1, alpha };
  return description.analyse(question);
}

const isShown = (found: Found): boolean => {
  if (found.kind === 'choice') return found.choice.isShown;
  if (found.kind === 'pair') return found.pair.isShown;
  if (found.kind === 'order') return found.order.isShown;
  throw new Error(found.kind);
};

/** Share of the sessions that showed a difference. */
function shareShown(run: (random: () => number) => boolean, seed: number): number {
  const random = seeded(xoroshiro128plus(seed));
  let shown = 0;
  for (let i = 0; i < SESSIONS; i += 1) shown += Number(run(random));
  return shown / SESSIONS;
}

const error = (p: number) => 3 * Math.sqrt((p * (1 - p)) / SESSIONS);

const picks = (protocol: Parameters<typeof pickBy>[0]) => (felt: readonly number[], glasses: readonly GlassFact[]) => {
  const [position, also] = pickBy(protocol, felt) as [number, number?];
  return [op(glasses[0]!.seatId, 1, position, { kind: 'choice', number: also ?? null })];
};

const FORCED = [
  ['triangle', 'triangle', 24, 1.5], ['tetrad', 'tetrad', 18, 1.5], ['duo_trio', 'duo_trio', 24, 1.5], ['duo_trio_constant', 'duo_trio', 24, 1.5],
] as const;

describe('a thousand simulated sessions of each', () => {
  it.each([...FORCED, ['two_of_five', 'two_out_of_five', 20, 1.5], ['directional_pair', 'two_afc', 20, 1], ['preference', 'two_afc', 20, 1]] as const)('%s shows nothing where there is nothing, within alpha', { timeout: 120_000 }, (method, protocol, people) => {
    const share = shareShown((random) => isShown(session(method, [0, 0], people, random, [item(1, 'ask')], picks(protocol))), 3);
    expect(share).toBeLessThanOrEqual(ALPHA + error(ALPHA));
  });

  it.each(FORCED)('%s shows a known d′ as often as computed', { timeout: 120_000 }, (method, protocol, people, d) => {
    // Thurstone's psychometric function, checked against published tables in tests/unit/stats/discrimination.
    const expected = power(people, { alpha: ALPHA, chance: CHANCE[protocol], pc: proportionCorrect(protocol, d) });
    const share = shareShown((random) => isShown(session(method, [0, d], people, random, [], picks(protocol))), 5);
    expect(Math.abs(share - expected)).toBeLessThanOrEqual(error(expected));
  });

  it('a directional pair shows a known d′ as often as computed, two-sided', { timeout: 120_000 }, () => {
    const expected = power(20, { alpha: ALPHA, chance: CHANCE.two_afc, pc: proportionCorrect('two_afc', 1), twoSided: true });
    const share = shareShown((random) => isShown(session('directional_pair', [0, 1], 20, random, [item(1, 'ask')], picks('two_afc'))), 7);
    expect(Math.abs(share - expected)).toBeLessThanOrEqual(error(expected));
  });

  it('ranking shows no order where there is none, within alpha', { timeout: 120_000 }, () => {
    const share = shareShown((random) => isShown(session('ranking', [0, 0, 0, 0], 14, random, [item(1, 'ask')], (felt, glasses) => [
      op(glasses[0]!.seatId, 1, null, { kind: 'order', text: glasses.map((glass) => glass.position).sort((a, b) => felt[a - 1]! - felt[b - 1]!).join(',') }),
    ])), 11);
    expect(share).toBeLessThanOrEqual(ALPHA + error(ALPHA));
  });

  it('liking by as many people shows none where there is none, within alpha', { timeout: 240_000 }, () => {
    const share = shareShown((random) => {
      const found = session('liking', [0, 0, 0], 12, random, [item(1, 'liking')], (felt, glasses) => glasses.map((glass, i) => op(glass.seatId, 1, glass.position, { item: 1, number: Math.min(9, Math.max(1, Math.round(5 + 1.5 * felt[i]!))) })));
      return found.kind === 'profile' && (found.profile.lines[0]!.product?.p ?? 1) <= ALPHA;
    }, 13);
    expect(share).toBeLessThanOrEqual(ALPHA + error(ALPHA));
  });

  it('ticks show no word where there is none, within alpha', { timeout: 240_000 }, () => {
    const share = shareShown((random) => {
      const found = session('check_all', [0, 0, 0], 40, random, [item(1, 'check')], (felt, glasses) => glasses.map((glass, i) => op(glass.seatId, 1, glass.position, { item: 1, number: Number(felt[i]! > 0) })));
      return found.kind === 'ticks' && (found.ticks.lines[0]!.p ?? 1) <= ALPHA;
    }, 17);
    expect(share).toBeLessThanOrEqual(ALPHA + error(ALPHA));
  });
});
