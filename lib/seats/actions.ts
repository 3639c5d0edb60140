'use server';

import { redirect } from 'next/navigation';
import { currentUser } from '../auth/access';
import { formAction, type FormResult } from '../form-action';
import { requireSeat } from './access';
import { claimSeat, findByTypedCode, leaveSeat, takeSeatByLink } from './mutations';
import { claimSchema, joinCodeSchema, leaveSchema, takeSeatSchema } from './schema';

export async function findSessionAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(joinCodeSchema, async ({ code }) => redirect(`/j/${await findByTypedCode(code)}`))(previous, data);
}

export async function claimSeatAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(claimSchema, async (input) => {
    await claimSeat(input, await currentUser());
    redirect(`/t/${input.joinKey}`);
  })(previous, data);
}

export async function leaveSeatAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(leaveSchema, async ({ joinKey }) => {
    leaveSeat(await requireSeat(joinKey));
    redirect(`/t/${joinKey}/left`);
  })(previous, data);
}

export async function takeSeatAction(previous: FormResult, data: FormData): Promise<FormResult> {
  return formAction(takeSeatSchema, async ({ token }) => redirect(`/t/${await takeSeatByLink(token)}`))(previous, data);
}
