'use server';

import { revalidatePath } from 'next/cache';
import { redirect } from 'next/navigation';
import { requireAccess } from '../auth/access';
import { formAction, type FormResult } from '../form-action';
import { archiveRow, emptyVessel, fillVessel, recordPull, saveLot, saveVessel } from './mutations';
import { archiveSchema, emptySchema, fillSchema, lotSchema, pullSchema, vesselSchema } from './schema';

export async function saveLotAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(lotSchema, async (input) => {
    const id = saveLot(await requireAccess(input.cellar, 'register.edit'), input);
    redirect(`/c/${input.cellar}/lots/${id}`);
  })(previous, data);
}

export async function saveVesselAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(vesselSchema, async (input) => {
    const id = saveVessel(await requireAccess(input.cellar, 'register.edit'), input);
    redirect(`/c/${input.cellar}/barrels/${id}`);
  })(previous, data);
}

export async function fillVesselAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(fillSchema, async (input) => {
    fillVessel(await requireAccess(input.cellar, 'register.edit'), input);
    redirect(`/c/${input.cellar}/barrels/${input.vesselId}`);
  })(previous, data);
}

export async function emptyVesselAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(emptySchema, async (input) => {
    emptyVessel(await requireAccess(input.cellar, 'register.edit'), input);
    redirect(`/c/${input.cellar}/barrels/${input.vesselId}`);
  })(previous, data);
}

export async function recordPullAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(pullSchema, async (input) => {
    recordPull(await requireAccess(input.cellar, 'pull.record'), input);
    redirect(`/c/${input.cellar}/barrels/${input.vesselId}#pulls`);
  })(previous, data);
}

export async function archiveAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(archiveSchema, async (input) => {
    archiveRow(await requireAccess(input.cellar, input.kind === 'pull' ? 'pull.record' : 'register.edit'), input);
    revalidatePath(`/c/${input.cellar}`, 'layout');
  })(previous, data);
}
