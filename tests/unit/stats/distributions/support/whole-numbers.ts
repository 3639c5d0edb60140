/**
 * Binomial probabilities without floating point: entry k is P(X = k) · denominatorⁿ for the success
 * probability numerator / denominator, by Pascal’s rule.
 */
export function wholeProbabilities(n: number, numerator: number, denominator: number): bigint[] {
  const right = BigInt(numerator);
  const wrong = BigInt(denominator - numerator);
  let row = [1n];
  for (let i = 0; i < n; i += 1) {
    const next = Array.from({ length: row.length + 1 }, () => 0n);
    row.forEach((ways, k) => {
      next[k] += ways * wrong;
      next[k + 1] += ways * right;
    });
    row = next;
  }
  return row;
}

/** The sum of the entries from `from` up to, not with, `to`. */
export const total = (values: readonly bigint[], from = 0, to = values.length): bigint => values.slice(from, to).reduce((a, b) => a + b, 0n);

/** a / b to all digits of a double. */
export function ratio(a: bigint, b: bigint): number {
  // The lengths tell the size, so that a tail of 1e-200 keeps its digits.
  const size = Math.max(0, b.toString().length - a.toString().length);
  return Number((a * 10n ** BigInt(40 + size)) / b) / 1e40 / 10 ** size;
}
