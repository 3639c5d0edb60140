import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { beforeEach, describe, expect, it } from 'vitest';
import type { ItemKind, Method } from '@/db/enums';
import { readBundle } from '@/lib/export/loaders';
import { closeSession, unsealSession } from '@/lib/sessions/lifecycle';
import { hasMixedModels, reproduce, unpack, whyNoR, type Outcome } from '../../support/reproduce';
import { seeded, type Random } from '../../support/tasters';
import { makeScene, openTasting, type Scene, type Tasting } from '../results/scene';

if (whyNoR) console.warn(`The bundle's script is not run: ${whyNoR}.`);

let scene: Scene;
let random: Random;

beforeEach(() => {
  scene = makeScene(['1', '2', '3', '4']);
  random = seeded(xoroshiro128plus(20_261_201));
});

const below = (n: number) => Math.floor(random() * n);

/** Closes, unseals and unpacks. @returns the bundle's folder */
function finish(tasting: Tasting): string {
  closeSession(scene.as('leader'), tasting.sessionId, 'enough for today');
  unsealSession(scene.as('leader'), tasting.sessionId);
  return unpack(readBundle(scene.as('winemaker'), tasting.sessionId).body);
}

/** Every figure agrees; those of lines with gaps only where R has the packages. */
function expectAgreement(folder: string, { hasGaps = false, mostSkipped = 0 } = {}): Outcome {
  const outcome = reproduce(folder);
  expect(outcome.text).not.toMatch(/DIFFERS|NOT COMPUTED|Error/);
  expect(outcome.status).toBe(0);
  expect(outcome.counts.agree).toBeGreaterThan(1);
  if (!hasGaps || hasMixedModels()) expect(outcome.counts.skipped).toBeLessThanOrEqual(mostSkipped);
  return outcome;
}

interface Flight {
  method: Method;
  lines: { name: string; kind: ItemKind; score: (sample: number) => number }[];
  barrels?: string[];
  seats?: number;
  replicates?: number;
  /** Whether this score is never given. */
  isLeftOut?: (seat: number, block: number, sample: number, item: number) => boolean;
}

function tasteFlights({ method, lines, barrels = ['1', '2', '3', '4'], seats = 9, replicates = 2, isLeftOut = () => false }: Flight): Tasting {
  const tasting = openTasting(scene, { method, barrels, seats, replicates, lines: lines.map(({ name, kind }) => ({ name, kind, phase: 'palate' as const })) });
  for (let seat = 1; seat <= seats; seat += 1) {
    for (let block = 1; block <= replicates; block += 1) {
      tasting.samplesOf(seat, block).forEach((sample, index) => {
        lines.forEach((line, at) => {
          const place = { block, position: index + 1, item: at + 1 };
          if (isLeftOut(seat, block, sample, at + 1)) return;
          if (line.kind === 'flag') tasting.say(seat, { kind: 'fault', ...place, isNoted: random() < 0.4 });
          else tasting.say(seat, { kind: 'score', ...place, value: line.score(sample) });
        });
      });
    }
    if (seat !== 2) tasting.submit(seat);
  }
  return tasting;
}

const point = (sample: number) => Math.min(100, below(45) + 12 * sample);

describe.skipIf(whyNoR)('the bundle’s script of flights', () => {
  const twoLines: Flight['lines'] = [{ name: '=Bitter, "dry"', kind: 'line', score: point }, { name: 'Length', kind: 'line', score: () => below(101) }];

  it('agrees on lines with gaps, faults, comments that look like formulas, and values that were changed', () => {
    const tasting = tasteFlights({
      method: 'profile', lines: [...twoLines, { name: 'Reduction', kind: 'flag', score: () => 0 }],
      isLeftOut: (seat, block, sample, item) => item === 1 && (seat === 3 ? block === 2 && sample === 1 : seat === 5 && sample > 2),
    });
    tasting.say(1, { kind: 'comment', block: 1, position: 1, text: '=HYPERLINK("x";"y")\nsecond, "quoted" line é' });
    tasting.say(1, { kind: 'score', block: 1, position: 1, item: 1, value: 99 });
    tasting.say(2, { kind: 'score', block: 1, position: 1, item: 1, value: 1 }, { isLate: true });
    const folder = finish(tasting);
    const outcome = expectAgreement(folder, { hasGaps: true });
    expect(outcome.text).toMatch(/line\.1\.mixed\.product\.F/);
    expect(outcome.text).toMatch(/line\.2\.anova\.product\.F/);
    // The packages hidden: what needs them is named, the rest is compared.
    const bare = reproduce(folder, { R_LIBS_SITE: '/nowhere', R_LIBS_USER: '/nowhere' });
    if (bare.counts.skipped === 0) return;
    expect(bare.text).toContain('skipped: needs the packages lme4, lmerTest and pbkrtest');
    expect(bare).toMatchObject({ status: 0, counts: { differ: 0, missing: 0 } });
    expect(bare.counts.agree).toBeGreaterThan(20);
  });

  it('agrees with one replicate, two samples, and gaps', () => {
    expectAgreement(finish(tasteFlights({ method: 'profile', lines: twoLines, barrels: ['1', '2'], replicates: 1, isLeftOut: (seat, _block, sample) => seat === 4 && sample === 2 })), { hasGaps: true });
  });

  it('agrees where nothing can be tested', () => {
    // By chance of the draw one person's flights may not tell every place from every sample: the span of places is then left out.
    expectAgreement(finish(tasteFlights({ method: 'profile', lines: [{ name: 'Flat', kind: 'line', score: () => 50 }, twoLines[0]!], seats: 1 })), { mostSkipped: 1 });
  });

  it('agrees where nobody scored', () => {
    expectAgreement(finish(tasteFlights({ method: 'profile', lines: [...twoLines, { name: 'Reduction', kind: 'flag', score: () => 0 }], isLeftOut: () => true })));
  });

  it('agrees on categories, on liking, and on words rated only where they are there', () => {
    expectAgreement(finish(tasteFlights({ method: 'category_profile', lines: [{ name: 'Bitter', kind: 'category', score: (sample) => Math.min(5, below(3) + sample) }] })));
    expectAgreement(finish(tasteFlights({ method: 'liking', lines: [{ name: 'Liking', kind: 'liking', score: (sample) => 1 + Math.min(8, below(6) + sample) }], replicates: 1 })));
    expectAgreement(finish(tasteFlights({
      method: 'rate_all', lines: [1, 2].map((n) => ({ name: `Word ${n}`, kind: 'rate' as const, score: (sample: number) => Math.min(3, below(2) + (sample > 2 ? 1 : 0)) })),
      isLeftOut: () => random() < 0.5,
    })));
  });

  it('agrees on ticked words and on just about right, with liking beside them', () => {
    const likes = { name: 'Liking', kind: 'liking' as const, score: (sample: number) => 1 + Math.min(8, below(6) + sample) };
    expectAgreement(finish(tasteFlights({ method: 'check_all', lines: [{ name: 'Cherry', kind: 'check', score: () => below(2) }, { name: 'Smoke', kind: 'check', score: () => 1 }, likes], isLeftOut: (_s, _b, _p, item) => item < 3 && random() < 0.4 })));
    expectAgreement(finish(tasteFlights({ method: 'just_right', lines: [{ name: 'Oak', kind: 'just_right', score: () => 1 + below(5) }, likes], isLeftOut: (seat, block, sample, item) => item === 2 && seat === 1 && block === 1 && sample === 1 })), { hasGaps: true });
  });
});

