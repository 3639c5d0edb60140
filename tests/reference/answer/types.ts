/** One reference case as it stands in a file of the folder. */
export interface Case {
  readonly case: string;
  readonly source: string;
  readonly data: string | null;
  readonly inputs: Readonly<Record<string, unknown>>;
  readonly expected: unknown;
  readonly tolerance: Tolerance;
}

export interface Tolerance {
  readonly rel?: number;
  readonly abs?: number;
  readonly abs_n?: number;
  readonly rel_power?: number;
  readonly note?: string;
}

/**
 * What answering code may see of a case: everything but `expected`. Some tables print their questions
 * (the z, the n and α) beside the answers; `given` holds those questions alone, in the same shape.
 */
export interface CaseInput extends Omit<Case, 'expected'> {
  /** Name of the file the case stands in. */
  readonly file: string;
  readonly given: unknown;
}

/** A CSV of the folder: numbers parsed, empty fields null. */
export interface Table {
  readonly columns: readonly string[];
  readonly rows: readonly Readonly<Record<string, Cell>>[];
}

export type Cell = number | string | null;

/** Answers the cases it recognises by the structure of their inputs. */
export interface Answerer {
  matches(c: CaseInput): boolean;
  answer(c: CaseInput, load: (csv: string) => Table): unknown;
}
