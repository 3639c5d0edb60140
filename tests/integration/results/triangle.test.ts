import { beforeEach, describe, expect, it } from 'vitest';
import { readResults } from '@/lib/results/loaders';
import { closeSession, unsealSession } from '@/lib/sessions/lifecycle';
import { makeScene, openTasting, type Scene, type Tasting } from './scene';

let scene: Scene;

beforeEach(() => {
  scene = makeScene(['18', '19']);
});

function choose(tasting: Tasting, seat: number, isCorrect: boolean, isGuess = false): void {
  const glasses = tasting.samplesOf(seat, 1);
  const odd = glasses.findIndex((sample) => glasses.filter((other) => other === sample).length === 1);
  tasting.say(seat, { kind: 'choice', block: 1, position: (isCorrect ? odd : (odd + 1) % 3) + 1, isGuess });
}

function taste(seats: number, correct: number): Tasting {
  const tasting = openTasting(scene, { method: 'triangle', barrels: ['18', '19'], seats, replicates: 1 });
  for (let seat = 1; seat <= seats; seat += 1) {
    choose(tasting, seat, seat <= correct, seat === seats);
    tasting.submit(seat);
  }
  return tasting;
}

function finish(tasting: Tasting) {
  closeSession(scene.as('leader'), tasting.sessionId, null);
  unsealSession(scene.as('leader'), tasting.sessionId);
  return readResults(scene.as('winemaker'), tasting.sessionId);
}

describe('a triangle session', () => {
  it('shows a difference with 8 of 12', () => {
    const { choice: triangle, verdict } = finish(taste(12, 8));
    // Exact: (495·16 + 220·8 + 66·4 + 12·2 + 1) / 3^12 = 9969/531441; 8 of 12 is ISO 4120 table A.1 at 5 %.
    expect(triangle!.p).toBeCloseTo(9969 / 531441, 12);
    expect(triangle).toMatchObject({ n: 12, correct: 8, minimumCorrect: 8, isShown: true, guesses: 1, correctGuesses: 0 });
    // (8/12 − 1/3) / (2/3) = 1/2; Clopper–Pearson limits of 8/12 from R: binom.test(8, 12)$conf.int = 0.3488755, 0.9007539.
    expect(triangle!.pd!.value).toBeCloseTo(0.5, 12);
    expect(triangle!.pd!.lower).toBeCloseTo((0.3488755 - 1 / 3) * 1.5, 6);
    expect(triangle!.pd!.upper).toBeCloseTo((0.9007539 - 1 / 3) * 1.5, 6);
    expect(verdict.headline).toBe('A difference was shown: 8 of 12 answers were right.');
  });

  it('never calls two alike when none was shown', () => {
    const { choice: triangle, verdict, warnings } = finish(taste(12, 7));
    expect(triangle).toMatchObject({ correct: 7, isShown: false });
    expect(verdict.headline).toBe('No difference was shown: 7 of 12 answers were right.');
    expect(verdict.reach.join(' ')).toContain('Not shown is not alike');
    expect([verdict.headline, ...verdict.sentences].join(' ')).not.toMatch(/the same|alike|identical/);
    // TRADE table: 16 assessors for pd 50 %, alpha 5 %, beta 20 % (ISO 4120 table A.3).
    expect(warnings.join(' ')).toContain('16 show one that half of the people taste');
  });

  it('keeps the first choice of a set, and leaves unanswered sets out', () => {
    const tasting = openTasting(scene, { method: 'triangle', barrels: ['18', '19'], seats: 6, replicates: 1 });
    choose(tasting, 1, false);
    choose(tasting, 1, true);
    choose(tasting, 2, true);
    closeSession(scene.as('leader'), tasting.sessionId, 'two were enough for today');
    unsealSession(scene.as('leader'), tasting.sessionId);
    const { choice: triangle } = readResults(scene.as('winemaker'), tasting.sessionId);
    expect(triangle).toMatchObject({ n: 2, correct: 1, unanswered: 4, minimumCorrect: null, isShown: false });
  });
});
