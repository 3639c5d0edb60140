import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import {
  arrangeRows,
  checkBalance,
  completePlan,
  dealOrders,
  DUO_TRIO_BALANCED_ORDERS,
  duoTrioConstantOrders,
  incompletePlan,
  PAIR_ORDERS,
  shuffled,
  StatsError,
  TETRAD_ORDERS,
  THREE_AFC_ORDERS,
  TRIANGLE_ORDERS,
  TWO_OUT_OF_FIVE_ORDERS,
  williamsSquare,
  type DrawBelow,
} from '@/stats';

function seededDraw(seed: number): DrawBelow {
  const generator = xoroshiro128plus(seed);
  return (n) => uniformInt(generator, 0, n - 1);
}

const range = (values: readonly number[]) => Math.max(...values) - Math.min(...values);

describe('standard orders', () => {
  it.each([
    ['triangle', TRIANGLE_ORDERS, 6],
    ['tetrad', TETRAD_ORDERS, 6],
    ['pair', PAIR_ORDERS, 2],
    ['3-AFC', THREE_AFC_ORDERS, 3],
    ['duo-trio, balanced reference', DUO_TRIO_BALANCED_ORDERS, 4],
    ['duo-trio, constant reference', duoTrioConstantOrders(1), 2],
    ['two-out-of-five', TWO_OUT_OF_FIVE_ORDERS, 20],
  ])('%s: all different, and as many as can be', (_, orders, count) => {
    expect(new Set(orders.map((order) => order.join(''))).size).toBe(count);
    expect(orders).toHaveLength(count);
  });

  it('put each product equally often in each place of a triangle, tetrad and two-out-of-five', () => {
    for (const orders of [TRIANGLE_ORDERS, TETRAD_ORDERS, TWO_OUT_OF_FIVE_ORDERS]) {
      expect(checkBalance(orders, 2).positionBalanced).toBe(true);
    }
  });

  it('are dealt so that any two differ by at most one in how often they come', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 70 }), fc.nat(), (seats, seed) => {
        const dealt = dealOrders(TRIANGLE_ORDERS, seats, seededDraw(seed));
        const counts = TRIANGLE_ORDERS.map((order) => dealt.filter((own) => own.join() === order.join()).length);
        expect(range(counts)).toBeLessThanOrEqual(1);
      }),
      { seed: 1 },
    );
  });

  it('are shuffled evenly: each of the six orders of three comes a sixth of the time', () => {
    const draw = seededDraw(9);
    const counts = new Map<string, number>();
    const runs = 12_000;
    for (let run = 0; run < runs; run += 1) {
      const key = shuffled(['a', 'b', 'c'], draw).join('');
      counts.set(key, (counts.get(key) ?? 0) + 1);
    }
    // Chi-square on five degrees of freedom: 20.5 is its .999 point.
    const chiSquare = [...counts.values()].reduce((sum, n) => sum + (n - runs / 6) ** 2 / (runs / 6), 0);
    expect(counts.size).toBe(6);
    expect(chiSquare).toBeLessThan(20.5);
  });
});

describe('complete plans', () => {
  it('for 2 to 12 samples and 3 to 60 panelists keep positions and carry-over within one set of rows of balance', () => {
    for (let samples = 2; samples <= 12; samples += 1) {
      const set = williamsSquare(samples).length;
      const perPosition = set / samples;
      for (const seats of [3, 7, 12, 25, 60]) {
        const plan = completePlan({ samples, seats, replicates: 1, flightSize: 100, draw: seededDraw(samples * 100 + seats) });
        const balance = checkBalance(plan.flat(), samples);
        expect(balance.replication.every((n) => n === seats)).toBe(true);
        // Whole sets are exact, so what is left over comes from one set that was cut.
        expect(range(balance.positionCounts.flat())).toBeLessThanOrEqual(seats % set === 0 ? 0 : Math.min(perPosition, seats % set));
        if (seats % set === 0) expect(balance.carryOverBalanced).toBe(true);
      }
    }
  });

  it('give every seat every sample in each replicate, in another order each time', () => {
    const plan = completePlan({ samples: 6, seats: 8, replicates: 3, flightSize: 6, draw: seededDraw(2) });
    for (const flights of plan) {
      expect(flights).toHaveLength(3);
      for (const flight of flights) expect(flight.toSorted()).toEqual([0, 1, 2, 3, 4, 5]);
      expect(new Set(flights.map((flight) => flight.join())).size).toBe(3);
    }
  });

  it('cut long rows into flights of nearly equal length', () => {
    const [flights] = completePlan({ samples: 10, seats: 1, replicates: 1, flightSize: 4, draw: seededDraw(3) });
    expect(flights.map((flight) => flight.length).toSorted()).toEqual([3, 3, 4]);
    expect(flights.flat().toSorted((x, y) => x - y)).toEqual([0, 1, 2, 3, 4, 5, 6, 7, 8, 9]);
  });
});

describe('incomplete plans', () => {
  it('keep every pair of samples meeting equally often over whole sets', () => {
    const plan = incompletePlan({ samples: 7, perSeat: 3, seats: 14, replicates: 1, flightSize: 6, draw: seededDraw(4) });
    const balance = checkBalance(plan.flat(), 7);
    expect(balance.balancedIncompleteBlock).toBe(true);
    expect(balance.replication).toEqual(Array(7).fill(6));
    expect(balance.positionBalanced).toBe(true);
  });

  it('stand evenly in the positions for the usual designs', () => {
    for (const [samples, perSeat, seats] of [[5, 3, 10], [6, 3, 10], [7, 4, 7], [8, 4, 14], [9, 3, 12], [9, 4, 18], [11, 5, 11]]) {
      const plan = incompletePlan({ samples, perSeat, seats, replicates: 1, flightSize: 12, draw: seededDraw(samples) });
      expect(range(checkBalance(plan.flat(), samples).positionCounts.flat())).toBeLessThanOrEqual(1);
    }
  });
});

describe('arranged rows', () => {
  it('keep their samples', () => {
    const rows = [[0, 1, 2], [2, 3, 4], [4, 0, 1]];
    const arranged = arrangeRows(rows, 5, seededDraw(6));
    expect(arranged.map((row) => row.toSorted())).toEqual(rows.map((row) => row.toSorted()));
  });
});

it.each([
  ['one sample', () => williamsSquare(1)],
  ['half a seat', () => dealOrders(PAIR_ORDERS, 1.5, seededDraw(1))],
  ['no orders', () => dealOrders([], 3, seededDraw(1))],
  ['no seats', () => completePlan({ samples: 4, seats: 0, replicates: 1, flightSize: 4, draw: seededDraw(1) })],
  ['flights of no glass', () => completePlan({ samples: 4, seats: 4, replicates: 1, flightSize: 0, draw: seededDraw(1) })],
  ['a plan that no design gives', () => incompletePlan({ samples: 14, perSeat: 6, seats: 4, replicates: 1, flightSize: 6, draw: seededDraw(1) })],
  ['a draw outside its range', () => shuffled([1, 2, 3], () => 7)],
  ['a sample that is not there', () => checkBalance([[0, 5]], 3)],
  ['an empty plan', () => checkBalance([], 3)],
])('%s is refused', (_, work) => expect(work).toThrow(StatsError));
