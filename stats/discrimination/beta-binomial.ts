import { requireInteger } from '../check';
import { chiSquareSf, logChoose } from '../distributions';
import { StatsError } from '../errors';
import { type Derivatives, maximize } from './beta-binomial-fit';
import { requireChance } from './protocols';

/** Fit of the beta-binomial model to replicated discrimination tests. */
export interface BetaBinomialFit {
  /** Mean of the beta distribution: mean proportion correct (plain) or mean share of distinguishing (corrected). */
  readonly mu: number;
  /** Overdispersion 1/(a + b + 1), from 0 (all people alike) to 1. */
  readonly gamma: number;
  /** Mean proportion correct: mu (plain) or chance + (1 − chance) mu (corrected). */
  readonly pc: number;
  /** Standard errors and covariance from the observed information; null on a boundary. */
  readonly seMu: number | null;
  readonly seGamma: number | null;
  readonly covariance: number | null;
  /** Shape parameters of the beta distribution; null when gamma is 0. */
  readonly alpha: number | null;
  readonly beta: number | null;
  /** The maximum lies on an edge of the parameter space: no overdispersion, or nobody (everybody) distinguishing. */
  readonly boundary: boolean;
  /** Log-likelihood with the binomial coefficients, and without. */
  readonly logLik: number;
  readonly logLikWithoutCoefficients: number;
  /** Log-likelihood of the binomial with the same free mean. */
  readonly logLikBinomial: number;
  /** Log-likelihood of pure guessing; null for the plain model, which knows no chance. */
  readonly logLikGuessing: number | null;
  /** Likelihood ratio of overdispersion: 2 (logLik − logLikBinomial). */
  readonly lrOverdispersion: number;
  /** Its p by χ² with 1 df, and by the half-and-half mixture that is right at the boundary gamma = 0. */
  readonly pOverdispersionChiSquare: number;
  readonly pOverdispersion: number;
  /** Likelihood ratio against pure guessing and its p by χ² with 2 df; null for the plain model. */
  readonly lrDifference: number | null;
  readonly pDifference: number | null;
}

/**
 * Beta-binomial model of replicated tests: person i was right x_i of n_i times.
 * Plain (no `chance`): x_i ~ Bin(n_i, p_i), p_i ~ Beta(a, b). Corrected (with `chance`):
 * p_i = chance + (1 − chance) π_i, π_i ~ Beta(a, b). mu = a/(a + b), gamma = 1/(a + b + 1); the two gammas
 * are on different scales. Maximum likelihood by Newton steps on exact derivatives; estimates to 1e-9 (fewer digits as gamma nears 1).
 * People with n_i = 0 say nothing and are dropped. Throws on arrays of unequal length, fewer than two people,
 * counts that are not whole or x_i > n_i (n_i up to 10 000), nobody tested more than once, chance outside (0, 1).
 * Sources: Ennis & Bi (1998) J. Sensory Stud. 13:389 (plain); Brockhoff (2003) Food Qual. Pref. 14:405 (corrected);
 * Self & Liang (1987) for the mixture.
 */
export function betaBinomial(
  correct: readonly number[],
  n: readonly number[],
  { chance }: { chance?: number } = {},
): BetaBinomialFit {
  const people = check(correct, n);
  if (chance !== undefined) requireChance(chance);
  const right = people.reduce((sum, [x]) => sum + x, 0);
  const total = people.reduce((sum, [, of]) => sum + of, 0);
  const base = chance ?? 0;
  const binomialPc = Math.max(right / total, base);
  const coefficients = people.reduce((sum, [x, of]) => sum + logChoose(of, x), 0);
  const binomial = (p: number) =>
    coefficients + (right > 0 ? right * Math.log(p) : 0) + (right < total ? (total - right) * Math.log1p(-p) : 0);
  const logLikBinomial = binomial(binomialPc);
  const logLikGuessing = chance === undefined ? null : binomial(chance);

  const startMu = (binomialPc - base) / (1 - base);
  const best = maximize(people, base, startMu);
  const boundary = !best || best.logLik + coefficients <= logLikBinomial + 1e-9;
  const logLik = boundary ? logLikBinomial : best.logLik + coefficients;
  const mu = boundary ? startMu : best.mu;
  const gamma = boundary ? 0 : best.gamma;
  const covariance = boundary ? null : invert(best.at);
  const sum = gamma > 0 ? 1 / gamma - 1 : null;
  const lr = Math.max(0, 2 * (logLik - logLikBinomial));
  const lrDifference = logLikGuessing === null ? null : Math.max(0, 2 * (logLik - logLikGuessing));
  return {
    mu,
    gamma,
    pc: base + (1 - base) * mu,
    seMu: covariance && Math.sqrt(covariance[0]),
    seGamma: covariance && Math.sqrt(covariance[2]),
    covariance: covariance && covariance[1],
    alpha: sum === null ? null : mu * sum,
    beta: sum === null ? null : (1 - mu) * sum,
    boundary,
    logLik,
    logLikWithoutCoefficients: logLik - coefficients,
    logLikBinomial,
    logLikGuessing,
    lrOverdispersion: lr,
    pOverdispersionChiSquare: chiSquareSf(lr, 1),
    pOverdispersion: chiSquareSf(lr, 1) / 2,
    lrDifference,
    pDifference: lrDifference === null ? null : chiSquareSf(lrDifference, 2),
  };
}

function check(correct: readonly number[], n: readonly number[]): [number, number][] {
  if (correct.length !== n.length) throw new StatsError('shape', 'There must be one number of tests for every number correct');
  const people: [number, number][] = [];
  correct.forEach((x, i) => {
    requireInteger(n[i], 'number of tests', 0, 10_000);
    requireInteger(x, 'number correct', 0, n[i]);
    if (n[i] > 0) people.push([x, n[i]]);
  });
  if (people.length < 2) throw new StatsError('too_few', 'The beta-binomial model needs at least two people');
  if (people.every(([, of]) => of === 1)) {
    throw new StatsError('not_estimable', 'Overdispersion needs people who tasted more than once');
  }
  return people;
}

/** Inverse of minus the Hessian; null when it is not positive definite. */
function invert({ mm, mg, gg }: Derivatives): [number, number, number] | null {
  const determinant = mm * gg - mg * mg;
  if (!(mm < 0) || !(determinant > 0)) return null;
  return [-gg / determinant, mg / determinant, -mm / determinant];
}
