import type { ReactNode } from 'react';
import type { Query } from '@/lib/planner/schema';

/** What every field of a planner's form is drawn from. */
export interface FormState {
  id: string;
  query: Query;
  errors: Record<string, string[]>;
}

interface Common {
  form: FormState;
  name: string;
  label: string;
  hint?: string;
}

const textOf = (query: Query, name: string): string | undefined => {
  const text = query[name];
  return Array.isArray(text) ? text[0] : text;
};

const idOf = ({ form, name }: Pick<Common, 'form' | 'name'>) => `${form.id}-${name}`;

const describedBy = (common: Common) =>
  [common.hint && `${idOf(common)}-hint`, common.form.errors[common.name] && `${idOf(common)}-error`].filter(Boolean).join(' ') || undefined;

function Frame({ common, children }: { common: Common; children: ReactNode }) {
  const id = idOf(common);
  const errors = common.form.errors[common.name];
  return (
    <div className="field">
      <label htmlFor={id}>{common.label}</label>
      {common.hint && <p className="note" id={`${id}-hint`}>{common.hint}</p>}
      {children}
      {errors && <p className="error" id={`${id}-error`}>{errors.join(' ')}</p>}
    </div>
  );
}

/** A number, typed; what was typed stays when it is wrong. `fallback`: what an empty address means. */
export function NumberField({ fallback, ...common }: Common & { fallback?: number }) {
  const value = textOf(common.form.query, common.name) ?? (fallback === undefined ? '' : String(fallback));
  return (
    <Frame common={common}>
      <input className="input" id={idOf(common)} name={common.name} defaultValue={value} inputMode="decimal" autoComplete="off" aria-invalid={common.form.errors[common.name] ? true : undefined} aria-describedby={describedBy(common)} />
    </Frame>
  );
}

/** A choice of one. The first option is what an empty address means. */
export function ChoiceField({ options, ...common }: Common & { options: readonly (readonly [value: string, label: string])[] }) {
  const given = textOf(common.form.query, common.name);
  const value = options.find(([option]) => option === given)?.[0] ?? options[0]![0];
  return (
    <Frame common={common}>
      <select className="input" id={idOf(common)} name={common.name} defaultValue={value} aria-invalid={common.form.errors[common.name] ? true : undefined} aria-describedby={describedBy(common)}>
        {options.map(([option, label]) => <option key={option} value={option}>{label}</option>)}
      </select>
    </Frame>
  );
}

/** One tick. */
export function TickField({ ...common }: Common) {
  return (
    <div className="field" style={{ alignSelf: 'end' }}>
      <label className="tick-row">
        <input type="checkbox" name={common.name} value="1" id={idOf(common)} defaultChecked={textOf(common.form.query, common.name) !== undefined} />
        <span>{common.label}</span>
      </label>
    </div>
  );
}

/** Fields of the page's other forms, carried along so that sending one keeps the others. */
export function KeptFields({ query }: { query: Query }) {
  return Object.keys(query).map((name) => {
    const text = textOf(query, name);
    return text === undefined ? null : <input key={name} type="hidden" name={name} value={text} data-kept="" />;
  });
}

/** What is wrong, in one place; each line leads to its field. Nothing when all is well. */
export function WrongFields({ form }: { form: FormState }) {
  const lines = Object.entries(form.errors).flatMap(([name, texts]) => texts.map((text) => ({ name, text })));
  if (lines.length === 0) return null;
  return (
    <div className="summary" role="status">
      <p>Nothing is counted until this is put right:</p>
      <ul>{lines.map(({ name, text }) => <li key={name + text}><a href={`#${form.id}-${name}`}>{text}</a></li>)}</ul>
    </div>
  );
}
