/** One number of the results. The id says to the script what to compute; `what` says it to people. */
export interface Figure {
  id: string;
  what: string;
  value: number;
}

/** Figures of one thing under one beginning of ids; what has no value is left out. */
export function figuresUnder(id: string, what: string, values: Record<string, number | null | undefined>): Figure[] {
  return Object.entries(values).flatMap(([name, value]) => (value === null || value === undefined || !Number.isFinite(value) ? [] : [{ id: `${id}.${name}`, what: `${what}, ${name.replaceAll('_', ' ')}`, value }]));
}
