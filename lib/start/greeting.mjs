import { existsSync, readFileSync } from 'node:fs';
import { reachOf } from './address.mjs';
import { say } from './say.mjs';

const REACH_TEXT = {
  https: 'Phones come by https: everything works, opening the sheet without a network too.',
  lan: 'Phones on the same network open that address over plain http: answers are kept without a network, but the page must stay open.',
  localhost: 'Only this machine reaches it. Set APP_URL to an address that phones can open.',
};

/** The content of a JSON file, or null. */
function readFile(file) {
  if (!existsSync(file)) return null;
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return null;
  }
}

/**
 * Prints where the server is, who can sign in and what to do first, one thing a line.
 * @param {{ port: number, demoFile: string, firstOwnerFile: string, isDemo: boolean }} settings
 */
export function greet({ port, demoFile, firstOwnerFile, isDemo }) {
  const { url, mode } = reachOf({ APP_URL: process.env.APP_URL, PORT: String(port) });
  const demo = isDemo ? readFile(demoFile) : null;
  const firstOwner = readFile(firstOwnerFile);
  say();
  say(`Tercet is at ${url}`);
  say(REACH_TEXT[mode]);
  if (demo) {
    say(`Demo cellar: ${demo.cellar}. Its people and data are invented. Sign in as:`);
    for (const { role, email, password } of demo.signIns) say(`  ${role}: ${email}  ${password}`);
    if (demo.joinPath) say(`Join the open demo session: ${url}${demo.joinPath}  (code ${demo.joinCode} at ${url}/j)`);
  }
  if (firstOwner?.path) say(`Set up your own cellar, once, within a week: ${url}${firstOwner.path}`);
  say('Stop with Ctrl+C.');
}
