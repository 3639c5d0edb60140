import { correspondenceAnalysis } from '@/stats';
import { numericColumns, values } from './cross-tables';
import { caseRows } from './tables';
import type { Answerer, CaseInput, Table } from './types';

/** Axes that the reference prints in full. */
const AXES = 3;

/** The table of counts a case describes: the file itself, or ticks summed over the people of a long file. */
function counts(c: CaseInput, load: (csv: string) => Table): { rows: string[]; columns: string[]; table: number[][] } {
  const table = caseRows(c, load);
  const words = String(c.inputs.table);
  const long = /(\w+) x (\w+), summed over (\w+)/.exec(words);
  if (!long) {
    const [label, ...columns] = table.columns;
    return { rows: table.rows.map((row) => String(row[label])), columns, table: table.rows.map((row) => columns.map((column) => Number(row[column]))) };
  }
  const by = long[1];
  const people = long[3].replace(/s$/, '');
  const columns = numericColumns(table).filter((column) => column !== by && column !== people);
  const rows = values(table, by);
  const sum = (name: string, column: string) =>
    table.rows.reduce((total, row) => (String(row[by]) === name ? total + Number(row[column]) : total), 0);
  return { rows, columns, table: rows.map((name) => columns.map((column) => sum(name, column))) };
}

export const answers: Answerer[] = [
  {
    matches: (c) => c.file.startsWith('08') && 'scaling' in c.inputs,
    answer(c, load) {
      const { rows, columns, table } = counts(c, load);
      const ca = correspondenceAnalysis(table);
      const cut = <T>(matrix: T[][]) => matrix.map((row) => row.slice(0, AXES));
      return {
        n: ca.n,
        chisq: ca.chiSquare,
        df: ca.df,
        p: ca.p,
        total_inertia: ca.totalInertia,
        eigenvalues: ca.eigenvalues,
        percent: ca.percent,
        row_labels: rows,
        row_mass: ca.rows.mass,
        row_coordinates: cut(ca.rows.coordinates),
        row_contributions_percent: cut(ca.rows.contributions),
        row_cos2: cut(ca.rows.cos2),
        column_labels: columns,
        column_mass: ca.columns.mass,
        column_coordinates: cut(ca.columns.coordinates),
        column_contributions_percent: cut(ca.columns.contributions),
      };
    },
  },
];
