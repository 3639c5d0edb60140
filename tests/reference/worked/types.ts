/** One example of worked-examples.json without its results. */
export interface WorkedInput {
  readonly id: string;
  readonly test: string;
  readonly inputs: Readonly<Record<string, unknown>>;
}

/** Answers examples of its subject. The answer has the keys of both `published` and `verified`. */
export interface WorkedAnswerer {
  matches(example: WorkedInput): boolean;
  answer(example: WorkedInput): Readonly<Record<string, unknown>>;
}
