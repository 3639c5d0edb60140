import { requireInteger } from '../check';
import { StatsError } from '../errors';

/** Draws a whole number in [0, n), every one equally likely. The caller brings it (seeded or from the system). */
export type DrawBelow = (n: number) => number;

/** One serving order of a test of two products: 0 = A, 1 = B, in the order the glasses are tasted. */
export type Order = readonly number[];

/** Triangle: the six orders ABB, BAA, AAB, BBA, ABA, BAB (ISO 4120:2021, 7.1). */
export const TRIANGLE_ORDERS: readonly Order[] = [
  [0, 1, 1],
  [1, 0, 0],
  [0, 0, 1],
  [1, 1, 0],
  [0, 1, 0],
  [1, 0, 1],
];

/** Tetrad: the six ways to set out two A and two B, AABB, ABAB, ABBA, BBAA, BABA, BAAB. */
export const TETRAD_ORDERS: readonly Order[] = [
  [0, 0, 1, 1],
  [0, 1, 0, 1],
  [0, 1, 1, 0],
  [1, 1, 0, 0],
  [1, 0, 1, 0],
  [1, 0, 0, 1],
];

/** Paired comparison (2-AFC): AB and BA (ISO 5495:2005). */
export const PAIR_ORDERS: readonly Order[] = [
  [0, 1],
  [1, 0],
];

/** 3-AFC with the stronger product B asked for: one B among two A, in each place. */
export const THREE_AFC_ORDERS: readonly Order[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/** Duo-trio, balanced reference: the first glass is the reference, A:AB, A:BA, B:AB, B:BA (ISO 10399). */
export const DUO_TRIO_BALANCED_ORDERS: readonly Order[] = [
  [0, 0, 1],
  [0, 1, 0],
  [1, 0, 1],
  [1, 1, 0],
];

/**
 * Duo-trio, constant reference: the reference is always product `reference` (0 = A, 1 = B), R:AB and R:BA
 * (ISO 10399). Throws on another number.
 */
export function duoTrioConstantOrders(reference: number): Order[] {
  requireInteger(reference, 'reference', 0, 1);
  return PAIR_ORDERS.map((pair) => [reference, ...pair]);
}

/**
 * Two-out-of-five: the twenty orders, ten with two A among three B and their mirror images. Each of the
 * ten places of the odd two comes once with A and once with B as the odd pair.
 */
export const TWO_OUT_OF_FIVE_ORDERS: readonly Order[] = twoOutOfFive();

function twoOutOfFive(): Order[] {
  const orders: Order[] = [];
  for (let odd = 0; odd < 2; odd += 1) {
    for (let i = 0; i < 5; i += 1) {
      for (let j = i + 1; j < 5; j += 1) {
        orders.push([0, 1, 2, 3, 4].map((place) => (place === i || place === j ? odd : 1 - odd)));
      }
    }
  }
  return orders;
}

/** Fisher–Yates shuffle into a new array; every arrangement equally likely when `draw` is uniform. */
export function shuffled<T>(items: readonly T[], draw: DrawBelow): T[] {
  const result = [...items];
  for (let i = result.length - 1; i > 0; i -= 1) {
    const j = draw(i + 1);
    if (!Number.isInteger(j) || j < 0 || j > i) {
      throw new StatsError('out_of_range', 'The random draw gave a number outside its range');
    }
    [result[i], result[j]] = [result[j], result[i]];
  }
  return result;
}

/**
 * Deals serving orders to seats: complete sets of `orders`, each set shuffled on its own, one after
 * another until every seat (0 to 100 000) has one. After every full set the orders are exactly balanced;
 * in a last, incomplete set no order comes twice.
 * Returns one copy of an order per seat. Throws on no orders or a number of seats that is not whole.
 */
export function dealOrders(orders: readonly Order[], seats: number, draw: DrawBelow): number[][] {
  requireInteger(seats, 'number of seats', 0, 100_000);
  if (orders.length === 0) throw new StatsError('empty', 'There are no orders to deal');
  const dealt: number[][] = [];
  while (dealt.length < seats) {
    for (const order of shuffled(orders, draw)) {
      if (dealt.length === seats) break;
      dealt.push([...order]);
    }
  }
  return dealt;
}
