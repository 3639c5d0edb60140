import type { Query } from './schema';

/** Field names of the page's three forms; they share one address. */
export const FORM_FIELDS = {
  choose: ['question', 'samples', 'wine', 'people', 'strong', 'size', 'serving', 'glass', 'rest'],
  panel: ['protocol', 'aim', 'alpha', 'beta', 'by', 'pd', 'dprime', 'sided', 'replicates', 'panel'],
  profile: ['repeat', 'disagree', 'tasters', 'wines', 'times', 'palpha', 'rule'],
} as const;
export type PlannerForm = keyof typeof FORM_FIELDS;

/** The part of an address that belongs to a form, and the part that belongs to the others. Strange names are dropped. */
export function splitQuery(query: Query, form: PlannerForm): { own: Query; others: Query } {
  const pick = (names: readonly string[]): Query => Object.fromEntries(names.filter((name) => query[name] !== undefined).map((name) => [name, query[name]]));
  const others = (Object.keys(FORM_FIELDS) as PlannerForm[]).filter((other) => other !== form).flatMap((other) => FORM_FIELDS[other]);
  return { own: pick(FORM_FIELDS[form]), others: pick(others) };
}
