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
 * Mean of value(0) … value(count − 1), rounded once: Neumaier's compensated sum, divided with the remainder
 * carried on. Means of the same scores in another order come out equal and tie, as they should. No values give NaN.
 */
export function steadyMeanOf(count: number, value: (at: number) => number): number {
  let sum = 0;
  let lost = 0;
  for (let at = 0; at < count; at += 1) {
    const own = value(at);
    const next = sum + own;
    lost += Math.abs(sum) >= Math.abs(own) ? sum - next + own : own - next + sum;
    sum = next;
  }
  const mean = sum / count;
  const product = mean * count;
  return mean + (sum - product - productError(mean, count, product) + lost) / count;
}

/** The mean of a list, as {@link steadyMeanOf} takes it. */
export function steadyMean(values: ArrayLike<number>): number {
  return steadyMeanOf(values.length, (at) => values[at]);
}
