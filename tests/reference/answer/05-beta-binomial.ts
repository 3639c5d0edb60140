import { betaBinomial, type BetaBinomialFit } from '@/stats';
import type { Answerer } from './types';

/** What both models are asked for. */
const asked = (fit: BetaBinomialFit) => ({
  mu: fit.mu,
  gamma: fit.gamma,
  se_mu: fit.seMu,
  se_gamma: fit.seGamma,
  cov_mu_gamma: fit.covariance,
  alpha: fit.alpha,
  beta: fit.beta,
  logLik: fit.logLik,
  logLik_without_binomial_coefficients: fit.logLikWithoutCoefficients,
  logLik_binomial: fit.logLikBinomial,
  LR_overdispersion: fit.lrOverdispersion,
  p_overdispersion_chisq1: fit.pOverdispersionChiSquare,
  p_overdispersion_boundary_mixture: fit.pOverdispersion,
});

export const answers: Answerer[] = [
  {
    matches: (c) => c.file.startsWith('05') && 'rows_with_set' in c.inputs && 'p0' in c.inputs,
    answer(c, load) {
      const { columns, rows_with_set: set, p0 } = c.inputs as { columns: [string, string]; rows_with_set: string; p0: number };
      const rows = load(c.data!).rows.filter((row) => row.set === set);
      const [correct, n] = columns.map((name) => rows.map((row) => Number(row[name]))) as [number[], number[]];
      const chance = Math.abs(p0 - 1 / 3) < 1e-9 ? 1 / 3 : p0;
      const corrected = betaBinomial(correct, n, { chance });
      return {
        standard: asked(betaBinomial(correct, n)),
        chance_corrected: { ...asked(corrected), pc: corrected.pc, logLik_guessing: corrected.logLikGuessing, LR_difference_vs_guessing: corrected.lrDifference, p_difference_chisq2: corrected.pDifference },
      };
    },
  },
];
