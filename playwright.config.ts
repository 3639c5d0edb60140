import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { defineConfig, devices } from '@playwright/test';

const port = Number(process.env.E2E_PORT ?? 3217);
const baseURL = `http://127.0.0.1:${port}`;

// Workers load this file too and inherit the name, so that tests find the demo's sign-ins.
process.env.E2E_FOLDER ??= mkdtempSync(path.join(tmpdir(), 'tercet-e2e-'));

export default defineConfig({
  testDir: './tests/e2e',
  fullyParallel: false,
  workers: 1,
  timeout: 120_000,
  forbidOnly: true,
  reporter: process.env.TERCET_REPORT ? [['list'], ['json', { outputFile: process.env.TERCET_REPORT }]] : [['list']],
  use: {
    ...devices['Desktop Chrome'],
    baseURL,
    actionTimeout: 15_000,
    launchOptions: {
      executablePath: process.env.CHROMIUM_PATH ?? '/usr/bin/chromium',
      args: ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'],
    },
  },
  webServer: {
    command: 'exec node tests/support/e2e-server.mjs',
    url: `${baseURL}/api/health`,
    timeout: 120_000,
    reuseExistingServer: false,
    gracefulShutdown: { signal: 'SIGTERM', timeout: 5_000 },
    env: { PORT: String(port), E2E_FOLDER: process.env.E2E_FOLDER },
  },
});
