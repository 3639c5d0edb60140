import Papa from 'papaparse';
import type { Table } from './table';

/**
 * Words that a spreadsheet would take for a formula: it may run what a guest has typed. Line feed and the
 * full-width signs are taken for their plain forms by some programs.
 */
const FORMULA = /^[=+\-@\t\r\n＝＋－＠]/;

/** Marks the file as UTF-8 for spreadsheets, which otherwise read it in the code page of the machine. */
const BYTE_ORDER_MARK = '\uFEFF';

/**
 * The table as comma-separated values (RFC 4180: CRLF, quotes doubled) in UTF-8 with a byte-order mark.
 * A word that begins like a formula gets an apostrophe before it; numbers stay numbers.
 */
export function csvOf({ columns, rows }: Table): string {
  const body = Papa.unparse([columns, ...rows].map((row) => [...row]), { escapeFormulae: FORMULA, newline: '\r\n' });
  return `${BYTE_ORDER_MARK}${body}\r\n`;
}
