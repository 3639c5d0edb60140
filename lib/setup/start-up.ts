import 'server-only';
import { readEnv } from '../env';
import { prepare } from '../prepare';
import { offerFirstOwner } from './first-owner';

/** Ends the process with code 1 when the server can't start, having said why. */
export async function startUp(): Promise<void> {
  // The start script holds the other end: should it be killed, the server doesn't stay behind.
  if (process.connected) process.once('disconnect', () => process.exit(0));
  try {
    readEnv();
    await prepare();
    offerFirstOwner();
  } catch (error) {
    console.error(`Tercet could not start: ${error instanceof Error ? error.message : String(error)}`);
    process.exit(1);
  }
}
