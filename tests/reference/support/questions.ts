/**
 * Some reference tables print their questions beside their answers, inside `expected`. This list says, per
 * file family and by the name of the object they stand in, which keys are questions. Only these are handed
 * to the answering code; everything else of `expected` stays hidden.
 */
const QUESTIONS: Readonly<Record<string, Readonly<Record<string, readonly string[]>>>> = {
  '01': {
    cdf: ['z', 't', 'df', 'x', 'a', 'b', 'q', 'k'],
    upper_tail: ['F', 'df1', 'df2', 'x', 'df'],
    quantile: ['p', 'df', 'df1', 'df2', 'a', 'b'],
    quantiles: ['p', 'k', 'df'],
    rows: ['x'],
  },
  '02': { rows: ['method', 'd_prime', 'alpha', 'beta', 'pd', 'power'] },
  '03': { rows: ['p0_text', 'x', 'n'] },
  '04': { '*': ['d_prime'], rows: ['method', 'x', 'n'] },
  '06': { rows: ['k', 'n'], page: ['predicted_order_lowest_first'] },
  '07': { rows: ['b', 'c'] },
  '15': { rows: ['t', 'k', 'r'] },
  '16': {
    molecular: ['free_mg_L', 'pH', 'pKa'],
    free_needed: ['target_molecular_mg_L', 'pH', 'pKa'],
    from_density: ['density_kg_m3'],
    from_abv: ['abv_percent'],
    kms_g: ['dose_mg_L', 'volume_L'],
    blends: ['components'],
    pearson_square: ['low', 'high', 'target'],
    '': ['temperature_C', 'abv'],
  },
};

/** Objects of `expected` whose very names are the question, kept as empty objects. */
const NAMED = [/^wine\d/, /^fortify_/];

/** The questions of a case, in the shape of `expected`; undefined when it holds none. */
export function questionsOf(file: string, expected: unknown): unknown {
  const spec = QUESTIONS[file.slice(0, 2)];
  return spec ? pick(expected, '', spec) : undefined;
}

function pick(value: unknown, parent: string, spec: Readonly<Record<string, readonly string[]>>): unknown {
  if (Array.isArray(value)) {
    const items = value.map((item) => pick(item, parent, spec));
    return items.some((item) => item !== undefined) ? items : undefined;
  }
  if (value === null || typeof value !== 'object') return undefined;
  const keys = spec[parent] ?? (parent === '' ? [] : (spec['*'] ?? []));
  const kept: Record<string, unknown> = {};
  for (const [key, inner] of Object.entries(value)) {
    if (NAMED.some((name) => name.test(key))) kept[key] = {};
    else if (keys.includes(key)) kept[key] = structuredClone(inner);
    else {
      const deeper = pick(inner, key, spec);
      if (deeper !== undefined) kept[key] = deeper;
    }
  }
  return Object.keys(kept).length > 0 ? kept : undefined;
}
