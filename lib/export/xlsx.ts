import 'server-only';
import writeExcelFile from 'write-excel-file/node';
import type { Cell, Table } from './table';

/** The most characters that a cell may hold. */
const CELL_MAX = 32_767;

/** Characters that XML cannot carry: a file with one is refused as damaged. */
const NOT_XML = /[\u0000-\u0008\u000B\u000C\u000E-\u001F\uFFFE\uFFFF]|[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/g;

/** Words are written as words: a workbook takes nothing for a formula that is not stored as one. */
const cellOf = (value: Cell) =>
  value === null ? null : typeof value === 'number' ? { value, type: Number } : { value: value.replace(NOT_XML, '').slice(0, CELL_MAX), type: String };

/** A workbook with one sheet for each table, its heads bold and standing still. */
export async function xlsxOf(sheets: readonly { name: string; table: Table }[]): Promise<Uint8Array<ArrayBuffer>> {
  const bytes = await writeExcelFile(
    sheets.map(({ name, table }) => ({
      sheet: name,
      data: [table.columns.map((column) => ({ value: column, fontWeight: 'bold' as const })), ...table.rows.map((row) => row.map(cellOf))],
      columns: table.columns.map((column) => ({ width: WIDE.has(column) ? 40 : Math.max(10, column.length + 2) })),
      stickyRowsCount: 1,
    })),
  ).toBuffer();
  return new Uint8Array(bytes);
}

const WIDE = new Set(['text', 'label', 'sample_label']);
