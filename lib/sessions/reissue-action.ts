'use server';

import { requireAccess } from '../auth/access';
import { asAppError } from '../errors';
import { requireActionOrigin } from '../form-action';
import { reach } from '../reach';
import { reissueSeat } from './mutations';
import { reissueSchema } from './schema';
import { qrPicture } from './loaders';

export interface ReissueResult {
  url: string | null;
  qr: string | null;
  error: string | null;
}

/** Makes the one-time link of a seat and shows it once: it is stored nowhere. */
export async function reissueAction(_previous: ReissueResult | null, data: FormData): Promise<ReissueResult> {
  try {
    await requireActionOrigin();
    const input = reissueSchema.safeParse({ cellar: data.get('cellar'), sessionId: data.get('sessionId'), seat: Number(data.get('seat')) });
    if (!input.success) return { url: null, qr: null, error: 'That seat is not there.' };
    const token = reissueSeat(await requireAccess(input.data.cellar, 'session.run'), input.data.sessionId, input.data.seat);
    const url = `${reach().url}/seat/${token}`;
    return { url, qr: qrPicture(url), error: null };
  } catch (error) {
    const known = asAppError(error);
    if (!known) throw error;
    return { url: null, qr: null, error: known.message };
  }
}
