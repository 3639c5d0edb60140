import { caseRows } from './tables';
import type { Cell, CaseInput, Table } from './types';

/** Different values of a column in order of appearance, as text. */
export function values(table: Table, column: string): string[] {
  return [...new Set(table.rows.filter((row) => row[column] !== null).map((row) => String(row[column])))];
}

/** Sums (or means) of a column over the rows that share a pair of labels; null where there is none. */
export function crossTable(
  table: Table,
  by: { rows: string; columns: string; value: string; mean?: boolean },
  columnNames: readonly string[],
  rowNames: readonly string[] = values(table, by.rows),
): (number | null)[][] {
  const sums = rowNames.map(() => columnNames.map(() => ({ sum: 0, n: 0 })));
  const rowAt = new Map(rowNames.map((name, i) => [name, i]));
  const columnAt = new Map(columnNames.map((name, i) => [name, i]));
  for (const row of table.rows) {
    const i = rowAt.get(String(row[by.rows]));
    const j = columnAt.get(String(row[by.columns]));
    const value: Cell = row[by.value];
    if (i === undefined || j === undefined || typeof value !== 'number') continue;
    sums[i][j].sum += value;
    sums[i][j].n += 1;
  }
  return sums.map((line) => line.map(({ sum, n }) => (n === 0 ? null : by.mean ? sum / n : sum)));
}

/**
 * The assessors x products table that a case describes in words: `columns of the file`, or one long column
 * ("column rating: judge x product, sum over …", "column oaky: rows = assessor, columns = product").
 */
export function blockTable(c: CaseInput, load: (csv: string) => Table): { names: string[]; rows: (number | null)[][] } {
  const table = caseRows(c, load);
  const names = (c.inputs.columns as readonly string[]).map(String);
  const words = String(c.inputs.table ?? '');
  const long =
    /column (\S+): rows = (\S+), columns = (\S+)/.exec(words) ?? /column (\S+): (\S+) x (\S+?)(?:,|$)/.exec(words);
  if (!long) return { names, rows: table.rows.map((row) => names.map((name) => row[name] as number | null)) };
  const by = { value: long[1], rows: long[2], columns: long[3], mean: /\b(mean|average)\b/.test(words) };
  return { names, rows: crossTable(table, by, names) };
}

/** Rows without a gap. */
export function complete(rows: (number | null)[][]): number[][] {
  return rows.filter((row): row is number[] => row.every((value) => value !== null));
}

/** Column whose values are exactly these labels. */
export function columnOf(table: Table, labels: readonly string[]): string {
  const wanted = new Set(labels.map(String));
  const found = table.columns.find((column) => {
    const there = values(table, column);
    return there.length === wanted.size && there.every((value) => wanted.has(value));
  });
  if (!found) throw new Error(`no column holds the labels ${labels.join(', ')}`);
  return found;
}

/** Columns that hold nothing but numbers, in order. */
export function numericColumns(table: Table): string[] {
  return table.columns.filter((column) => table.rows.some((row) => row[column] !== null) && table.rows.every((row) => row[column] === null || typeof row[column] === 'number'));
}

/** One products x attributes table of means for each assessor. */
export function tablesByAssessor(table: Table, assessors: readonly string[], products: readonly string[], attributeCount: number): number[][][] {
  const assessor = columnOf(table, assessors);
  const product = columnOf(table, products);
  const attributes = numericColumns(table).slice(-attributeCount);
  const names = products.map(String);
  return assessors.map((who) => {
    const own = { columns: table.columns, rows: table.rows.filter((row) => String(row[assessor]) === String(who)) };
    const perAttribute = attributes.map((attribute) =>
      crossTable(own, { rows: assessor, columns: product, value: attribute, mean: true }, names, [String(who)])[0].map(Number),
    );
    return names.map((_, j) => perAttribute.map((means) => means[j]));
  });
}
