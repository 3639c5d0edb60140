import type { Tolerance } from '../answer/types';

/** Outcome of comparing one case: how many single values were looked at, and what was wrong. */
export interface Comparison {
  values: number;
  failures: string[];
}

/** Tables whose columns are axes: they may come out mirrored. */
const AXES = /coordinates|eigenvectors|^scores|loadings|axes_directions/;
/** Words about how the reference was made, which no answer has. */
const REMARKS = new Set([
  'how',
  'local_optima_percent_seen',
  'share_of_starts_at_best',
  'first_start_pct',
]);
/** Below this a probability has left the range of double precision. */
const UNDERFLOW = 1e-300;
const PROBABILITY = /^(p|p_.*|cdf|upper|.*_p)$/;

/** Compares an answer with what is expected, by the rules of the folder's README. */
export function compare(expected: unknown, actual: unknown, tolerance: Tolerance): Comparison {
  const result: Comparison = { values: 0, failures: [] };
  walk(expected, actual, [], { tolerance, result, scale: 0 });
  return result;
}

interface Context {
  readonly tolerance: Tolerance;
  readonly result: Comparison;
  /** Largest number of the array or matrix the value stands in: rounding is measured against it. */
  readonly scale: number;
}

function fail(context: Context, path: readonly string[], expected: unknown, actual: unknown): void {
  context.result.failures.push(`${path.join('.')}: expected ${JSON.stringify(expected)}, got ${show(actual)}`);
}

function show(value: unknown): string {
  return typeof value === 'number' ? String(value) : (JSON.stringify(value) ?? 'nothing');
}

function walk(expected: unknown, actual: unknown, path: readonly string[], context: Context): void {
  if (Array.isArray(expected)) return walkArray(expected, actual, path, context);
  if (expected !== null && typeof expected === 'object') return walkObject(expected, actual, path, context);
  context.result.values += 1;
  if (expected === null) {
    const undefinedHere = actual === null || actual === Infinity || actual === -Infinity;
    if (!undefinedHere) fail(context, path, expected, actual);
  } else if (typeof expected === 'number') {
    if (typeof actual !== 'number' || !near(expected, actual, path, context)) fail(context, path, expected, actual);
  } else if (expected !== actual) fail(context, path, expected, actual);
}

function walkObject(expected: object, actual: unknown, path: readonly string[], context: Context): void {
  if (actual === null || typeof actual !== 'object' || Array.isArray(actual)) return fail(context, path, expected, actual);
  if (/^letters/.test(path.at(-1) ?? '') && Object.values(expected).every((v) => typeof v === 'string')) {
    return walkLetters(expected as Record<string, string>, actual as Record<string, string>, path, context);
  }
  // A variance estimated 0 may be printed as a trace: it is measured against its neighbours.
  const parts = path.at(-1) === 'variance_components' ? Object.values(expected).map(Number) : [];
  const inner = { ...context, scale: Math.max(context.scale, ...parts) };
  for (const [key, value] of Object.entries(expected)) {
    if (REMARKS.has(key)) continue;
    const answer = (actual as Record<string, unknown>)[key];
    if (answer === undefined && typeof value === 'string') continue;
    walk(value, answer, [...path, key], inner);
  }
}

function walkArray(expected: unknown[], actual: unknown, path: readonly string[], context: Context): void {
  if (!Array.isArray(actual) || actual.length !== expected.length) {
    const got = Array.isArray(actual) ? `${actual.length} items` : actual;
    return fail(context, path, `${expected.length} items`, got);
  }
  const numbers = expected.flat(2).filter((v): v is number => typeof v === 'number');
  const scale = Math.max(context.scale, ...numbers.map(Math.abs));
  const matrix = expected.every((row) => Array.isArray(row)) && actual.every((row) => Array.isArray(row));
  const name = path.findLast((key) => !/^\d+$/.test(key)) ?? '';
  const turned = matrix && AXES.test(name) ? mirror(expected as number[][], actual as number[][]) : actual;
  expected.forEach((value, i) => walk(value, turned[i], [...path, String(i)], { ...context, scale }));
}

