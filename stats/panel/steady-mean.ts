/** The rounding error of a·b, exactly (Dekker's product with Veltkamp's split). */
function productError(a: number, b: number, product: number): number {
  const split = 134_217_729;
  const ah = split * a - (split * a - a);
  const bh = split * b - (split * b - b);
  const al = a - ah;
  const bl = b - bh;
  return ah * bh - product + ah * bl + al * bh + al * bl;
}

/**
 * Mean rounded once: Neumaier's compensated sum, divided with the remainder carried on. Means of the
 * same scores in another order come out equal and tie, as they should. An empty list gives NaN.
 */
export function steadyMean(values: readonly number[]): number {
  let sum = 0;
  let lost = 0;
  for (const value of values) {
    const next = sum + value;
    lost += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
    sum = next;
  }
  const n = values.length;
  const mean = sum / n;
  const product = mean * n;
  return mean + (sum - product - productError(mean, n, product) + lost) / n;
}
