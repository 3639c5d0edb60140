'use server';

import { revalidatePath } from 'next/cache';
import { redirect } from 'next/navigation';
import { requireAccess } from '../auth/access';
import { asAppError } from '../errors';
import { formAction, requireActionOrigin, type FormResult } from '../form-action';
import { reach } from '../reach';
import { addMember, changeCellar, changeRoles, endMembership, makePasswordLink } from './mutations';
import { removeDemoCellar } from './remove-demo';
import { addMemberSchema, cellarSchema, changeRolesSchema, memberSchema, removeDemoSchema } from './schema';

const shown = (cellar: string) => revalidatePath(`/c/${cellar}`, 'layout');

export async function addMemberAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(addMemberSchema, async (input) => {
    addMember(await requireAccess(input.cellar, 'members.manage'), input);
    shown(input.cellar);
  })(previous, data);
}

export async function changeRolesAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(changeRolesSchema, async (input) => {
    changeRoles(await requireAccess(input.cellar, 'members.manage'), input);
    shown(input.cellar);
  })(previous, data);
}

export async function endMembershipAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(memberSchema, async (input) => {
    endMembership(await requireAccess(input.cellar, 'members.manage'), input.userId);
    shown(input.cellar);
  })(previous, data);
}

export async function changeCellarAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(cellarSchema, async (input) => {
    changeCellar(await requireAccess(input.cellar, 'cellar.manage'), input);
    shown(input.cellar);
  })(previous, data);
}

export async function removeDemoAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(removeDemoSchema, async (input) => {
    removeDemoCellar(await requireAccess(input.cellar, 'cellar.manage'), input.typedName);
    redirect('/');
  })(previous, data);
}

export interface LinkResult {
  url: string | null;
  error: string | null;
}

/** Makes the one-time password link of a member and shows it once. */
export async function passwordLinkAction(_previous: LinkResult | null, data: FormData): Promise<LinkResult> {
  try {
    await requireActionOrigin();
    const input = memberSchema.safeParse({ cellar: data.get('cellar'), userId: data.get('userId') });
    if (!input.success) return { url: null, error: 'That person is no member.' };
    const token = makePasswordLink(await requireAccess(input.data.cellar, 'members.manage'), input.data.userId);
    return { url: `${reach().url}/set-password/${token}`, error: null };
  } catch (error) {
    const known = asAppError(error);
    if (!known) throw error;
    return { url: null, error: known.message };
  }
}
