import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

export const ROOT = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..');

export interface TestServer {
  /** `http://127.0.0.1:<port>`, without a slash at its end. */
  url: string;
  port: number;
  /** The folder of its database, secrets, demo.json and first-owner.json. */
  folder: string;
  databaseFile: string;
  process: ChildProcess;
  /** All that it has written so far. */
  log(): string;
  /** Ends it. @returns milliseconds until it was gone */
  stop(signal?: NodeJS.Signals): Promise<number>;
}

interface Options {
  /** Fills the demo cellar. Off unless asked for. */
  demo?: boolean;
  env?: Record<string, string>;
  /** A folder of an earlier server, to start again on its data. */
  folder?: string;
  /** The built application to serve; the project's own unless a bench names another. */
  cwd?: string;
  /** Runs `lib/start.mjs` as `npm start` does, in place of the server alone. */
  viaStart?: boolean;
}

/** A port that was free a moment ago. */
export function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address() as { port: number };
      probe.close(() => resolve(port));
    });
  });
}

const made = new Set<string>();
process.once('exit', () => {
  for (const folder of made) rmSync(folder, { recursive: true, force: true });
});

/**
 * Starts the production build on a free port with a database and secrets of its own and waits for
 * `/api/health`. The build must be there (`npm test` and `npm run build` see to it).
 */
export async function startServer({ demo = false, env = {}, folder = mkdtempSync(path.join(tmpdir(), 'tercet-server-')), viaStart = false, cwd = ROOT }: Options = {}): Promise<TestServer> {
  made.add(folder);
  const port = await freePort();
  const databaseFile = path.join(folder, 'tercet.db');
  const command = viaStart ? [path.join(ROOT, 'lib/start.mjs')] : [path.join(ROOT, 'node_modules/next/dist/bin/next'), 'start', '-p', String(port), '-H', '127.0.0.1'];
  const child = spawn(process.execPath, command, {
    cwd,
    stdio: ['ignore', 'pipe', 'pipe'],
    env: {
      ...process.env,
      NODE_ENV: 'production',
      NEXT_TELEMETRY_DISABLED: '1',
      PORT: String(port),
      APP_URL: `http://127.0.0.1:${port}`,
      DATABASE_FILE: databaseFile,
      TERCET_SECRETS_DIR: path.join(folder, 'secrets'),
      TERCET_DEMO: demo ? '1' : '0',
      TERCET_DEMO_FILE: path.join(folder, 'demo.json'),
      TERCET_FIRST_OWNER_FILE: path.join(folder, 'first-owner.json'),
      ...env,
    },
  });
  let text = '';
  child.stdout.on('data', (part: Buffer) => (text += part.toString()));
  child.stderr.on('data', (part: Buffer) => (text += part.toString()));
  const gone = new Promise<void>((resolve) => child.once('close', () => resolve()));
  const killAtExit = () => child.kill('SIGKILL');
  process.once('exit', killAtExit);
  const url = `http://127.0.0.1:${port}`;
  await untilHealthy(url, child, () => text);
  return {
    url, port, folder, databaseFile,
    process: child,
    log: () => text,
    async stop(signal = 'SIGTERM') {
      const began = Date.now();
      child.kill(signal);
      const force = setTimeout(() => child.kill('SIGKILL'), 10_000);
      await gone;
      clearTimeout(force);
      process.off('exit', killAtExit);
      return Date.now() - began;
    },
  };
}

async function untilHealthy(url: string, child: ChildProcess, log: () => string): Promise<void> {
  const deadline = Date.now() + 60_000;
  while (Date.now() < deadline) {
    if (child.exitCode !== null) throw new Error(`The server ended with code ${child.exitCode}:\n${log()}`);
    try {
      if ((await fetch(`${url}/api/health`, { signal: AbortSignal.timeout(5_000) })).ok) return;
    } catch {
      // Not listening yet.
    }
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  child.kill('SIGKILL');
  throw new Error(`The server did not answer within 60 s:\n${log()}`);
}
