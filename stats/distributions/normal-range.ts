import erfc from '@stdlib/math-base-special-erfc';
import { UnitTable } from './chebyshev';

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

/** Logarithms of the tails, by k; lower tails under −k. */
const tables = new Map<number, UnitTable>();

function tableOf(k: number, upper: boolean): UnitTable {
  const key = upper ? k : -k;
  let table = tables.get(key);
  if (!table) {
    table = new UnitTable((w) => Math.log(integrate(w, k, upper)));
    tables.set(key, table);
  }
  return table;
}

function read(table: UnitTable, w: number, k: number, upper: boolean): number {
  if (w >= WIDEST) return upper ? 0 : 1;
  const log = table.at(w);
  return Math.min(1, upper ? Math.exp(log) : Math.exp(log + (k - 1) * Math.log(w)));
}

/**
 * Tail of the range of k independent standard normals: P(range > w), or P(range ≤ w) with `upper`
 * false. w > 0, k ≥ 2 whole; the caller checks both. Relative error below 1e-11 in either tail.
 * Answers come from a table that is filled piece by piece as widths are asked for.
 */
export function normalRangeTail(w: number, k: number, upper: boolean): number {
  return read(tableOf(k, upper), w, k, upper);
}

/** Σ mass_i · normalRangeTail(q · scale_i): the tail averaged over a scale. */
export function meanRangeTail(q: number, scale: Float64Array, mass: Float64Array, k: number, upper: boolean): number {
  const table = tableOf(k, upper);
  let sum = 0;
  for (let i = 0; i < scale.length; i += 1) sum += mass[i] * read(table, q * scale[i], k, upper);
  return sum;
}
