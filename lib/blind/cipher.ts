import 'server-only';
import { createCipheriv, createDecipheriv, hkdfSync, randomBytes } from 'node:crypto';
import { sealSecret } from '../secrets';

export interface Sealed {
  ciphertext: Buffer;
  nonce: Buffer;
  tag: Buffer;
}

/** Each session has a key of its own, derived (HKDF, RFC 5869) from the secret outside the database. */
const keyFor = (sessionId: string): Buffer => Buffer.from(hkdfSync('sha256', sealSecret(), sessionId, 'tercet seal 1', 32));

/** AES-256-GCM. The session and its commitment are bound in, so that a seal can't be moved. */
export function encrypt(text: string, sessionId: string, commitment: string): Sealed {
  const nonce = randomBytes(12);
  const cipher = createCipheriv('aes-256-gcm', keyFor(sessionId), nonce);
  cipher.setAAD(Buffer.from(`${sessionId}:${commitment}`));
  const ciphertext = Buffer.concat([cipher.update(text, 'utf8'), cipher.final()]);
  return { ciphertext, nonce, tag: cipher.getAuthTag() };
}

/** @throws Error when the seal, the session or the secret do not belong together */
export function decrypt(sealed: Sealed, sessionId: string, commitment: string): string {
  const decipher = createDecipheriv('aes-256-gcm', keyFor(sessionId), sealed.nonce);
  decipher.setAAD(Buffer.from(`${sessionId}:${commitment}`));
  decipher.setAuthTag(sealed.tag);
  return Buffer.concat([decipher.update(sealed.ciphertext), decipher.final()]).toString('utf8');
}
