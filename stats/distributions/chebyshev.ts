/** Terms of the series: enough for 1e-12 on a unit interval of the logarithm of a tail. */
const TERMS = 16;

/**
 * A function on [0, ∞) read from Chebyshev series on unit intervals, each made when first asked for. Meant
 * for smooth functions that are asked very often; the caller bounds the range.
 */
export class UnitTable {
  private readonly pieces: (Float64Array | undefined)[] = [];
  constructor(private readonly exact: (x: number) => number) {}

  at(x: number): number {
    const cell = Math.floor(x);
    const c = (this.pieces[cell] ??= this.fit(cell));
    const t = 2 * (x - cell) - 1;
    const twice = 2 * t;
    let b1 = 0;
    let b2 = 0;
    for (let j = TERMS - 1; j >= 1; j -= 1) {
      const b0 = twice * b1 - b2 + c[j];
      b2 = b1;
      b1 = b0;
    }
    return t * b1 - b2 + c[0];
  }

  private fit(cell: number): Float64Array {
    const values = new Float64Array(TERMS);
    for (let i = 0; i < TERMS; i += 1) values[i] = this.exact(cell + 0.5 + 0.5 * Math.cos((Math.PI * (i + 0.5)) / TERMS));
    const coefficients = new Float64Array(TERMS);
    for (let j = 0; j < TERMS; j += 1) {
      let sum = 0;
      for (let i = 0; i < TERMS; i += 1) sum += values[i] * Math.cos((Math.PI * j * (i + 0.5)) / TERMS);
      coefficients[j] = ((j === 0 ? 1 : 2) * sum) / TERMS;
    }
    return coefficients;
  }
}
