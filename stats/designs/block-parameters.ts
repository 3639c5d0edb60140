import { requireInteger } from '../check';

/** Parameters of a balanced incomplete block design: t samples in b blocks (palates) of k, each r times, each pair λ times. */
export interface BlockParameters {
  readonly t: number;
  readonly k: number;
  readonly b: number;
  readonly r: number;
  readonly lambda: number;
}

/**
 * All parameters with 2 ≤ k < t ≤ `most` and r ≤ `mostRepeats` that meet the identities b k = t r and
 * λ (t − 1) = r (k − 1) and Fisher's b ≥ t. Meeting them does not mean that a design exists.
 * `most` 3 to 100, `mostRepeats` 1 to 100. Source: Cochran & Cox (1957) ch. 11; ISO 29842.
 */
export function blockParameters(most: number, mostRepeats: number): BlockParameters[] {
  requireInteger(most, 'largest number of samples', 3, 100);
  requireInteger(mostRepeats, 'largest number of repeats', 1, 100);
  const found: BlockParameters[] = [];
  for (let t = 3; t <= most; t += 1) {
    for (let k = 2; k < t; k += 1) {
      for (let r = 1; r <= mostRepeats; r += 1) {
        const lambda = (r * (k - 1)) / (t - 1);
        const b = (t * r) / k;
        if (Number.isInteger(lambda) && Number.isInteger(b) && b >= t) found.push({ t, k, b, r, lambda });
      }
    }
  }
  return found;
}

/** Share of the information on a difference that a block design keeps, against complete blocks: λ t / (r k). */
export function blockEfficiency({ t, k, r, lambda }: BlockParameters): number {
  return (lambda * t) / (r * k);
}

/**
 * True when theory rules the design out although its parameters meet the identities. A symmetric design
 * (b = t) with t even needs r − λ a square (Schützenberger 1949); one with r = k + 2 and λ = 2 exists only
 * together with the symmetric design it would be cut from (Hall & Connor 1954). False means not ruled out by these.
 */
export function isRuledOut({ t, k, b, r, lambda }: BlockParameters): boolean {
  if (b === t) return t % 2 === 0 && !isSquare(r - lambda);
  if (lambda === 2 && r === k + 2) return isRuledOut({ t: b + 1, k: r, b: b + 1, r, lambda });
  return false;
}

const isSquare = (n: number): boolean => Number.isInteger(Math.sqrt(n));
