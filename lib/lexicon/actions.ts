'use server';

import { revalidatePath } from 'next/cache';
import { redirect } from 'next/navigation';
import { requireAccess } from '../auth/access';
import { formAction, type FormResult } from '../form-action';
import { archiveDescriptor, saveDescriptor } from './mutations';
import { archiveDescriptorSchema, descriptorSchema } from './schema';

export async function saveDescriptorAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(descriptorSchema, async (input) => {
    saveDescriptor(await requireAccess(input.cellar, 'lexicon.edit'), input);
    redirect(`/c/${input.cellar}/lexicon?q=${encodeURIComponent(input.name)}`);
  })(previous, data);
}

export async function archiveDescriptorAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(archiveDescriptorSchema, async (input) => {
    archiveDescriptor(await requireAccess(input.cellar, 'lexicon.edit'), input.id, input.isArchived === 'yes');
    revalidatePath(`/c/${input.cellar}/lexicon`);
  })(previous, data);
}
