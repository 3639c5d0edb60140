import { requireFiniteArray } from '../check';
import { StatsError } from '../errors';
import { pearson } from './pearson';

export interface LinConcordance {
  /** With variances over n (Lin 1989). */
  readonly ccc: number;
  /** With variances over n − 1. */
  readonly cccUnbiased: number;
  readonly pearson: number;
  /** C_b: how far the best line lies from the 45° line; ccc = pearson · C_b. */
  readonly biasCorrection: number;
  /** σ_x / σ_y. */
  readonly scaleShift: number;
  /** (μ_x − μ_y) / √(σ_x σ_y). */
  readonly locationShift: number;
}

/**
 * Lin's concordance correlation of paired values: agreement in level and spread, not only in order.
 * @throws StatsError `shape`, `too_few` (under two pairs), `constant` (either list)
 * Source: Lin (1989), Biometrics 45:255.
 */
export function linConcordance(x: ArrayLike<number>, y: ArrayLike<number>): LinConcordance {
  if (x.length !== y.length) throw new StatsError('shape', 'The two lists must be equally long');
  requireFiniteArray(x, 'first list');
  requireFiniteArray(y, 'second list');
  const n = x.length;
  if (n < 2) throw new StatsError('too_few', 'Concordance needs at least two pairs');
  const r = pearson(x, y);
  if (r === null) throw new StatsError('constant', 'A list is constant, so concordance is not defined');
  const mean = (list: ArrayLike<number>) => Array.from(list).reduce((sum, value) => sum + value / n, 0);
  const [mx, my] = [mean(x), mean(y)];
  let sxx = 0;
  let syy = 0;
  let sxy = 0;
  for (let i = 0; i < n; i += 1) {
    sxx += (x[i] - mx) ** 2;
    syy += (y[i] - my) ** 2;
    sxy += (x[i] - mx) * (y[i] - my);
  }
  const shift = (mx - my) ** 2;
  const ccc = (over: number) => (2 * sxy) / over / (sxx / over + syy / over + shift);
  return {
    ccc: ccc(n),
    cccUnbiased: ccc(n - 1),
    pearson: r,
    biasCorrection: ccc(n) / r,
    scaleShift: Math.sqrt(sxx / syy),
    locationShift: (mx - my) / Math.sqrt(Math.sqrt((sxx / n) * (syy / n))),
  };
}
