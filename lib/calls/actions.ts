'use server';

import { redirect } from 'next/navigation';
import { requireAccess } from '../auth/access';
import { formAction, type FormResult } from '../form-action';
import { createCall, withdrawCall } from './mutations';
import { createCallSchema, withdrawCallSchema } from './schema';

export async function createCallAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(createCallSchema, async (input) => {
    const access = await requireAccess(input.cellar, 'call.make');
    const id = createCall(access, input);
    redirect(`/c/${access.cellar.slug}/calls/${id}`);
  })(previous, data);
}

export async function withdrawCallAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(withdrawCallSchema, async (input) => {
    const access = await requireAccess(input.cellar, 'call.make');
    withdrawCall(access, input);
    redirect(`/c/${access.cellar.slug}/calls/${input.call}`);
  })(previous, data);
}
