import { requireFiniteArray } from '../check';
import { StatsError } from '../errors';

/**
 * Compact letters: two products share a letter exactly when their difference was not shown. 'a' goes
 * to the highest mean. Works for any pattern of differences, also with unequal n (insert and absorb).
 * @param means one for each product
 * @param shown the pairs whose difference was shown, by product index
 * @returns one string of letters for each product; after 'z' come 'a1', 'b1'…
 * Source: Piepho (2004), J. Computational and Graphical Statistics 13:456.
 */
export function compactLetters(means: ArrayLike<number>, shown: Iterable<readonly [number, number]>): string[] {
  requireFiniteArray(means, 'means');
  const k = means.length;
  let groups: Set<number>[] = [new Set(Array.from({ length: k }, (_, i) => i))];
  for (const [a, b] of shown) {
    if (!(a >= 0 && a < k && b >= 0 && b < k && a !== b)) throw new StatsError('out_of_range', 'A pair names a product that is not there');
    groups = groups.flatMap((group) => (group.has(a) && group.has(b) ? [without(group, a), without(group, b)] : [group]));
    groups = absorb(groups);
  }
  const rank = Array.from({ length: k }, (_, i) => i).sort((x, y) => means[y] - means[x] || x - y);
  const placeOf = new Map(rank.map((product, place) => [product, place]));
  const key = (group: Set<number>) => [...group].map((product) => placeOf.get(product) ?? 0).sort((x, y) => x - y);
  const ordered = groups.map((group) => ({ group, places: key(group) })).sort((x, y) => compareLists(x.places, y.places));
  const letters = Array.from({ length: k }, () => '');
  ordered.forEach(({ group }, index) => {
    for (const product of group) letters[product] += letterOf(index);
  });
  return letters;
}

const letterOf = (index: number): string => String.fromCharCode(97 + (index % 26)) + (index >= 26 ? String(Math.floor(index / 26)) : '');

function without(group: Set<number>, product: number): Set<number> {
  const rest = new Set(group);
  rest.delete(product);
  return rest;
}

/** Drops each group that another one holds wholly. */
function absorb(groups: Set<number>[]): Set<number>[] {
  return groups.filter((group, i) => !groups.some((other, j) => i !== j && holds(other, group) && (other.size > group.size || j < i)));
}

function holds(larger: Set<number>, smaller: Set<number>): boolean {
  if (smaller.size > larger.size) return false;
  for (const product of smaller) if (!larger.has(product)) return false;
  return true;
}

function compareLists(x: number[], y: number[]): number {
  for (let i = 0; i < Math.min(x.length, y.length); i += 1) if (x[i] !== y[i]) return x[i] - y[i];
  return x.length - y.length;
}
