import { requireInteger } from '../check';

/** Nodes and weights of a quadrature rule on [−1, 1]. */
export interface Quadrature {
  readonly nodes: Float64Array;
  readonly weights: Float64Array;
}

const rules = new Map<number, Quadrature>();

/**
 * Gauss–Legendre rule with n nodes on [−1, 1], 1 ≤ n ≤ 512, exact for polynomials up to degree 2n − 1.
 * Nodes ascend. The rule is kept, so asking again costs nothing; do not write into its arrays.
 * Throws on n that is not whole or out of range. Source: Newton's method on the Legendre
 * three-term recurrence (Abramowitz & Stegun 25.4.29). Nodes and weights to about 1e-15.
 */
export function gaussLegendre(n: number): Quadrature {
  requireInteger(n, 'n', 1, 512);
  const kept = rules.get(n);
  if (kept) return kept;
  const nodes = new Float64Array(n);
  const weights = new Float64Array(n);
  for (let i = 0; i < (n + 1) >> 1; i += 1) {
    let x = Math.cos((Math.PI * (i + 0.75)) / (n + 0.5));
    let slope = 1;
    for (let step = 0; step < 100; step += 1) {
      let previous = 1;
      let current = x;
      for (let j = 2; j <= n; j += 1) {
        const next = ((2 * j - 1) * x * current - (j - 1) * previous) / j;
        previous = current;
        current = next;
      }
      slope = (n * (previous - x * current)) / (1 - x * x);
      const delta = current / slope;
      x -= delta;
      if (Math.abs(delta) < 1e-16) break;
    }
    if (n % 2 === 1 && i === (n - 1) / 2) x = 0;
    const weight = 2 / ((1 - x * x) * slope * slope);
    nodes[i] = -x;
    nodes[n - 1 - i] = x;
    weights[i] = weight;
    weights[n - 1 - i] = weight;
  }
  const rule = { nodes, weights };
  rules.set(n, rule);
  return rule;
}
