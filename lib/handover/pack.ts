import { hmac } from '@noble/hashes/hmac.js';
import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, hexToBytes, utf8ToBytes } from '@noble/hashes/utils.js';
import type { Operation } from '../ballots/schema';

/** What a phone hands over when it has no signal: the operations as they wait in its outbox. */
export interface Handover {
  joinKey: string;
  ops: Operation[];
}

/** Bytes of the seat's mark under a handover; half of SHA-256 is plenty. */
export const MARK_BYTES = 16;

/** The seat's mark: only who was sent the sheet can make it, so that nobody answers for another seat. */
export const markOf = (key: string, payload: Uint8Array): string => bytesToHex(hmac(sha256, hexToBytes(key), payload)).slice(0, 2 * MARK_BYTES);

const base64url = (bytes: Uint8Array): string =>
  btoa(Array.from(bytes, (byte) => String.fromCharCode(byte)).join('')).replaceAll('+', '-').replaceAll('/', '_').replace(/=+$/, '');

async function deflate(bytes: Uint8Array<ArrayBuffer>): Promise<Uint8Array<ArrayBuffer>> {
  const stream = new Blob([bytes]).stream().pipeThrough(new CompressionStream('deflate-raw'));
  return new Uint8Array(await new Response(stream).arrayBuffer());
}

/**
 * A handover as text: "<d or p>.<base64url>.<mark>", deflated where the browser can. The operations keep
 * their ids, so that what also arrives over the network counts once.
 */
export async function packHandover(handover: Handover, key: string): Promise<string> {
  const plain = new Uint8Array(utf8ToBytes(JSON.stringify(handover)));
  const isDeflated = typeof CompressionStream !== 'undefined';
  const payload = isDeflated ? await deflate(plain) : plain;
  return `${isDeflated ? 'd' : 'p'}.${base64url(payload)}.${markOf(key, payload)}`;
}
