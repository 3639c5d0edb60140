/** A cell of a table to be written to a file; null is an empty cell. */
export type Cell = string | number | null;

/** A table under one name for each column. */
export interface Table {
  columns: readonly string[];
  rows: readonly (readonly Cell[])[];
}
