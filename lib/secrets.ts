import 'server-only';
import { randomBytes } from 'node:crypto';
import { chmodSync, existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';

/**
 * Secrets lie in files of their own, outside the database and outside its copies:
 * `TERCET_SECRETS_DIR`, or `data/secrets`. Each is made at first use, readable by the owner only.
 */
function secretsDirectory(): string {
  return process.env.TERCET_SECRETS_DIR ?? path.join(/* turbopackIgnore: true */ process.cwd(), 'data', 'secrets');
}

const read = new Map<string, Buffer>();

function secret(name: string): Buffer {
  const file = path.join(secretsDirectory(), `${name}.key`);
  const known = read.get(file);
  if (known) return known;
  if (!existsSync(file)) {
    mkdirSync(path.dirname(file), { recursive: true, mode: 0o700 });
    // `wx`: of two processes that start at once, the first one's secret stays.
    try {
      writeFileSync(file, `${randomBytes(32).toString('hex')}\n`, { mode: 0o600, flag: 'wx' });
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error;
    }
    chmodSync(file, 0o600);
  }
  const bytes = Buffer.from(readFileSync(file, 'utf8').trim(), 'hex');
  if (bytes.length !== 32) throw new Error(`The secret ${name} is damaged: it must be 64 hexadecimal digits`);
  read.set(file, bytes);
  return bytes;
}

/** The key under which session keys (code → sample) rest. 32 bytes. */
export const sealSecret = (): Buffer => secret('seal');

/** The password of the sign-in and seat cookies. 64 characters. */
export const cookieSecret = (): string => secret('cookie').toString('hex');

/** The key from which each seat's own key for a handover by code is made. 32 bytes. */
export const handoverSecret = (): Buffer => secret('handover');
