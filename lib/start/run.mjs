import { spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import path from 'node:path';

/** The folder of package.json. */
export const ROOT = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..');
export const NEXT_BIN = path.join(ROOT, 'node_modules/next/dist/bin/next');

/**
 * Runs a program in the project's folder to its end, its output shown.
 * @param {string} program
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} [env] added to this process's environment
 * @returns {Promise<number>} its exit code; 1 when a signal ended it or it can't be found
 */
export function run(program, args, env = {}) {
  return new Promise((resolve) => {
    const child = spawn(program, args, { cwd: ROOT, stdio: ['ignore', 'inherit', 'inherit'], env: { ...process.env, NEXT_TELEMETRY_DISABLED: '1', ...env } });
    child.on('error', (error) => {
      process.stderr.write(`${program}: ${error.message}\n`);
      resolve(1);
    });
    child.on('close', (code) => resolve(code ?? 1));
  });
}
