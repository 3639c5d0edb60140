'use client';

import { FormProvider, getFormProps, useForm, type FieldMetadata } from '@conform-to/react';
import { parseWithZod } from '@conform-to/zod/v4';
import { startTransition, useActionState, useEffect, useRef, type FormEvent, type ReactNode } from 'react';
import type { z } from 'zod';
import type { FormResult } from '@/lib/form-action';
import { ErrorSummary } from './error-summary';

type Action = (previous: FormResult, data: FormData) => Promise<FormResult>;

export type Fields = Record<string, FieldMetadata<unknown>>;

interface Props<Schema extends z.ZodObject> {
  action: Action;
  schema: Schema;
  /** What the fields hold at first. */
  defaults?: Record<string, unknown>;
  submit: string;
  /** Said while the action runs. */
  working?: string;
  /** Beside the main button: cancel, archive… */
  extra?: ReactNode;
  /** Said after a save that stays on the page. */
  saved?: string;
  className?: string;
  /** Stands in for the main button (a guarded one). */
  submitButton?: (isPending: boolean) => ReactNode;
  children: (fields: Fields, form: { id: string }) => ReactNode;
}

/**
 * A form over a server action and the same zod schema: it works without JavaScript, checks while
 * typing with it, keeps what was typed on an error, and moves the focus to a summary that links to
 * the fields.
 */
export function ActionForm<Schema extends z.ZodObject>({ action, schema, defaults, submit, working = 'Saving…', extra, saved, className, submitButton, children }: Props<Schema>) {
  const [result, dispatch, isPending] = useActionState(action, null);
  const [form, fields] = useForm<Record<string, unknown>>({
    lastResult: result,
    defaultValue: defaults as never,
    shouldValidate: 'onSubmit',
    shouldRevalidate: 'onInput',
    onValidate: ({ formData }) => parseWithZod(formData, { schema }) as never,
  });
  const wasSaved = result?.status === 'success';
  const said = useRef<HTMLParagraphElement>(null);
  useEffect(() => {
    if (wasSaved) said.current?.focus();
  }, [wasSaved, result]);
  const props = getFormProps(form);
  const onSubmit = (event: FormEvent<HTMLFormElement>) => {
    props.onSubmit(event);
    if (event.defaultPrevented) return;
    // Dispatching by hand keeps React from emptying the fields when the action answers with errors.
    event.preventDefault();
    const data = new FormData(event.currentTarget, (event.nativeEvent as SubmitEvent).submitter);
    startTransition(() => dispatch(data));
  };
  return (
    <FormProvider context={form.context}>
      <form {...props} action={dispatch} onSubmit={onSubmit} className={className ?? 'stack'}>
        <ErrorSummary errors={form.allErrors} formId={form.id} />
        {wasSaved && saved && <p className="saved" tabIndex={-1} ref={said} role="status">{saved}</p>}
        {children(fields as unknown as Fields, { id: form.id })}
        <div className="row wrap">
          {submitButton ? submitButton(isPending) : <button className="btn btn-main" disabled={isPending}>{isPending ? working : submit}</button>}
          {extra}
        </div>
      </form>
    </FormProvider>
  );
}
