import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { countAnswers, type GlassFact, type OperationFact, type SeatFact } from '@/lib/results/evidence';
import { analyseProfile, type LineFact } from '@/lib/results/profile';
import type { ProfileView, SampleView } from '@/lib/results/types';
import { profileVerdict } from '@/lib/results/verdict';
import { profileWarnings } from '@/lib/results/warnings';

const LINE: LineFact = { item: 1, name: 'Length', phase: 'after', definition: 'How long it stays', lowAnchor: 'short', highAnchor: 'very long' };
const sampleViews = (n: number): SampleView[] => Array.from({ length: n }, (_, i) => ({ sample: i + 1, id: `s${i + 1}`, label: `Barrel ${i + 1}`, isControl: false, components: [], codes: [] }));
const seatFacts = (n: number): SeatFact[] => Array.from({ length: n }, (_, i) => ({ id: `seat${i + 1}`, number: i + 1, isReserve: false, isClaimed: true, isSubmitted: true, hasLeft: false, role: 'taste', name: null }));

/** Every seat gets every sample in each block; the place is the sample's number turned by the seat. */
function glassesFor(seats: number, samples: number, blocks: number): GlassFact[] {
  return seatFacts(seats).flatMap((seat) =>
    Array.from({ length: blocks }, (_, b) => Array.from({ length: samples }, (_, s) => ({ seatId: seat.id, block: b + 1, position: ((s + seat.number) % samples) + 1, code: '', sample: s + 1 }))).flat(),
  );
}

function scoresOf(glasses: readonly GlassFact[], value: (glass: GlassFact, index: number) => number): OperationFact[] {
  return glasses.map((glass, index) => ({
    seatId: glass.seatId, tokenGeneration: 1, seq: index + 1, receiptNo: index + 1, kind: 'score', block: glass.block, position: glass.position, item: 1,
    number: value(glass, index), text: null, isGuess: null, isLate: false,
  }));
}

interface Table {
  seats: number;
  samples: number;
  blocks: number;
  values: number[];
}

const tables = fc
  .record({ seats: fc.integer({ min: 1, max: 7 }), samples: fc.integer({ min: 2, max: 5 }), blocks: fc.integer({ min: 1, max: 3 }) })
  .chain(({ seats, samples, blocks }) => fc.record({ seats: fc.constant(seats), samples: fc.constant(samples), blocks: fc.constant(blocks), values: fc.array(fc.integer({ min: 0, max: 100 }), { minLength: seats * samples * blocks, maxLength: seats * samples * blocks }) }));

function analyse({ seats, samples, blocks, values }: Table, keep: (index: number) => boolean = () => true): ProfileView {
  const glasses = glassesFor(seats, samples, blocks);
  const scores = scoresOf(glasses, (_, index) => values[index]!).filter((_, index) => keep(index));
  return analyseProfile({ lines: [LINE], scores, glasses, seats: seatFacts(seats), samples: sampleViews(samples).map((s) => s.sample), replicates: blocks, alpha: 0.05, scale: { low: 0, high: 100 } });
}

const everyNumber = (value: unknown): number[] =>
  typeof value === 'number' ? [value] : value !== null && typeof value === 'object' ? Object.values(value).flatMap(everyNumber) : [];

describe('a profile line from any scores', () => {
  it('never gives a number that is none, and says why when it tests nothing', () => {
    fc.assert(
      fc.property(tables, fc.array(fc.nat(200), { maxLength: 3 }), (table, gaps) => {
        const profile = analyse(table, (index) => !gaps.includes(index));
        expect(everyNumber(profile).every(Number.isFinite)).toBe(true);
        for (const line of profile.lines) expect(line.product === null).toBe(line.whyNot !== null);
      }),
      { numRuns: 150, seed: 5 },
    );
  });

  it('names only differences that were shown, and never calls samples alike', () => {
    fc.assert(
      fc.property(tables, (table) => {
        const profile = analyse(table);
        const verdict = profileVerdict(profile, sampleViews(table.samples));
        const line = profile.lines[0]!;
        const said = [verdict.headline, ...verdict.sentences].join(' ');
        expect(`${said} ${profileWarnings(profile).join(' ')}`).not.toMatch(/the same|identical|no difference exists|NaN|undefined|Infinity/);
        if (line.product && line.product.p > 0.05) {
          expect(said).toBe('No difference was shown in length.');
          expect(profile.extremes.every((e) => e.highest.length === 0 && e.lowest.length === 0)).toBe(true);
        }
      }),
      { numRuns: 150, seed: 6 },
    );
  });

  it('does not depend on which seat is which, nor on the order in which answers came', () => {
    fc.assert(
      fc.property(tables, (table) => {
        const glasses = glassesFor(table.seats, table.samples, table.blocks);
        const turned = glasses.map((glass) => ({ ...glass, seatId: `seat${(Number(glass.seatId.slice(4)) % table.seats) + 1}` }));
        const value = (_: GlassFact, index: number) => table.values[index]!;
        const ask = (own: GlassFact[]) =>
          analyseProfile({ lines: [LINE], scores: scoresOf(own, value).reverse(), glasses: own, seats: seatFacts(table.seats), samples: sampleViews(table.samples).map((s) => s.sample), replicates: table.blocks, alpha: 0.05, scale: { low: 0, high: 100 } }).lines[0]!;
        const [a, b] = [ask(glasses), ask(turned)];
        a.cells.forEach((cell, i) => expect(cell.mean).toBeCloseTo(b.cells[i]!.mean, 9));
        if (a.product && b.product) expect(a.product.F / b.product.F).toBeCloseTo(1, 6);
      }),
      { numRuns: 60, seed: 7 },
    );
  });
});

describe('counting', () => {
  const op = (more: Partial<OperationFact>): OperationFact => ({
    seatId: 'seat1', tokenGeneration: 1, seq: 1, receiptNo: 1, kind: 'score', block: 1, position: 1, item: 1, number: 50, text: null, isGuess: null, isLate: false, ...more,
  });

  it('gives the same answer whatever the order of receipt', () => {
    const ops = [op({ seq: 1, number: 10 }), op({ seq: 2, kind: 'clear', number: null }), op({ seq: 3, number: 30 }), op({ seq: 1, tokenGeneration: 2, number: 70 })];
    fc.assert(
      fc.property(fc.shuffledSubarray(ops, { minLength: ops.length }), (order) => {
        const { scores, replaced, cleared } = countAnswers(order.map((one, i) => ({ ...one, receiptNo: i + 1 })));
        expect(scores.map((s) => s.number)).toEqual([70]);
        expect([replaced, cleared]).toEqual([3, 0]);
      }),
    );
  });

  it('lets a late answer replace nothing', () => {
    const { scores, late } = countAnswers([op({ number: 40 }), op({ seq: 9, number: 90, isLate: true })]);
    expect(scores.map((s) => s.number)).toEqual([40]);
    expect(late.get('seat1')).toBe(1);
  });
});
