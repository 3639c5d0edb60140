import { readFileSync } from 'node:fs';
import path from 'node:path';

const CASES = path.resolve('tests/reference/cases');

/** One judge's score of one bottle: four treatments, two bottles (replicates) of each. */
export interface WineScore {
  judge: number;
  product: number;
  replicate: number;
  response: number;
  rating: number;
}

export const TREATMENTS = ['cold_no', 'cold_yes', 'warm_no', 'warm_yes'] as const;

/**
 * The wine bitterness panel: Randall (1989), Biometrical Journal 31:781, from R's package ordinal
 * (`wine`, GPL >= 2). Nine judges × four treatments × two bottles.
 */
export function wineScores(): WineScore[] {
  const [head, ...rows] = readFileSync(path.join(CASES, 'data_wine_bitterness.csv'), 'utf8').trim().split('\n');
  const columns = head!.trim().split(',');
  return rows.map((row) => {
    const cells = row.trim().split(',');
    const cell = (name: string) => cells[columns.indexOf(name)]!;
    return {
      judge: Number(cell('judge').slice(1)), product: TREATMENTS.indexOf(cell('product') as (typeof TREATMENTS)[number]) + 1, replicate: Number(cell('rep')),
      response: Number(cell('response')), rating: Number(cell('rating')),
    };
  });
}

interface ReferenceCase {
  case: string;
  data: string | null;
  inputs: Record<string, unknown>;
  // Shapes differ by case: the tests know which fields they read.
  // eslint-disable-next-line @typescript-eslint/no-explicit-any
  expected: any;
}

/** The reference answers on this data set in one of the case files, computed in R 4.2.2. */
export function wineCase(file: string, fits: (found: ReferenceCase) => boolean = () => true): ReferenceCase {
  const cases = JSON.parse(readFileSync(path.join(CASES, file), 'utf8')) as ReferenceCase[];
  const found = cases.find((c) => c.data === 'data_wine_bitterness.csv' && fits(c));
  if (!found) throw new Error(`no wine case in ${file}`);
  return found;
}
