import { StatsError } from '../errors';

/** An ellipse in a plane of two axes. */
export interface Ellipse {
  centre: [number, number];
  /** Half the length and half the width. */
  semiMajor: number;
  semiMinor: number;
  /** Angle of the long axis from the first axis, radians in (-pi/2, pi/2]. */
  angle: number;
}

/**
 * The ellipse of a cloud of points that holds a share of them: shape from their covariance, size from the distances seen.
 *
 * No normal distribution is assumed: the size is the `level` quantile of the points' own Mahalanobis distances.
 *
 * @param x first coordinates. @param y second coordinates, as many; at least three points. @param level in (0, 1).
 * @throws StatsError `too_few`. A cloud on a line, or on one point, gives an ellipse of no width.
 */
export function cloudEllipse(x: ArrayLike<number>, y: ArrayLike<number>, level: number): Ellipse {
  const n = x.length;
  if (n < 3 || y.length !== n) throw new StatsError('too_few', 'An ellipse needs at least three points');
  let mx = 0;
  let my = 0;
  for (let i = 0; i < n; i += 1) {
    mx += x[i] / n;
    my += y[i] / n;
  }
  let sxx = 0;
  let sxy = 0;
  let syy = 0;
  for (let i = 0; i < n; i += 1) {
    sxx += (x[i] - mx) ** 2 / (n - 1);
    sxy += ((x[i] - mx) * (y[i] - my)) / (n - 1);
    syy += (y[i] - my) ** 2 / (n - 1);
  }
  const half = (sxx + syy) / 2;
  const root = Math.hypot((sxx - syy) / 2, sxy);
  const large = half + root;
  const small = Math.max(0, half - root);
  const angle = Math.atan2(2 * sxy, sxx - syy) / 2;
  const cos = Math.cos(angle);
  const sin = Math.sin(angle);
  const flat = small <= 1e-18 * large;
  const distances = new Float64Array(n);
  for (let i = 0; i < n; i += 1) {
    const along = (x[i] - mx) * cos + (y[i] - my) * sin;
    const across = (y[i] - my) * cos - (x[i] - mx) * sin;
    distances[i] = large > 0 ? (along * along) / large + (flat ? 0 : (across * across) / small) : 0;
  }
  distances.sort();
  const size = Math.sqrt(distances[Math.min(n - 1, Math.ceil(level * n) - 1)]);
  return { centre: [mx, my], semiMajor: size * Math.sqrt(large), semiMinor: flat ? 0 : size * Math.sqrt(small), angle };
}
