import { spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { unzipSync } from 'fflate';

const rscript = spawnSync('Rscript', ['--version'], { encoding: 'utf8' });

/** Why the script can't be run here; null when it can. */
export const whyNoR: string | null = rscript.status === 0 ? null : 'Rscript is not on this machine';

/** Whether R has the packages for lines with gaps. */
export const hasMixedModels = (): boolean =>
  spawnSync('Rscript', ['-e', 'quit(status = !all(sapply(c("lme4", "lmerTest", "pbkrtest"), requireNamespace, quietly = TRUE)))']).status === 0;

/** Unpacks a bundle into a folder of its own. @returns the folder */
export function unpack(zip: Uint8Array): string {
  const folder = mkdtempSync(path.join(tmpdir(), 'tercet-bundle-'));
  for (const [name, bytes] of Object.entries(unzipSync(zip))) {
    mkdirSync(path.dirname(path.join(folder, name)), { recursive: true });
    writeFileSync(path.join(folder, name), bytes);
  }
  return folder;
}

export interface Outcome {
  status: number | null;
  text: string;
  /** Of the last line: how many figures agree, differ, … */
  counts: { figures: number; agree: number; differ: number; missing: number; skipped: number };
}

/** Runs the bundle's script from elsewhere, as somebody might who has not changed into the folder. */
export function reproduce(folder: string, env: Record<string, string> = {}): Outcome {
  const run = spawnSync('Rscript', [path.join(folder, 'reproduce.R')], { encoding: 'utf8', cwd: tmpdir(), env: { ...process.env, ...env }, timeout: 120_000 });
  const [, ...counts] = /(\d+) figures: (\d+) agree, (\d+) differ, (\d+) not computed, (\d+) skipped/.exec(run.stdout) ?? [];
  const [figures = NaN, agree = NaN, differ = NaN, missing = NaN, skipped = NaN] = counts.map(Number);
  return { status: run.status, text: `${run.stdout}\n${run.stderr}`, counts: { figures, agree, differ, missing, skipped } };
}

/** Changes the first data row of the bundle's answers that `edit` changes, cell by cell. */
export function alterAnswers(folder: string, edit: (cells: string[], columns: string[]) => string[] | null): void {
  const file = path.join(folder, 'data', 'answers.csv');
  const [head, ...lines] = readFileSync(file, 'utf8').split('\r\n');
  const columns = head!.replace('\uFEFF', '').split(',');
  for (const [index, line] of lines.entries()) {
    const cells = edit(line.split(','), columns);
    if (!cells) continue;
    lines[index] = cells.join(',');
    writeFileSync(file, [head, ...lines].join('\r\n'));
    return;
  }
  throw new Error('no row was altered');
}
