import { requireFinite } from '../check';
import { gaussLegendre, normalCdf, normalPdf } from '../distributions';
import { StatsError } from '../errors';
import { CHANCE, type Protocol } from './protocols';

/** Protocols that have a Thurstone model here. */
export type ThurstoneProtocol = Exclude<Protocol, 'two_out_of_five'>;

const SQRT2 = Math.SQRT2;
const SQRT6 = Math.sqrt(6);

/** Φ(x) − Φ(−x), without losing digits near x = 0. */
function central(x: number): number {
  if (Math.abs(x) > 0.5) return 1 - 2 * normalCdf(-x);
  // Power series of the error function: 2 φ(0) Σ (−1)^i x^(2i+1) / (2^i i! (2i+1)).
  let term = x;
  let sum = x;
  for (let i = 1; i < 40; i += 1) {
    term *= (-x * x) / (2 * i);
    const next = sum + term / (2 * i + 1);
    if (next === sum) break;
    sum = next;
  }
  return 2 * normalPdf(0) * sum;
}

/**
 * The derivative of the proportion correct in d′. Every one has a closed form, because the product of two
 * normal densities is a normal density.
 */
const SLOPE: Readonly<Record<ThurstoneProtocol, (d: number) => number>> = {
  triangle: (d) => (Math.exp((-d * d) / 12) * central(d / SQRT2)) / Math.sqrt(3 * Math.PI),
  duo_trio: (d) => (normalPdf(d / SQRT2) / SQRT2) * central(d / SQRT6) + (normalPdf(d / SQRT6) / SQRT6) * central(d / SQRT2),
  two_afc: (d) => normalPdf(d / SQRT2) / SQRT2,
  three_afc: (d) => SQRT2 * normalPdf(d / SQRT2) * normalCdf(d / SQRT6),
  tetrad: (d) => 2 * SQRT2 * normalPdf(d / SQRT2) * central(d / SQRT6),
};

/** Beyond this difference every proportion correct is 1 to the last digit. */
const FAR = 40;
const PANEL = 2.5;

function check(protocol: ThurstoneProtocol, dPrime: number): void {
  requireFinite(dPrime, 'd-prime');
  if (dPrime < 0) throw new StatsError('out_of_range', 'd-prime must not be below zero');
  if (!(protocol in SLOPE)) throw new StatsError('out_of_range', 'This protocol has no Thurstone model here');
}

/**
 * Proportion correct pc(d′) of a discrimination test when the two products lie d′ standard deviations
 * apart (d′ ≥ 0), one dimension, equal normal variances.
 * triangle 2 ∫₀^∞ [Φ(−z√3 + d√⅔) + Φ(−z√3 − d√⅔)] φ(z) dz; duo-trio 1 − Φ(d/√2) − Φ(d/√6) + 2 Φ(d/√2) Φ(d/√6);
 * 2-AFC Φ(d/√2); 3-AFC ∫ Φ(z)² φ(z − d) dz; tetrad 1 − 2 ∫ φ(z) [2 Φ(z) Φ(z − d) − Φ(z − d)²] dz.
 * Computed as chance plus the integral of the closed slope, relative error below 1e-13.
 * Throws on d′ negative or not finite. Sources: Thurstone (1927); Ennis (1993) J. Sensory Stud. 8:353;
 * ISO 4120 and ISO 10399 for the decision rules.
 */
export function proportionCorrect(protocol: ThurstoneProtocol, dPrime: number): number {
  check(protocol, dPrime);
  if (protocol === 'two_afc') return normalCdf(dPrime / SQRT2);
  const slope = SLOPE[protocol];
  const end = Math.min(dPrime, FAR);
  const { nodes, weights } = gaussLegendre(16);
  const panels = Math.max(1, Math.ceil(end / PANEL));
  const half = end / panels / 2;
  let gain = 0;
  for (let panel = 0; panel < panels; panel += 1) {
    const middle = (2 * panel + 1) * half;
    for (let i = 0; i < nodes.length; i += 1) gain += weights[i] * slope(middle + half * nodes[i]);
  }
  return Math.min(1, CHANCE[protocol] + gain * half);
}

/**
 * Slope of the psychometric function, d pc / d d′, at d′ ≥ 0. It is 0 at d′ = 0 for triangle, duo-trio and
 * tetrad, not for the forced-choice tests. Closed form, relative error below 1e-14. Throws as {@link proportionCorrect}.
 */
export function psychometricSlope(protocol: ThurstoneProtocol, dPrime: number): number {
  check(protocol, dPrime);
  return SLOPE[protocol](dPrime);
}

/**
 * The d′ ≥ 0 that gives a proportion correct pc in [0, 1]: 0 when pc is at or below chance, Infinity when pc is 1.
 * Throws on pc outside [0, 1]. Newton steps inside a bracket; relative error below 1e-12 where the slope is
 * not small (d′ above 0.1 or so; near 0 the triangle, duo-trio and tetrad are flat and digits are lost).
 */
export function inversePsychometric(protocol: ThurstoneProtocol, pc: number): number {
  check(protocol, 0);
  requireFinite(pc, 'proportion correct');
  if (pc < 0 || pc > 1) throw new StatsError('out_of_range', 'proportion correct must lie between 0 and 1');
  if (pc <= CHANCE[protocol]) return 0;
  if (pc === 1) return Infinity;
  let low = 0;
  let high = 1;
  while (high < FAR && proportionCorrect(protocol, high) < pc) {
    low = high;
    high *= 1.5;
  }
  let d = (low + high) / 2;
  for (let i = 0; i < 200; i += 1) {
    const miss = proportionCorrect(protocol, d) - pc;
    if (miss === 0) return d;
    if (miss > 0) high = d;
    else low = d;
    let next = d - miss / SLOPE[protocol](d);
    if (!(next > low && next < high)) next = (low + high) / 2;
    if (Math.abs(next - d) <= 1e-14 * Math.max(d, 1e-3)) return next;
    d = next;
  }
  return d;
}
