import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { chromium, type Browser, type BrowserContext } from '@playwright/test';
import { freePort } from '../support/server';

const BINARY = process.env.CHROMIUM_PATH ?? '/usr/bin/chromium';
const FLAGS = ['--headless', '--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'];

/** A Chromium with a profile of its own that can be killed outright and started again on the same profile. */
export class KillableChromium {
  readonly profile = mkdtempSync(path.join(tmpdir(), 'tercet-profile-'));
  private child: ChildProcess | null = null;
  private browser: Browser | null = null;

  async start(): Promise<BrowserContext> {
    const port = await freePort();
    this.child = spawn(BINARY, [...FLAGS, `--user-data-dir=${this.profile}`, `--remote-debugging-port=${port}`, 'about:blank'], { stdio: 'ignore', detached: true });
    for (let tries = 0; ; tries += 1) {
      try {
        this.browser = await chromium.connectOverCDP(`http://127.0.0.1:${port}`);
        return this.browser.contexts()[0]!;
      } catch (error) {
        if (tries > 100) throw error;
        await new Promise((resolve) => setTimeout(resolve, 100));
      }
    }
  }

  /** SIGKILL to the whole process group: nothing gets to write anything any more. */
  async kill(): Promise<void> {
    const { child } = this;
    if (!child?.pid) return;
    const gone = new Promise((resolve) => child.once('exit', resolve));
    process.kill(-child.pid, 'SIGKILL');
    await gone;
    await this.browser?.close().catch(() => undefined);
  }

  async end(): Promise<void> {
    await this.kill().catch(() => undefined);
    rmSync(this.profile, { recursive: true, force: true });
  }
}

/** A cookie header as the browser's own cookies. */
export const asCookies = (header: string, url: string) => {
  const [name, ...rest] = header.split('=');
  return [{ name: name!, value: rest.join('='), url }];
};

/** Chromium by playwright with the same flags. */
export const launch = (): Promise<Browser> => chromium.launch({ executablePath: BINARY, args: FLAGS.slice(1) });
