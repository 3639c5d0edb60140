import { spawnSync } from 'node:child_process';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { unzipSync } from 'fflate';

/** Whether R is here; without it the bundles are made and not run. */
export const HAS_R = spawnSync('Rscript', ['--version']).status === 0;

/** Unpacks a bundle, lets somebody meddle with a file, and runs its script. */
export function reproduce(zip: Uint8Array, meddle: (name: string, text: string) => string = (_, text) => text): { status: number | null; said: string } {
  const folder = mkdtempSync(path.join(tmpdir(), 'tercet-reproduce-'));
  for (const [name, bytes] of Object.entries(unzipSync(zip))) writeFileSync(path.join(folder, name), meddle(name, new TextDecoder('utf-8', { ignoreBOM: true }).decode(bytes)));
  const run = spawnSync('Rscript', ['--vanilla', 'reproduce.R'], { cwd: folder, encoding: 'utf8', timeout: 60_000 });
  return { status: run.status, said: `${run.stdout}\n${run.stderr}` };
}
