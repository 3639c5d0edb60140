import { requireInteger } from '../check';
import { logChoose } from '../distributions';

/**
 * Probability of sorting n + n glasses wholly right by guessing. Unspecified (which group is which is not
 * asked): 2 / C(2n, n); specified: 1 / C(2n, n). n from 1 to 500; 2 + 2 unspecified is the tetrad, 1/3.
 * Throws on n that is not whole or out of range. Relative error below 1e-12.
 * Sources: counting; R. A. Fisher (1935), the lady tasting tea, 4 + 4 specified: 1/70.
 */
export function sortingChance(n: number, specified = false): number {
  requireInteger(n, 'glasses of each kind', 1, 500);
  return Math.min(1, (specified ? 1 : 2) * Math.exp(-logChoose(2 * n, n)));
}
