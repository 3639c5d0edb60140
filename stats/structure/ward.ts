import { requireInteger } from '../check';
import { StatsError } from '../errors';
import { toMatrix } from './svd';

/** One joining of two clusters. Clusters 0..n-1 are the objects; the joining at place i makes cluster n + i. */
export interface WardMerge {
  a: number;
  b: number;
  /** sqrt(2 x the rise in the sum of squares within clusters); the plain distance for two single objects. */
  height: number;
  /** Objects in the new cluster. */
  size: number;
}

const MOST_OBJECTS = 5000;

/**
 * Ward's minimum-variance clustering of objects, joining the two clusters whose union adds least to the sum of squares.
 *
 * Euclidean distances between the rows; scale the variables first if their units differ. Heights rise from joining to
 * joining and are those of R's hclust "ward.D2" and of SciPy. A nearest-neighbour chain finds them in n^2 p steps.
 *
 * @param table rows = objects, columns = variables or map coordinates; no missing values. At most 5000 objects.
 * @returns n - 1 joinings in rising order of height (ties in an order that repeats); none for one object.
 * @throws StatsError `empty`, `shape`, `not_finite`, `out_of_range` (too many objects, or squares overflow).
 * Source: Ward (1963) J. Am. Stat. Assoc. 58:236; Murtagh & Legendre (2014) J. Classif. 31:274. Checked against SciPy
 * 1.17 to 1e-12.
 */
export function wardClusters(table: ReadonlyArray<ArrayLike<number>>): WardMerge[] {
  const matrix = toMatrix(table, 'The table');
  const { rows: n, columns: p } = matrix;
  if (n > MOST_OBJECTS) throw new StatsError('out_of_range', `At most ${MOST_OBJECTS} objects can be clustered`);
  const centres: Float64Array[] = Array.from({ length: n }, (_, i) => Float64Array.from(matrix.getRow(i)));
  const sizes = new Array<number>(n).fill(1);
  const active = new Set<number>(centres.keys());
  const chain: number[] = [];
  const joins: { a: number; b: number; height: number }[] = [];
  const distance = (a: number, b: number): number => {
    let squares = 0;
    for (let j = 0; j < p; j += 1) squares += (centres[a][j] - centres[b][j]) ** 2;
    return ((2 * sizes[a] * sizes[b]) / (sizes[a] + sizes[b])) * squares;
  };
  while (active.size > 1) {
    if (chain.length === 0) chain.push(active.values().next().value as number);
    const top = chain[chain.length - 1];
    const before = chain.length > 1 ? chain[chain.length - 2] : -1;
    let nearest = before;
    let least = before >= 0 ? distance(top, before) : Infinity;
    for (const other of active) {
      if (other === top || other === before) continue;
      const d = distance(top, other);
      if (d < least) {
        least = d;
        nearest = other;
      }
    }
    if (!Number.isFinite(least)) throw new StatsError('out_of_range', 'The values are too large to compute with');
    if (nearest !== before) {
      chain.push(nearest);
      continue;
    }
    chain.length -= 2;
    joins.push({ a: top, b: before, height: Math.sqrt(least) });
    // The cluster keeps the number of one of its members; they are renumbered in order of height below.
    const size = sizes[top] + sizes[before];
    for (let j = 0; j < p; j += 1) {
      centres[before][j] = (sizes[top] * centres[top][j] + sizes[before] * centres[before][j]) / size;
    }
    sizes[before] = size;
    active.delete(top);
  }
  return renumber(joins, n);
}

function renumber(joins: { a: number; b: number; height: number }[], n: number): WardMerge[] {
  const order = joins.map((join, i) => ({ ...join, i })).sort((x, y) => x.height - y.height || x.i - y.i);
  const parent = Array.from({ length: n }, (_, i) => i);
  const cluster = Array.from({ length: n }, (_, i) => i);
  const size = new Array<number>(n).fill(1);
  const find = (i: number): number => {
    while (parent[i] !== i) {
      parent[i] = parent[parent[i]];
      i = parent[i];
    }
    return i;
  };
  return order.map(({ a, b, height }, i) => {
    const x = find(a);
    const y = find(b);
    const pair = [cluster[x], cluster[y]].sort((s, t) => s - t);
    parent[y] = x;
    size[x] += size[y];
    cluster[x] = n + i;
    return { a: pair[0], b: pair[1], height, size: size[x] };
  });
}

/**
 * Cuts a tree of joinings into a number of clusters.
 *
 * @param merges the joinings of {@link wardClusters}. @param clusters how many, from 1 to the number of objects.
 * @returns for each object the number of its cluster from 0, in the order in which clusters first appear.
 * @throws StatsError `not_integer`, `out_of_range`.
 */
export function cutTree(merges: ReadonlyArray<WardMerge>, clusters: number): number[] {
  const n = merges.length + 1;
  requireInteger(clusters, 'The number of clusters', 1, n);
  const label = Array.from({ length: 2 * n - 1 }, (_, i) => i);
  // From the last joining that is kept down, each member takes the number of the cluster it went into.
  for (let i = n - clusters - 1; i >= 0; i -= 1) {
    label[merges[i].a] = label[n + i];
    label[merges[i].b] = label[n + i];
  }
  const names = new Map<number, number>();
  return label.slice(0, n).map((root) => {
    const name = names.get(root) ?? names.size;
    names.set(root, name);
    return name;
  });
}
