/** What went wrong in a statistic, so that a screen can say it in words. */
export type StatsErrorCode =
  | 'empty'
  | 'too_few'
  | 'not_finite'
  | 'out_of_range'
  | 'not_integer'
  | 'shape'
  | 'constant'
  | 'not_balanced'
  | 'not_estimable'
  | 'no_convergence';

/**
 * Thrown by every function in `stats/` on input it cannot answer for.
 * `message` is a plain English sentence that names the input and what is wrong with it.
 */
export class StatsError extends Error {
  readonly code: StatsErrorCode;
  constructor(code: StatsErrorCode, message: string) {
    super(message);
    this.name = 'StatsError';
    this.code = code;
  }
}
