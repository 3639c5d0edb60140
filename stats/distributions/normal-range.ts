import erfc from '@stdlib/math-base-special-erfc';

const LOW = -8.75;
const HIGH = 32;
const INV_SQRT_2PI = 0.3989422804014327;

interface Grid {
  readonly step: number;
  /** φ(z)·step at LOW + j·step. */
  readonly phi: Float64Array;
  /** Φ(z) there. */
  readonly cdf: Float64Array;
}

function makeGrid(step: number): Grid {
  const size = Math.round((HIGH - LOW) / step) + 1;
  const phi = new Float64Array(size);
  const cdf = new Float64Array(size);
  for (let j = 0; j < size; j += 1) {
    const z = LOW + j * step;
    phi[j] = step * INV_SQRT_2PI * Math.exp(-0.5 * z * z);
    cdf[j] = 0.5 * erfc(-z * Math.SQRT1_2);
  }
  return { step, phi, cdf };
}

/** The trapezoidal rule converges exponentially here; many means make the integrand narrow. */
const coarse = makeGrid(0.25);
let fine: Grid | undefined;

/**
 * P(range of k standard normals > w), or ≤ w with `upper` false, for w > 0. From the largest value z:
 * k ∫ φ(z) [Φ(z) − Φ(z − w)]^(k−1) dz, whose complement is k ∫ φ(z) {Φ(z)^(k−1) − [Φ(z) − Φ(z − w)]^(k−1)} dz.
 * The lower tail falls as w^(k−1) near 0 and is given without that factor.
 */
function integrate(w: number, k: number, upper: boolean): number {
  const { step, phi, cdf } = k <= 16 ? coarse : (fine ??= makeGrid(0.0625));
  // Past z = 9 the density is below 1e-18; far tails peak near w/2.
  const last = Math.min(phi.length - 1, Math.ceil((Math.max(9, w / 2 + 6) - LOW) / step));
  const m = k - 1;
  let sum = 0;
  for (let j = 0; j <= last; j += 1) {
    const whole = cdf[j];
    const below = 0.5 * erfc((w - (LOW + j * step)) * Math.SQRT1_2);
    if (upper) {
      const ratio = below / whole;
      const share = ratio < 1 ? -Math.expm1(m * Math.log1p(-ratio)) : 1;
      sum += phi[j] * Math.pow(whole, m) * share;
    } else if (whole > below) sum += phi[j] * Math.pow((whole - below) / w, m);
  }
  return k * sum;
}

/** Past this width the tail is below 1e-270; the table ends. */
const WIDEST = 50;
const DEGREE = 16;

/** Chebyshev coefficients of the logarithm of a tail on [i, i + 1), made when first asked for. */
type Table = (Float64Array | undefined)[];
const tables = new Map<number, Table>();

function fit(cell: number, k: number, upper: boolean): Float64Array {
  const values = new Float64Array(DEGREE);
  for (let i = 0; i < DEGREE; i += 1) {
    const w = cell + 0.5 + 0.5 * Math.cos((Math.PI * (i + 0.5)) / DEGREE);
    values[i] = Math.log(integrate(w, k, upper));
  }
  const coefficients = new Float64Array(DEGREE);
  for (let j = 0; j < DEGREE; j += 1) {
    let sum = 0;
    for (let i = 0; i < DEGREE; i += 1) sum += values[i] * Math.cos((Math.PI * j * (i + 0.5)) / DEGREE);
    coefficients[j] = ((j === 0 ? 1 : 2) * sum) / DEGREE;
  }
  return coefficients;
}

/**
 * Tail of the range of k independent standard normals: P(range > w), or P(range ≤ w) with `upper`
 * false. w > 0, k ≥ 2 whole; the caller checks both. Relative error below 1e-11 in either tail.
 * Answers come from a table that is filled piece by piece as widths are asked for.
 */
export function normalRangeTail(w: number, k: number, upper: boolean): number {
  if (w >= WIDEST) return upper ? 0 : 1;
  const key = upper ? k : -k;
  let table = tables.get(key);
  if (!table) {
    table = new Array<Float64Array | undefined>(WIDEST).fill(undefined);
    tables.set(key, table);
  }
  const cell = Math.floor(w);
  const c = (table[cell] ??= fit(cell, k, upper));
  const x = 2 * (w - cell) - 1;
  let b1 = 0;
  let b2 = 0;
  for (let j = DEGREE - 1; j >= 1; j -= 1) {
    const b0 = 2 * x * b1 - b2 + c[j];
    b2 = b1;
    b1 = b0;
  }
  const log = x * b1 - b2 + c[0];
  return Math.min(1, upper ? Math.exp(log) : Math.exp(log + (k - 1) * Math.log(w)));
}
