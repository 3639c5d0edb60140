import { z } from 'zod';
import { PLANNED_PROTOCOLS, QUESTIONS, SIZES, type Choosing } from './types';
import type { DiscriminationQuestion } from './plan-discrimination';
import type { ProfileQuestion } from './plan-profile';

/** What a query string or a form holds: texts by name. */
export type Query = Record<string, string | string[] | undefined>;

/** A number as people type it: a comma will do for the point. Empty is "not given". */
const typed = (text: unknown): unknown => {
  const said = Array.isArray(text) ? (text as unknown[])[0] : text;
  if (typeof said !== 'string') return said;
  const trimmed = said.trim();
  return trimmed === '' ? undefined : Number(trimmed.replace(',', '.'));
};

const first = (text: unknown): unknown => {
  const said = Array.isArray(text) ? (text as unknown[])[0] : text;
  return said === '' ? undefined : said;
};

interface Range {
  what: string;
  min: number;
  max: number;
  unit?: string;
}

const say = ({ what, min, max, unit = '' }: Range) => `${what}: a number from ${min} to ${max.toLocaleString('en')}${unit}`;
const number = (range: Range) => z.number({ error: say(range) }).min(range.min, say(range)).max(range.max, say(range));
const whole = (range: Range) => number(range).int(`${range.what}: a whole number`);
const asked = <T extends z.ZodType>(schema: T, fallback: z.output<T>) => z.preprocess((text) => typed(text) ?? fallback, schema);
const optional = (schema: z.ZodType<number>) => z.preprocess((text) => typed(text) ?? null, schema.nullable());
const choice = <const T extends readonly [string, ...string[]]>(values: T, fallback: T[number], error: string) =>
  z.preprocess((text) => first(text) ?? fallback, z.enum(values, { error }));
const tick = z.preprocess((text) => first(text) !== undefined, z.boolean());

/** Risks: 0 would need endless people, ½ would be a toss of a coin. */
const risk = (what: string) => number({ what, min: 0.001, max: 0.5 });

/** A room of people; larger panels belong to no cellar and would only slow the page. */
const PEOPLE = { min: 1, max: 500 };

/** Names of the fields of the plain questions. */
export const choosingSchema = z
  .object({
    question: choice(QUESTIONS, 'difference', 'Choose one of the questions'),
    samples: asked(whole({ what: 'Samples', min: 1, max: 12 }), 2),
    wine: optional(number({ what: 'Wine of each sample', min: 1, max: 100_000, unit: ' mL' })),
    people: optional(whole({ what: 'People', ...PEOPLE })),
    strong: tick,
    size: choice(SIZES, 'middling', 'Choose one of the sizes'),
    serving: asked(number({ what: 'Serving', min: 5, max: 150, unit: ' mL' }), 30),
    glass: asked(number({ what: 'Time for a glass', min: 10, max: 600, unit: ' s' }), 90),
    rest: asked(number({ what: 'Rest', min: 0, max: 900, unit: ' s' }), 60),
  })
  .transform((f): Choosing => ({
    question: f.question, samples: f.samples, wineMl: f.wine, people: f.people, isStrong: f.strong, size: f.size, servingMl: f.serving, glassS: f.glass, restS: f.rest,
  }));

/** The planner of a discrimination test. `defaultPanel`: people that the cellar has. */
export const discriminationSchema = (defaultPanel: number) =>
  z
    .object({
      protocol: choice(PLANNED_PROTOCOLS, 'triangle', 'Choose one of the tests'),
      aim: choice(['difference', 'similarity'], 'difference', 'Choose difference or similarity'),
      alpha: asked(risk('α'), 0.05),
      beta: asked(risk('β'), 0.2),
      by: choice(['pd', 'dprime'], 'pd', 'Choose a share of people or d′'),
      pd: asked(number({ what: 'Share of people who taste it', min: 0.05, max: 0.95 }), 0.5),
      dprime: asked(number({ what: 'd′', min: 0.5, max: 5 }), 1.5),
      sided: choice(['one', 'two'], 'one', 'Choose one direction or both'),
      replicates: asked(whole({ what: 'Sets for each person', min: 1, max: 4 }), 1),
      panel: asked(whole({ what: 'People at hand', ...PEOPLE }), defaultPanel),
    })
    .superRefine((f, context) => {
      if (f.sided === 'two' && f.protocol !== 'two_afc') context.addIssue({ code: 'custom', path: ['sided'], message: 'Both directions: only a pair has two of them' });
      if (f.sided === 'two' && f.aim === 'similarity') context.addIssue({ code: 'custom', path: ['sided'], message: 'A claim of likeness is planned in one direction here' });
    })
    .transform((f): DiscriminationQuestion => ({
      protocol: f.protocol, aim: f.aim, alpha: f.alpha, beta: f.beta, twoSided: f.sided === 'two', replicates: f.replicates, panel: f.panel,
      size: f.by === 'pd' ? { by: 'pd', value: f.pd } : { by: 'dPrime', value: f.dprime },
    }));

/** The planner of a profile; its fields begin with "p" where the other planner has the same. */
export const profileSchema = (defaultPanel: number) =>
  z
    .object({
      repeat: asked(number({ what: 'Scatter of repeats', min: 0.5, max: 50, unit: ' points' }), 10),
      disagree: asked(number({ what: 'Disagreement', min: 0, max: 50, unit: ' points' }), 7),
      tasters: asked(whole({ what: 'Panelists', min: 2, max: 200 }), Math.min(200, Math.max(2, defaultPanel))),
      wines: asked(whole({ what: 'Samples', min: 2, max: 12 }), 4),
      times: asked(whole({ what: 'Times each is tasted', min: 1, max: 4 }), 2),
      palpha: asked(risk('α'), 0.05),
      rule: choice(['tukey', 'lsd'], 'tukey', 'Choose Tukey or LSD'),
    })
    .transform((f): ProfileQuestion => ({
      scatter: { repeatability: f.repeat, disagreement: f.disagree }, panelists: f.tasters, samples: f.wines, replicates: f.times, alpha: f.palpha, rule: f.rule,
    }));

/** What a form's texts came to: the question, or what is wrong by field. */
export type Read<T> = { ok: true; value: T } | { ok: false; errors: Record<string, string[]> };

/** Reads texts by a schema; what it doesn't name is ignored. Never throws. */
export function readQuery<T>(schema: z.ZodType<T>, query: Query): Read<T> {
  const result = schema.safeParse(query);
  if (result.success) return { ok: true, value: result.data };
  const errors: Record<string, string[]> = {};
  for (const issue of result.error.issues) {
    const name = String(issue.path[0] ?? '');
    errors[name] = [...new Set([...(errors[name] ?? []), issue.message])];
  }
  return { ok: false, errors };
}

/** A form's entries as a query. */
export const queryOf = (data: FormData): Query => Object.fromEntries([...data].map(([name, value]) => [name, String(value)]));
