'use server';

import { redirect } from 'next/navigation';
import { revalidatePath } from 'next/cache';
import type { z } from 'zod';
import { requireAccess, type Access } from '../auth/access';
import type { Capability } from '../auth/permissions';
import { formAction, type FormResult } from '../form-action';
import { decideEarlyOpening, requestEarlyOpening } from './early-opening';
import { abandonSession, closeSession, openSession, sealSession, unsealSession } from './lifecycle';
import { duplicateSession, eraseSeatName, saveDraft } from './mutations';
import { abandonSchema, closeSchema, draftSchema, earlyDecisionSchema, earlyRequestSchema, reissueSchema, sessionSchema } from './schema';

const pageOf = (cellar: string, sessionId: string) => `/c/${cellar}/sessions/${sessionId}`;

/** A button of a session's page: does it, then shows the page anew. */
function step<Schema extends z.ZodType<{ cellar: string; sessionId: string }>>(schema: Schema, capability: Capability, run: (access: Access, input: z.output<Schema>) => void) {
  return formAction(schema, async (input) => {
    run(await requireAccess(input.cellar, capability), input);
    revalidatePath(pageOf(input.cellar, input.sessionId));
    redirect(pageOf(input.cellar, input.sessionId));
  });
}

export async function saveDraftAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(draftSchema, async (input) => {
    const id = saveDraft(await requireAccess(input.cellar, 'session.design'), input);
    redirect(pageOf(input.cellar, id));
  })(previous, data);
}

export async function duplicateAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(sessionSchema, async (input) => {
    const id = duplicateSession(await requireAccess(input.cellar, 'session.design'), input.sessionId);
    redirect(`${pageOf(input.cellar, id)}/design`);
  })(previous, data);
}

export async function sealAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return step(sessionSchema, 'session.design', (access, { sessionId }) => sealSession(access, sessionId))(previous, data);
}

export async function openAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return step(sessionSchema, 'session.run', (access, { sessionId }) => openSession(access, sessionId))(previous, data);
}

export async function closeAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return step(closeSchema, 'session.run', (access, { sessionId, reason }) => closeSession(access, sessionId, reason || null))(previous, data);
}

export async function unsealAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return step(sessionSchema, 'session.run', (access, { sessionId }) => unsealSession(access, sessionId))(previous, data);
}

export async function abandonAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return step(abandonSchema, 'session.run', (access, { sessionId, reason }) => abandonSession(access, sessionId, reason))(previous, data);
}

export async function eraseNameAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return step(reissueSchema, 'session.run', (access, { sessionId, seat }) => eraseSeatName(access, sessionId, seat))(previous, data);
}

export async function requestEarlyAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return step(earlyRequestSchema, 'session.run', (access, { sessionId, code, reason }) => requestEarlyOpening(access, sessionId, code ?? null, reason))(previous, data);
}

export async function decideEarlyAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return step(earlyDecisionSchema, 'session.run', (access, { openingId, decision }) => decideEarlyOpening(access, openingId, decision === 'approve'))(previous, data);
}
