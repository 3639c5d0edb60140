'use server';

import { headers } from 'next/headers';
import { redirect } from 'next/navigation';
import { formAction, requireActionOrigin, type FormResult } from '../form-action';
import { requireUser } from './access';
import { changePassword, setPasswordByLink, signIn, signOut, signOutEverywhere } from './mutations';
import { changePasswordSchema, safeNext, setPasswordSchema, signInSchema } from './schema';

const userAgent = async () => (await headers()).get('user-agent') ?? '';

export async function signInAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(signInSchema, async (input) => {
    await signIn(input.email, input.password, await userAgent());
    redirect(safeNext(input.next) ?? '/');
  })(previous, data);
}

export async function setPasswordAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(setPasswordSchema, async (input) => {
    await setPasswordByLink(input.token, input.password, await userAgent());
    redirect('/');
  })(previous, data);
}

export async function changePasswordAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(changePasswordSchema, async (input) => {
    await changePassword(await requireUser(), input.current, input.password, await userAgent());
  })(previous, data);
}

export async function signOutAction(): Promise<void> {
  await requireActionOrigin();
  await signOut();
  redirect('/sign-in');
}

export async function signOutEverywhereAction(): Promise<void> {
  await requireActionOrigin();
  await signOutEverywhere((await requireUser()).id);
  redirect('/sign-in');
}
