import 'server-only';
import { createHmac } from 'node:crypto';
import { handoverSecret } from '../secrets';

/** The key that only this holding of a seat is sent, to mark a handover by code. 64 hexadecimal digits. */
export const handoverKey = (seat: { id: string; tokenGeneration: number }): string =>
  createHmac('sha256', handoverSecret()).update(`${seat.id}/${seat.tokenGeneration}`).digest('hex');