/** Turns the columns of `actual` that point the other way. */
function mirror(expected: number[][], actual: number[][]): number[][] {
  const signs = (expected[0] ?? []).map((_, axis) => {
    const agreement = expected.reduce((sum, row, i) => sum + row[axis] * (actual[i]?.[axis] ?? 0), 0);
    return agreement < 0 ? -1 : 1;
  });
  return actual.map((row) => row.map((value, axis) => value * (signs[axis] ?? 1)));
}

/** Compact letters say only which products share one. */
function walkLetters(
  expected: Record<string, string>,
  actual: Record<string, string>,
  path: readonly string[],
  context: Context,
): void {
  const share = (a: string, b: string) => [...a].some((letter) => b.includes(letter));
  const products = Object.keys(expected);
  for (let i = 0; i < products.length; i += 1) {
    for (let j = i + 1; j < products.length; j += 1) {
      const [a, b] = [products[i], products[j]];
      context.result.values += 1;
      const wanted = share(expected[a], expected[b]);
      if (share(actual[a] ?? '', actual[b] ?? '') !== wanted) {
        fail(context, [...path, `${a} and ${b}`], wanted ? 'share a letter' : 'share no letter', `${actual[a]}, ${actual[b]}`);
      }
    }
  }
}

function near(expected: number, actual: number, path: readonly string[], context: Context): boolean {
  if (!Number.isFinite(actual)) return false;
  const { rel, abs } = limits(path, context.tolerance);
  const key = path.findLast((part) => !/^\d+$/.test(part)) ?? '';
  // Values that are 0 but for rounding are measured against their neighbours; probabilities never are.
  const rounding = PROBABILITY.test(key) ? UNDERFLOW : Math.max(1e-12 * context.scale, expected === 0 ? 1e-12 : UNDERFLOW);
  return Math.abs(actual - expected) <= Math.max(rel * Math.abs(expected), abs, rounding);
}

/** Tolerance of one value: the case's own, unless its note says otherwise for this field. */
function limits(path: readonly string[], tolerance: Tolerance): { rel: number; abs: number } {
  const key = path.findLast((part) => !/^\d+$/.test(part)) ?? '';
  const note = tolerance.note ?? '';
  if (tolerance.abs_n !== undefined) {
    return /^n(_|$)/.test(key) ? { rel: 0, abs: tolerance.abs_n } : { rel: tolerance.rel_power ?? 0, abs: 0 };
  }
  // Whole numbers are exact; fifteen printed digits of a fraction are all there is.
  if (tolerance.rel === undefined) return { rel: tolerance.abs === 0 ? 1e-14 : 0, abs: tolerance.abs ?? 0 };
  // R's own ptukey, which these come from, is good to 1e-9 and prints 0 below; family 11 says so itself.
  if (/KR values do not|SINGULAR/.test(note) && key.startsWith('p_tukey')) return { rel: tolerance.rel, abs: 1e-9 };
  const named = /(p_\w+):? abs ([\d.]+e-?\d+)/.exec(note);
  if (named && key.startsWith(named[1])) return { rel: tolerance.rel, abs: Number(named[2]) };
  if (/logLik 1e-8, SEs 1e-3/.test(note)) {
    if (key.startsWith('logLik')) return { rel: 1e-8, abs: 0 };
    if (/^(se|cov)_/.test(key)) return { rel: 1e-3, abs: 0 };
  }
  // The several-df Satterthwaite ddf, and the p that follows from it, depend on the contrast basis.
  if (/satterthwaite\.ddf/.test(note) && path.at(-2) === 'satterthwaite') {
    if (key === 'ddf') return { rel: 1e-2, abs: 0 };
    if (key === 'p') return { rel: 5e-2, abs: 0 };
  }
  return { rel: tolerance.rel, abs: tolerance.abs ?? 0 };
}
