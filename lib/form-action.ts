import 'server-only';
import { parseWithZod } from '@conform-to/zod/v4';
import type { SubmissionResult } from '@conform-to/react';
import { headers } from 'next/headers';
import type { z } from 'zod';
import { asAppError } from './errors';
import { requireSameOrigin } from './http/origin';

/** What a form's action answers; null before the first try. */
export type FormResult = SubmissionResult<string[]> | null;

/**
 * A server action behind a form: origin, then the schema, then `run`, with every refusal in the
 * form's own words and what was typed kept (passwords aside: conform leaves out names that the
 * form hides). `run` ends by redirecting or by returning nothing.
 * Server actions can be posted to directly: `run` must do the permission check itself.
 */
export function formAction<Schema extends z.ZodType>(schema: Schema, run: (input: z.output<Schema>) => Promise<void>) {
  return async (_previous: FormResult, formData: FormData): Promise<FormResult> => {
    const submission = parseWithZod(formData, { schema });
    try {
      requireSameOrigin(await headers());
      if (submission.status !== 'success') return submission.reply({ hideFields: ['password', 'current'] });
      await run(submission.value);
      return submission.reply({ resetForm: true });
    } catch (error) {
      const known = asAppError(error);
      if (!known) throw error;
      const fieldErrors = Object.fromEntries(Object.entries(known.fieldErrors).map(([name, text]) => [name, [text]]));
      return submission.reply({ formErrors: [known.message], fieldErrors, hideFields: ['password', 'current'] });
    }
  };
}

/** A bare action (one button, no fields): the same origin check. @throws AppError */
export async function requireActionOrigin(): Promise<void> {
  requireSameOrigin(await headers());
}
