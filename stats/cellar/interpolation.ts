/** Where a value stands among ascending knots: between `index` and `index + 1`, at `share` of the way. */
export interface Place {
  readonly index: number;
  readonly share: number;
  /** Before the first knot or after the last: `share` is then below 0 or above 1. */
  readonly isOutside: boolean;
}

/** Finds the step of a table that a value falls in; the first or last one for a value outside. */
export function locate(knots: readonly number[], value: number): Place {
  let index = 0;
  while (index < knots.length - 2 && value > knots[index + 1]) index += 1;
  const share = (value - knots[index]) / (knots[index + 1] - knots[index]);
  return { index, share, isOutside: value < knots[0] || value > knots[knots.length - 1] };
}
