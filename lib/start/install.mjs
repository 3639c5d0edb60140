import { existsSync, readFileSync, statSync } from 'node:fs';
import path from 'node:path';
import { fail, say } from './say.mjs';
import { ROOT, run } from './run.mjs';

/** Refuses a Node.js that the locked packages don't run on. */
export function requireNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  const { engines } = JSON.parse(readFileSync(path.join(ROOT, 'package.json'), 'utf8'));
  const isTooOld = major < 20 || (major === 20 && minor < 9);
  if (isTooOld || major >= 23) fail(`Tercet runs on Node.js ${engines.node}; this is ${process.versions.node}. Install Node.js 22 or 20 and start again.`);
}

/**
 * Whether what is installed is what the lock file says. npm writes its own note of what it
 * installed last; packages are compared by version, so that a mere touch of a file means nothing.
 */
export function isInstalled() {
  const note = path.join(ROOT, 'node_modules/.package-lock.json');
  const lock = path.join(ROOT, 'package-lock.json');
  if (!existsSync(note) || !existsSync(lock)) return false;
  if (statSync(note).mtimeMs >= statSync(lock).mtimeMs) return true;
  const installed = JSON.parse(readFileSync(note, 'utf8')).packages;
  const wanted = JSON.parse(readFileSync(lock, 'utf8')).packages;
  return Object.entries(wanted).every(([name, entry]) => name === '' || entry.optional || entry.peer || installed[name]?.version === entry.version);
}

/** Installs exactly what the lock file says, when that is not there yet. */
export async function install() {
  if (isInstalled()) return;
  say('Installing packages from package-lock.json. The database driver may be compiled: some minutes the first time.');
  // The tools that build the application are development packages.
  const code = await run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund'], { NODE_ENV: '' });
  if (code !== 0) fail('The installation failed. Where no ready-made database driver can be loaded it is compiled: that needs python3, make and a C++ compiler (on Debian: apt-get install build-essential python3).');
}
