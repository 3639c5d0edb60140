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
  let groups: Uint8Array[] = [new Uint8Array(k).fill(1)];
  for (const [a, b] of shown) {
    if (!(a >= 0 && a < k && b >= 0 && b < k && a !== b)) throw new StatsError('out_of_range', 'A pair names a product that is not there');
    groups = split(groups, a, b);
  }
  const rank = Array.from({ length: k }, (_, i) => i).sort((x, y) => means[y] - means[x] || x - y);
  const ordered = groups.map((group) => ({ places: rank.flatMap((product, place) => (group[product] ? [place] : [])) })).sort((x, y) => compareLists(x.places, y.places));
  const letters = Array.from({ length: k }, () => '');
  ordered.forEach(({ places }, index) => {
    for (const place of places) letters[rank[place]] += letterOf(index);
  });
  return letters;
}

const letterOf = (index: number): string => String.fromCharCode(97 + (index % 26)) + (index >= 26 ? String(Math.floor(index / 26)) : '');

/**
 * Splits each group that holds both a and b into one without a and one without b. A new group goes if
 * another holds it wholly; the groups that stayed can't have become part of one.
 */
function split(groups: Uint8Array[], a: number, b: number): Uint8Array[] {
  if (!groups.some((group) => group[a] && group[b])) return groups;
  const stayed = groups.filter((group) => !(group[a] && group[b]));
  const made = groups.flatMap((group) => (group[a] && group[b] ? [without(group, a), without(group, b)] : []));
  const needed = made.filter(
    (group, i) => !stayed.some((other) => holds(other, group)) && !made.some((other, j) => i !== j && holds(other, group) && (j < i || !holds(group, other))),
  );
  return [...stayed, ...needed];
}

function without(group: Uint8Array, product: number): Uint8Array {
  const rest = group.slice();
  rest[product] = 0;
  return rest;
}

function holds(larger: Uint8Array, smaller: Uint8Array): boolean {
  for (let product = 0; product < smaller.length; product += 1) if (smaller[product] && !larger[product]) return false;
  return true;
}

function compareLists(x: number[], y: number[]): number {
  for (let i = 0; i < Math.min(x.length, y.length); i += 1) if (x[i] !== y[i]) return x[i] - y[i];
  return x.length - y.length;
}
