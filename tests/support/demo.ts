import { readFileSync } from 'node:fs';
import path from 'node:path';

export interface DemoFile {
  cellar: string;
  signIns: { role: string; email: string; password: string }[];
  joinPath: string;
  joinCode: string;
}

/** What the demo's filling left in a server's folder. */
export const readDemo = (folder: string): DemoFile => JSON.parse(readFileSync(path.join(folder, 'demo.json'), 'utf8')) as DemoFile;

/** The sign-in of the first person with the role. */
export function signInOf(demo: DemoFile, role: string): { email: string; password: string } {
  const found = demo.signIns.find((person) => person.role.split(', ').includes(role));
  if (!found) throw new Error(`the demo has no ${role}`);
  return found;
}

/** The folder of the browser tests' server; playwright.config.ts names it. */
export const e2eFolder = (): string => process.env.E2E_FOLDER!;
