'use client';

import { getInputProps, getSelectProps, getTextareaProps, type FieldMetadata } from '@conform-to/react';
import type { ReactNode } from 'react';
import { useWords } from '@/components/i18n/words';

interface Common {
  field: FieldMetadata<unknown>;
  label: string;
  hint?: string;
}

/** Ids of the texts that describe a field: only those that are there. */
const describedBy = (field: FieldMetadata<unknown>, hint?: string) =>
  [hint && `${field.id}-hint`, field.errors && field.errorId].filter(Boolean).join(' ') || undefined;

/** What is wrong with a field, in the page's language. */
function FieldError({ field }: Pick<Common, 'field'>) {
  const t = useWords();
  return field.errors && <p className="error" id={field.errorId}>{field.errors.map(t.said).join(' ')}</p>;
}

function Frame({ field, label, hint, children }: Common & { children: ReactNode }) {
  return (
    <div className="field">
      <label htmlFor={field.id}>{label}</label>
      {hint && <p className="note" id={`${field.id}-hint`}>{hint}</p>}
      {children}
      <FieldError field={field} />
    </div>
  );
}

type InputType = 'text' | 'email' | 'password' | 'number' | 'date' | 'datetime-local' | 'search';

interface TextProps extends Common {
  type?: InputType;
  inputMode?: 'numeric' | 'decimal' | 'text';
  autoComplete?: string;
  step?: string;
  list?: readonly string[];
}

/** A one-line input. */
export function TextField({ field, label, hint, type = 'text', inputMode, autoComplete, step, list }: TextProps) {
  const { key, ...props } = getInputProps(field as FieldMetadata<string>, { type });
  return (
    <Frame field={field} label={label} hint={hint}>
      <input key={key} {...props} className="input" inputMode={inputMode} autoComplete={autoComplete ?? 'off'} step={step} list={list && `${field.id}-list`} aria-describedby={describedBy(field, hint)} />
      {list && <datalist id={`${field.id}-list`}>{list.map((value) => <option key={value} value={value} />)}</datalist>}
    </Frame>
  );
}

/** A text of several lines. */
export function AreaField({ field, label, hint, rows = 3 }: Common & { rows?: number }) {
  const { key, ...props } = getTextareaProps(field as FieldMetadata<string>);
  return (
    <Frame field={field} label={label} hint={hint}>
      <textarea key={key} {...props} rows={rows} className="input" aria-describedby={describedBy(field, hint)} />
    </Frame>
  );
}

export interface Option {
  value: string;
  label: string;
}

/** A choice of one from a list; `blank` is what an empty choice says. */
export function SelectField({ field, label, hint, options, blank }: Common & { options: readonly Option[]; blank?: string }) {
  const { key, ...props } = getSelectProps(field as FieldMetadata<string>);
  return (
    <Frame field={field} label={label} hint={hint}>
      <select key={key} {...props} className="input" aria-describedby={describedBy(field, hint)}>
        {blank !== undefined && <option value="">{blank}</option>}
        {options.map((option) => <option key={option.value} value={option.value}>{option.label}</option>)}
      </select>
    </Frame>
  );
}

/** One tick. */
export function TickField({ field, label, hint }: Common) {
  const { key, ...props } = getInputProps(field as FieldMetadata<boolean>, { type: 'checkbox' });
  return (
    <div className="field">
      <div className="tick-row">
        <input key={key} {...props} aria-describedby={describedBy(field, hint)} />
        <label htmlFor={field.id}>{label}</label>
      </div>
      {hint && <p className="note" id={`${field.id}-hint`}>{hint}</p>}
      <FieldError field={field} />
    </div>
  );
}

/** Several ticks under one heading; the field is a list of strings. */
export function TicksField({ field, label, hint, options }: Common & { options: readonly Option[] }) {
  const chosen = new Set<string>(Array.isArray(field.initialValue) ? (field.initialValue as string[]) : field.initialValue ? [String(field.initialValue)] : []);
  return (
    <fieldset className="field" id={field.id} aria-describedby={describedBy(field, hint)}>
      <legend>{label}</legend>
      {hint && <p className="note" id={`${field.id}-hint`}>{hint}</p>}
      <div className="grid-fields">
        {options.map((option) => (
          <label key={option.value} className="tick-row">
            <input type="checkbox" name={field.name} value={option.value} defaultChecked={chosen.has(option.value)} />
            <span>{option.label}</span>
          </label>
        ))}
      </div>
      <FieldError field={field} />
    </fieldset>
  );
}

/** A value that the person doesn't edit. */
export function HiddenField({ name, value }: { name: string; value: string | number }) {
  return <input type="hidden" name={name} value={value} />;
}
