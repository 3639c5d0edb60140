import 'server-only';
import { hash, verify } from '@node-rs/argon2';

/** argon2id, 19 MiB, two passes: OWASP's password storage minimum. */
const OPTIONS = { memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

/** A hash of nobody's password, so that an unknown address takes as long as a wrong password. */
let decoy: Promise<string> | undefined;

/** The argon2id hash of a password, with its salt and settings. */
export const hashPassword = (password: string): Promise<string> => hash(password, OPTIONS);

/** Whether the password fits; with no hash it works as long and says no. */
export async function passwordFits(passwordHash: string | null, password: string): Promise<boolean> {
  decoy ??= hashPassword('nobody has this one');
  const fits = await verify(passwordHash ?? (await decoy), password);
  return passwordHash !== null && fits;
}
