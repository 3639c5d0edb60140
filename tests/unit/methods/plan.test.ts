import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ALL_CODES, drawCodes } from '@/lib/methods/codes';
import { systemDraw } from '@/lib/methods/draw';
import { profile } from '@/lib/methods/profile';
import { triangle } from '@/lib/methods/triangle';
import type { PlannedServing } from '@/lib/methods/types';
import { checkBalance } from '@/stats';

const seatsOf = (plan: PlannedServing[], block: number): number[][] => {
  const rows = new Map<number, number[]>();
  for (const s of plan.filter((serving) => serving.block === block)) {
    const row = rows.get(s.seat) ?? [];
    row[s.position - 1] = s.sample - 1;
    rows.set(s.seat, row);
  }
  return [...rows.values()];
};

describe('codes', () => {
  it('never reads as another code upside down', () => {
    // Rotating a glass by half a turn: 0, 1, 8 stay, 6 and 9 change places.
    const turned: Record<string, string> = { 0: '0', 1: '1', 6: '9', 8: '8', 9: '6' };
    for (const code of ALL_CODES) {
      const upsideDown = [...code].reverse().map((digit) => turned[digit] ?? '?').join('');
      expect(upsideDown).toContain('?');
    }
    expect(ALL_CODES.every((code) => /^[1-9]\d\d$/.test(code))).toBe(true);
  });

  it('draws each code about equally often, without repeats in one draw', () => {
    const counts = new Map<string, number>();
    const sessions = 10_000;
    for (let i = 0; i < sessions; i += 1) {
      const drawn = drawCodes(6, systemDraw);
      expect(new Set(drawn).size).toBe(6);
      for (const code of drawn) counts.set(code, (counts.get(code) ?? 0) + 1);
    }
    // Pearson's chi-square of fit; its mean is df and its variance 2 df, so 5 standard deviations is far out.
    const expected = (sessions * 6) / ALL_CODES.length;
    const chiSquare = ALL_CODES.reduce((sum, code) => sum + ((counts.get(code) ?? 0) - expected) ** 2 / expected, 0);
    const df = ALL_CODES.length - 1;
    expect(Math.abs(chiSquare - df)).toBeLessThan(5 * Math.sqrt(2 * df));
  });
});

describe('profile plan', () => {
  it('is balanced for position and first-order carry-over in whole squares (Williams 1949), in every block', () => {
    for (const sampleCount of [2, 3, 4, 5, 6, 7, 8]) {
      const square = sampleCount % 2 === 0 ? sampleCount : 2 * sampleCount;
      const plan = profile.plan({ sampleCount, seatCount: square * 2, replicates: 2 }, systemDraw);
      for (const block of [1, 2]) {
        const balance = checkBalance(seatsOf(plan, block), sampleCount);
        expect(balance.positionBalanced, `${sampleCount} samples`).toBe(true);
        expect(balance.carryOverBalanced, `${sampleCount} samples`).toBe(true);
      }
    }
  });

  it('gives every seat every sample once a block, one code a sample and block, and no code twice to a seat', () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 12 }), fc.integer({ min: 1, max: 30 }), fc.integer({ min: 1, max: 3 }), (sampleCount, seatCount, replicates) => {
        const plan = profile.plan({ sampleCount, seatCount, replicates }, systemDraw);
        expect(plan).toHaveLength(sampleCount * seatCount * replicates);
        const codeOf = new Map<string, string>();
        for (const s of plan) {
          const key = `${s.block}/${s.sample}`;
          expect(codeOf.get(key) ?? s.code).toBe(s.code);
          codeOf.set(key, s.code);
        }
        expect(new Set(codeOf.values()).size).toBe(sampleCount * replicates);
        for (let seat = 1; seat <= seatCount; seat += 1) {
          for (let block = 1; block <= replicates; block += 1) {
            const own = plan.filter((s) => s.seat === seat && s.block === block);
            expect(own.map((s) => s.position).sort((a, b) => a - b)).toEqual(Array.from({ length: sampleCount }, (_, i) => i + 1));
            expect(new Set(own.map((s) => s.sample)).size).toBe(sampleCount);
          }
        }
      }),
      { numRuns: 60 },
    );
  });

  it('does not tell the sample by its code or place: over many plans every sample has every rank of code', () => {
    const counts = Array.from({ length: 4 }, () => [0, 0, 0, 0]);
    const plans = 4000;
    for (let i = 0; i < plans; i += 1) {
      const plan = profile.plan({ sampleCount: 4, seatCount: 1, replicates: 1 }, systemDraw);
      [...plan].sort((a, b) => a.code.localeCompare(b.code)).forEach((s, rank) => { counts[s.sample - 1]![rank]! += 1; });
    }
    // Each cell is binomial(4000, 1/4): standard deviation 27; five of them on either side.
    for (const row of counts) for (const count of row) expect(Math.abs(count - plans / 4)).toBeLessThan(137);
  });
});

describe('triangle plan', () => {
  it('deals the six orders equally often over seats in sixes (ISO 4120, 7.1)', () => {
    const plan = triangle.plan({ sampleCount: 2, seatCount: 12, replicates: 2 }, systemDraw);
    for (const block of [1, 2]) {
      const orders = seatsOf(plan, block).map((row) => row.map((sample) => 'AB'[sample]).join(''));
      const sixes = ['AAB', 'ABA', 'ABB', 'BAA', 'BAB', 'BBA'];
      expect(orders.slice(0, 6).sort()).toEqual(sixes);
      expect(orders.slice(6).sort()).toEqual(sixes);
    }
  });

  it('gives a code to each serving, and none twice to a seat however many seats', () => {
    const small = triangle.plan({ sampleCount: 2, seatCount: 60, replicates: 4 }, systemDraw);
    expect(new Set(small.map((s) => s.code)).size).toBe(small.length);
    const large = triangle.plan({ sampleCount: 2, seatCount: 200, replicates: 4 }, systemDraw);
    for (let seat = 1; seat <= 200; seat += 1) {
      const own = large.filter((s) => s.seat === seat);
      expect(new Set(own.map((s) => s.code)).size).toBe(12);
    }
  });

  it('says which panel could show that half of the people taste a difference: 16 (ISO 4120:2021 table A.3, α 0.05, β 0.20, pd 50 %)', () => {
    expect(triangle.warnings({ sampleCount: 2, seatCount: 12, replicates: 1 }).join(' ')).toContain('16 show one');
    expect(triangle.warnings({ sampleCount: 2, seatCount: 18, replicates: 1 }).join(' ')).not.toContain('show one');
  });
});
