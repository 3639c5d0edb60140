import type { Cell, CaseInput, Table } from './types';

/** A table inside a case: equally long columns. */
export type Columns = Readonly<Record<string, readonly (number | string | boolean | null)[]>>;

/** The rows of a case's CSV, kept to those with `inputs.rows_with_set` in column `set`, if the case asks so. */
export function caseRows(c: CaseInput, load: (csv: string) => Table): Table {
  if (!c.data) throw new Error(`${c.case} names no data`);
  const table = load(c.data);
  const set = c.inputs.rows_with_set;
  return set === undefined ? table : { columns: table.columns, rows: table.rows.filter((row) => row.set === set) };
}

/** One column as numbers; throws on text or an empty field. */
export function numbers(table: Table, column: string): number[] {
  return table.rows.map((row) => {
    const value: Cell = row[column];
    if (typeof value !== 'number') throw new Error(`column ${column} holds something that is not a number`);
    return value;
  });
}

/** Answers a table row by row: each named output is computed from the row of questions. */
export function byRow<K extends string>(
  questions: Columns,
  answer: (row: Readonly<Record<string, number | string | boolean | null>>) => Record<K, unknown>,
): Record<string, unknown[]> {
  const names = Object.keys(questions);
  const length = questions[names[0]]?.length ?? 0;
  const result: Record<string, unknown[]> = Object.fromEntries(names.map((name) => [name, [...questions[name]]]));
  for (let i = 0; i < length; i += 1) {
    const row = Object.fromEntries(names.map((name) => [name, questions[name][i]]));
    for (const [name, value] of Object.entries(answer(row))) (result[name] ??= []).push(value);
  }
  return result;
}

/** Property of an unknown value, or undefined when it is no object. */
export function at(value: unknown, ...path: string[]): unknown {
  return path.reduce<unknown>((v, key) => (v && typeof v === 'object' ? (v as Record<string, unknown>)[key] : undefined), value);
}

/** Is there an object at this path of the questions? */
export function has(c: CaseInput, ...path: string[]): boolean {
  return at(c.given, ...path) !== undefined;
}