const PICKS = { triangle: [3, 1, 1], tetrad: [4, 2, 1], duo_trio: [3, 1, 2], duo_trio_constant: [3, 1, 2], two_of_five: [5, 2, 1], directional_pair: [2, 1, 1], preference: [2, 1, 1] } as const;

describe.skipIf(whyNoR)('the bundle’s script of sets', () => {
  it.each(Object.entries(PICKS))('agrees on a %s', (method, [glasses, picks, from]) => {
    const lines = method === 'directional_pair' ? [{ name: 'Bitter', kind: 'ask' as const, phase: 'palate' as const }] : [];
    const tasting = openTasting(scene, { method: method as Method, barrels: ['1', '2'], seats: 20, replicates: 2, lines });
    for (let seat = 1; seat <= 20; seat += 1) {
      for (let block = 1; block <= 2; block += 1) {
        if (seat === 20 && block === 2) continue;
        const samples = tasting.samplesOf(seat, block);
        // The rarer sample, or the first glass's, is picked more often than by chance.
        const first = random() < 0.5 ? 1 + samples.findIndex((sample, i) => i >= from - 1 && samples.filter((other) => other === sample).length * 2 < glasses + 1) : from + below(glasses - from + 1);
        const position = Math.max(from, first);
        const others = samples.map((_, i) => i + 1).filter((place) => place !== position);
        const also = others.find((place) => samples[place - 1] === samples[position - 1] && random() < 0.7) ?? others[0]!;
        tasting.say(seat, { kind: 'choice', block, position, isGuess: random() < 0.3, ...(picks === 2 && { also }) });
      }
      tasting.submit(seat);
    }
    expectAgreement(finish(tasting));
  });

  it.each([[5, 0], [1, 1], [12, 12], [0, 0]])('agrees on a triangle of %i answers with %i right', (n, correct) => {
    const tasting = openTasting(scene, { method: 'triangle', barrels: ['1', '2'], seats: Math.max(1, n), replicates: 1 });
    for (let seat = 1; seat <= n; seat += 1) {
      const samples = tasting.samplesOf(seat, 1);
      const odd = samples.findIndex((sample) => samples.filter((other) => other === sample).length === 1);
      tasting.say(seat, { kind: 'choice', block: 1, position: 1 + (seat <= correct ? odd : (odd + 1) % 3), isGuess: false });
    }
    expectAgreement(finish(tasting));
  });

  it.each([1, 2])('agrees on a ranking with %i orders each', (replicates) => {
    const tasting = openTasting(scene, { method: 'ranking', barrels: ['1', '2', '3', '4'], seats: 15, replicates, lines: [{ name: 'Bitter', kind: 'ask', phase: 'palate' }] });
    for (let seat = 1; seat <= 15; seat += 1) {
      for (let block = 1; block <= replicates; block += 1) {
        if (seat === 15 && block === replicates) continue;
        const felt = tasting.samplesOf(seat, block).map((sample) => sample + 4 * random());
        tasting.say(seat, { kind: 'order', block, order: felt.map((_, i) => i + 1).sort((a, b) => felt[a - 1]! - felt[b - 1]!) });
      }
      tasting.submit(seat);
    }
    expectAgreement(finish(tasting));
  });
});
