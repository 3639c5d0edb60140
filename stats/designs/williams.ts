import { requireInteger } from '../check';

/**
 * Williams' serving orders for t samples (2 ≤ t ≤ 100): rows are assessors, entries the samples 0..t − 1.
 * Every sample stands equally often in every position, and every sample directly follows every other
 * equally often. Even t needs t rows (each ordered pair once); odd t needs 2t (each ordered pair twice).
 *
 * Construction: the row 0, 1, t − 1, 2, t − 2, … and its cyclic shifts; for odd t also each row reversed.
 * Throws on t that is not whole or out of range. Source: E. J. Williams (1949), Aust. J. Sci. Res. A 2:149.
 */
export function williamsSquare(t: number): number[][] {
  requireInteger(t, 'number of samples', 2, 100);
  const first = [0];
  for (let low = 1, high = t - 1; first.length < t; ) {
    first.push(first.length % 2 === 1 ? low++ : high--);
  }
  const square = first.map((_, shift) => first.map((sample) => (sample + shift) % t));
  return t % 2 === 0 ? square : [...square, ...square.map((row) => row.toReversed())];
}
