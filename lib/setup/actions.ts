'use server';

import { headers } from 'next/headers';
import { redirect } from 'next/navigation';
import { startSignIn } from '../auth/mutations';
import { formAction, type FormResult } from '../form-action';
import { setUpFirstCellar } from './mutations';
import { setUpSchema } from './schema';

/** The token in the form is the permission: it works once. */
export async function setUpAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(setUpSchema, async (input) => {
    const { userId, slug } = await setUpFirstCellar(input);
    await startSignIn(userId, (await headers()).get('user-agent') ?? '');
    redirect(`/c/${slug}`);
  })(previous, data);
}
