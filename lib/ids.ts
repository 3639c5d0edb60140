import { createHash, randomBytes, randomUUID } from 'node:crypto';

/** A version 4 id: random, so that it tells nothing of order or time. */
export const newId = (): string => randomUUID();

/** A secret for a link: 160 bits, base64url. Only its hash is stored. */
export const newToken = (): string => randomBytes(20).toString('base64url');

/** SHA-256 as lower-case hex. */
export const sha256Hex = (text: string | Uint8Array): string => createHash('sha256').update(text).digest('hex');
