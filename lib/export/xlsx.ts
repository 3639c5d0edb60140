import writeXlsxFile, { type Cell, type SheetData } from 'write-excel-file/node';

type Value = string | number | boolean | null;

export interface WorkSheet {
  name: string;
  columns: readonly string[];
  rows: readonly (readonly Value[])[];
}

const cellOf = (value: Value): Cell => (value === null || value === '' ? null : { value, type: typeof value === 'number' ? Number : typeof value === 'boolean' ? Boolean : String });

/** A workbook, one sheet after the other. Text is text in it, never a formula. */
export async function toXlsx(sheets: readonly WorkSheet[]): Promise<Buffer> {
  const data = sheets.map(({ name, columns, rows }) => ({
    sheet: name,
    data: [columns.map((column) => ({ value: column, fontWeight: 'bold' as const })), ...rows.map((row) => row.map(cellOf))] as SheetData,
    stickyRowsCount: 1,
  }));
  return writeXlsxFile(data).toBuffer();
}
