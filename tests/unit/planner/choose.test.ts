import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { choose, reachOf } from '@/lib/planner/choose';
import { NEEDS_OF, mostGlassesOf } from '@/lib/planner/methods';
import { METHODS } from '@/db/enums';
import { QUESTIONS, SIZES, type Choosing } from '@/lib/planner/types';
import { dealOrders } from '@/stats';

const ask = (more: Partial<Choosing> = {}): Choosing => ({
  question: 'difference', samples: 2, wineMl: null, people: null, isStrong: false, size: 'slight', servingMl: 30, glassS: 90, restS: 60, ...more,
});
const all = (more: Partial<Choosing>) => { const { offers, misfits } = choose(ask(more)); return [...offers, ...misfits]; };
const one = (method: string, more: Partial<Choosing> = {}) => all(more).find((offer) => offer.method === method)!;

const anyChoosing: fc.Arbitrary<Choosing> = fc.record({
  question: fc.constantFrom(...QUESTIONS), samples: fc.integer({ min: 1, max: 12 }), wineMl: fc.option(fc.double({ min: 1, max: 20_000, noNaN: true })),
  people: fc.option(fc.integer({ min: 1, max: 500 })), isStrong: fc.boolean(), size: fc.constantFrom(...SIZES),
  servingMl: fc.double({ min: 5, max: 150, noNaN: true }), glassS: fc.integer({ min: 10, max: 600 }), restS: fc.integer({ min: 0, max: 900 }),
});

describe('choosing', () => {
  // worked-examples.json, dprime-n: panels at d′ 1, α .05, power .80; a slight difference is d′ 1.
  it('counts panels of discrimination tests through d′', () => {
    expect(one('triangle').needs.panelists.usual).toBe(202);
    expect(one('tetrad').needs.panelists.usual).toBe(61);
    expect(one('duo_trio').needs.panelists.usual).toBe(228);
  });

  it('always offers a method or gives a reason, with needs above nothing', () => {
    fc.assert(fc.property(anyChoosing, (choosing) => {
      const { offers, misfits } = choose(choosing);
      expect(offers.length + misfits.length).toBeGreaterThan(0);
      for (const { reasons } of misfits) expect(reasons.length).toBeGreaterThan(0);
      for (const { needs } of [...offers, ...misfits]) {
        expect(needs.panelists.usual).toBeGreaterThanOrEqual(needs.panelists.fewest);
        for (const n of [needs.panelists.fewest, needs.glassesEach, needs.glassesInAll.fewest, needs.mlPerSample.fewest, needs.minutesEach, needs.flights]) expect(n).toBeGreaterThan(0);
        expect(needs.glassesInAll.usual).toBe(needs.glassesEach * needs.panelists.usual);
      }
      for (const { needs } of offers) if (choosing.people !== null) expect(choosing.people).toBeGreaterThanOrEqual(needs.panelists.fewest);
    }), { numRuns: 150 });
  });

  it('puts gentler tests first for a tannic wine', () => {
    expect(all({})[0]!.method).toBe('tetrad');
    expect(all({ isStrong: true })[0]!.method).toBe('duo_trio');
  });

  it('says how many pairs several wines make', () => {
    expect(one('triangle', { samples: 4 })).toMatchObject({ reasons: [expect.stringContaining('6 pairs')] });
    expect(choose(ask({ samples: 4 })).offers.map((offer) => offer.method)).toEqual(['profile', 'ranking']);
  });
});

describe('glasses, wine and time', () => {
  // By hand: 12 people, 6 samples twice: 12 glasses each; of each sample 24 and a spare, 25 × 30 mL;
  // 12 × (90 + 60) s are 30 minutes, and ten between the two flights.
  it('of a profile of six', () => {
    expect(one('profile', { question: 'taste', samples: 6 }).needs).toEqual({
      panelists: { usual: 12, fewest: 8 }, glassesEach: 12, flights: 2, glassesInAll: { usual: 144, fewest: 96 }, mlPerSample: { usual: 750, fewest: 510 }, minutesEach: 40,
    });
  });

  // By hand: one set of three at 90 s and a rest of 60 s are 330 s, six minutes begun.
  it('of a triangle', () => {
    expect(one('triangle').needs).toMatchObject({ glassesEach: 3, minutesEach: 6, flights: 1 });
    // 202 people are 33 rounds of six, 9 glasses of each wine, and four more: at worst 2 + 2 + 2 + 1. A spare: 305.
    expect(one('triangle').needs.mlPerSample.usual).toBe(305 * 30);
  });

  it('never pours more than counted, whatever is drawn', () => {
    fc.assert(fc.property(fc.constantFrom(...METHODS.filter((m) => NEEDS_OF[m].orders)), fc.integer({ min: 0, max: 70 }), fc.infiniteStream(fc.nat()), (method, people, stream) => {
      const orders = NEEDS_OF[method].orders!;
      const dealt = dealOrders(orders, people, (n) => stream.next().value % n).flat();
      for (const sample of [0, 1]) expect(dealt.filter((glass) => glass === sample).length).toBeLessThanOrEqual(mostGlassesOf(orders, people));
    }));
  });

  it('splits long flights of strong wine', () => {
    const seven = one('ranking', { question: 'order', samples: 7, isStrong: true });
    // By hand: 7 × 150 s are 17.5 minutes, 18 begun, and ten between two flights.
    expect(seven.needs).toMatchObject({ flights: 2, minutesEach: 28 });
    expect(seven.cautions.join(' ')).toContain('common practice');
  });
});

describe('what is at hand', () => {
  // By hand: 400 mL are 13 glasses of 30 mL; one is spare, twelve are six people's two.
  it('says how many people the wine reaches for', () => {
    expect(reachOf('profile', 400, 30)).toBe(6);
    const profile = one('profile', { question: 'taste', samples: 4, wineMl: 400 });
    expect(profile).toMatchObject({ reasons: ['Too little wine: 400 mL of each reaches for 6 people; the fewest, 8, need 510 mL.'] });
    expect(reachOf('triangle', 29, 30)).toBe(0);
  });

  it('reaches exactly as far as the glasses do', () => {
    fc.assert(fc.property(fc.constantFrom(...METHODS), fc.integer({ min: 1, max: 400 }), (method, glasses) => {
      const { orders, times } = NEEDS_OF[method];
      const poured = (people: number) => 1 + (orders ? mostGlassesOf(orders, people) : times * people);
      const reach = reachOf(method, glasses * 30, 30);
      expect(poured(reach)).toBeLessThanOrEqual(glasses);
      expect(poured(reach + 1)).toBeGreaterThan(glasses);
    }));
  });

  it('says what too few people can show', () => {
    const few = one('tetrad', { people: 40, size: 'slight' });
    expect(few.cautions.join(' ')).toMatch(/40 people are fewer than the usual 61\. They find a slight difference \d+ times in 100\./);
    expect(one('tetrad', { people: 5 })).toMatchObject({ reasons: [expect.stringContaining('Too few people')] });
  });
});
