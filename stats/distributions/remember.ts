/**
 * The same function of three numbers with its last `size` answers kept: a table of descriptors asks for the
 * same quantile again and again. Pure functions only; an error is not kept.
 */
export function remember(size: number, compute: (a: number, b: number, c: number) => number): (a: number, b: number, c: number) => number {
  const kept = new Map<string, number>();
  return (a, b, c) => {
    const key = `${a}/${b}/${c}`;
    const known = kept.get(key);
    if (known !== undefined) {
      kept.delete(key);
      kept.set(key, known);
      return known;
    }
    const value = compute(a, b, c);
    if (kept.size >= size) kept.delete(kept.keys().next().value as string);
    kept.set(key, value);
    return value;
  };
}
