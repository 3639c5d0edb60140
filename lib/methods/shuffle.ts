import type { Draw } from './types';

/** The items in an order drawn afresh (Fisher and Yates); the given array stays as it is. */
export function shuffled<T>(items: readonly T[], draw: Draw): T[] {
  const result = [...items];
  for (let i = result.length - 1; i > 0; i -= 1) {
    const j = draw(i + 1);
    [result[i], result[j]] = [result[j]!, result[i]!];
  }
  return result;
}
