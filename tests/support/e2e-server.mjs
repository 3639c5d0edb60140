import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

// The server of the browser tests: the production build on PORT with a new database and the demo
// in it. E2E_FOLDER names the folder of its data; otherwise a new one is made and removed at the end.

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..');
const folder = process.env.E2E_FOLDER ?? mkdtempSync(path.join(tmpdir(), 'tercet-e2e-'));
if (!process.env.E2E_FOLDER) process.once('exit', () => rmSync(folder, { recursive: true, force: true }));
const port = process.env.PORT ?? '3217';

const child = spawn(process.execPath, [path.join(root, 'node_modules/next/dist/bin/next'), 'start', '-p', port, '-H', '127.0.0.1'], {
  cwd: root,
  stdio: ['ignore', 'inherit', 'inherit'],
  env: {
    ...process.env,
    NODE_ENV: 'production',
    NEXT_TELEMETRY_DISABLED: '1',
    PORT: port,
    APP_URL: `http://127.0.0.1:${port}`,
    DATABASE_FILE: path.join(folder, 'tercet.db'),
    TERCET_SECRETS_DIR: path.join(folder, 'secrets'),
    TERCET_DEMO: '1',
    TERCET_DEMO_FILE: path.join(folder, 'demo.json'),
    TERCET_FIRST_OWNER_FILE: path.join(folder, 'first-owner.json'),
  },
});
for (const signal of ['SIGTERM', 'SIGINT']) {
  process.on(signal, () => {
    child.kill('SIGTERM');
    setTimeout(() => child.kill('SIGKILL'), 1_500).unref();
  });
}
child.once('close', (code) => process.exit(code ?? 0));
