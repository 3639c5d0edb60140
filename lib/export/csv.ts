import Papa from 'papaparse';

/** Characters that make a spreadsheet take a cell for a formula. */
const FORMULA = /^[=+\-@\t\r]/;

type Cell = string | number | boolean | null;

/**
 * RFC 4180 text, UTF-8 with a byte order mark so that spreadsheets read accents. Text that a spreadsheet
 * would run as a formula gets an apostrophe before it; numbers stay numbers. True and false as TRUE, FALSE.
 */
export function toCsv(columns: readonly string[], rows: readonly (readonly Cell[])[]): string {
  const safe = (cell: Cell) => (typeof cell === 'string' && FORMULA.test(cell) ? `'${cell}` : typeof cell === 'boolean' ? String(cell).toUpperCase() : cell);
  return `\ufeff${Papa.unparse({ fields: [...columns], data: rows.map((row) => row.map(safe)) }, { newline: '\r\n' })}\r\n`;
}
