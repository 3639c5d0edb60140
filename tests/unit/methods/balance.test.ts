import { describe, expect, it } from 'vitest';
import { METHODS } from '@/db/enums';
import { METHOD_REGISTRY } from '@/lib/methods';
import { systemDraw } from '@/lib/methods/draw';
import { glassesPerBlock } from '@/lib/methods/types';
import { checkBalance } from '@/stats';

/** Every method's plan for 2 to 12 samples (as many as it takes) and 3 to 60 panelists. */
describe.each(METHODS)('the plan of %s', (method) => {
  const { facts, plan } = METHOD_REGISTRY[method];
  const counts = Array.from({ length: 11 }, (_, i) => i + 2).filter((n) => n >= facts.sampleCount.min && n <= facts.sampleCount.max);

  it('serves what it says, no code twice to a seat, positions as even as can be', () => {
    for (const sampleCount of counts) {
      for (const seatCount of [3, 4, 6, 7, 12, 20, 24, 33, 60]) {
        const servings = plan({ sampleCount, seatCount, replicates: 1 }, systemDraw);
        const inBlock = glassesPerBlock(facts, sampleCount);
        expect(servings).toHaveLength(seatCount * inBlock);
        const rows = Array.from({ length: seatCount }, (_, i) => servings.filter((s) => s.seat === i + 1).sort((a, b) => a.position - b.position));
        for (const row of rows) {
          expect(row.map((s) => s.position)).toEqual(Array.from({ length: inBlock }, (_, i) => i + 1));
          expect(new Set(row.map((s) => s.code)).size).toBe(inBlock);
        }
        if (facts.glassesPerBlock === null) {
          // Each sample once a seat, and in each place equally often up to one round of the square.
          const balance = checkBalance(rows.map((row) => row.map((s) => s.sample - 1)), sampleCount);
          const square = sampleCount % 2 === 0 ? sampleCount : 2 * sampleCount;
          if (seatCount % square === 0) expect([balance.positionBalanced, balance.carryOverBalanced]).toEqual([true, true]);
          for (const row of rows) expect(new Set(row.map((s) => s.sample)).size).toBe(sampleCount);
        } else {
          // Both samples are served; over whole rounds of the orders each as often (a constant reference apart).
          const served = [1, 2].map((sample) => servings.filter((s) => s.sample === sample).length);
          expect(Math.min(...served)).toBeGreaterThan(0);
          if (method !== 'duo_trio_constant' && seatCount === 60) expect(served[0]).toBe(served[1]);
          // The glass that answers the question stands in each of its places equally often over whole rounds.
          if (seatCount === 60) {
            for (let place = 0; place < inBlock; place += 1) {
              const first = rows.filter((row) => row[place]!.sample === 1).length;
              expect(method === 'duo_trio_constant' && place === 0 ? 60 : 30).toBe(first);
            }
          }
        }
      }
    }
  });

  it('warns of what is weak and forbids nothing', () => {
    const sampleCount = counts[0]!;
    for (const seatCount of [1, 3, 12, 60]) for (const replicates of [1, 2]) expect(METHOD_REGISTRY[method].warnings({ sampleCount, seatCount, replicates }).every((warning) => warning.length > 20)).toBe(true);
    expect(METHOD_REGISTRY[method].warnings({ sampleCount, seatCount: 1, replicates: 1 })).not.toEqual([]);
  });
});
