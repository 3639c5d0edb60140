import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { performance } from 'node:perf_hooks';
import { fileURLToPath } from 'node:url';

// `npm test`: all of it, with its own set-up. Ends with one line: 'N passed, N failed'.

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..');
const reports = mkdtempSync(path.join(tmpdir(), 'tercet-reports-'));
const bin = (name) => path.join(root, 'node_modules', name);
const totals = { passed: 0, failed: 0 };

function run(command, args, env = {}) {
  const { status } = spawnSync(command, args, { cwd: root, stdio: 'inherit', env: { ...process.env, NEXT_TELEMETRY_DISABLED: '1', ...env } });
  return status === 0;
}

/** One step; a step that reports no tests of its own counts as one. */
function step(name, work) {
  console.log(`\n== ${name}`);
  const began = performance.now();
  const result = work();
  const { passed, failed } = typeof result === 'boolean' ? { passed: result ? 1 : 0, failed: result ? 0 : 1 } : result;
  totals.passed += passed;
  totals.failed += failed;
  console.log(`== ${name}: ${failed > 0 ? 'FAILED' : 'ok'} in ${((performance.now() - began) / 1000).toFixed(0)} s`);
  return failed === 0;
}

function vitest(project) {
  const file = path.join(reports, `${project}.json`);
  const isGood = run(process.execPath, [bin('vitest/vitest.mjs'), 'run', '--project', project, '--reporter=default', '--reporter=./tests/support/closing-line.ts', '--reporter=json', `--outputFile.json=${file}`]);
  if (!existsSync(file)) return false;
  const { numPassedTests, numFailedTests } = JSON.parse(readFileSync(file, 'utf8'));
  // A file that doesn't even load counts no test: the exit code tells of it.
  return { passed: numPassedTests, failed: Math.max(numFailedTests, isGood ? 0 : 1) };
}

function playwright() {
  const file = path.join(reports, 'e2e.json');
  const folder = mkdtempSync(path.join(tmpdir(), 'tercet-e2e-'));
  const isGood = run(process.execPath, [bin('@playwright/test/cli.js'), 'test', '--reporter=list,json'], { PLAYWRIGHT_JSON_OUTPUT_NAME: file, E2E_FOLDER: folder });
  rmSync(folder, { recursive: true, force: true });
  if (!existsSync(file)) return false;
  const { expected, unexpected, flaky } = JSON.parse(readFileSync(file, 'utf8')).stats;
  return { passed: expected, failed: Math.max(unexpected + flaky, isGood ? 0 : 1) };
}

/** Debian's Chromium: there, installed now, or a line that says what to install. */
function requireChromium() {
  const chromium = process.env.CHROMIUM_PATH ?? '/usr/bin/chromium';
  if (existsSync(chromium)) return true;
  if (process.getuid?.() === 0 && existsSync('/usr/bin/apt-get')) {
    console.log('Installing Chromium from Debian.');
    run('apt-get', ['update', '-qq']);
    run('apt-get', ['install', '-y', '-qq', '--no-install-recommends', 'chromium'], { DEBIAN_FRONTEND: 'noninteractive' });
    if (existsSync(chromium)) return true;
  }
  console.log('The browser tests need Chromium: install it (Debian: apt-get install chromium), or set CHROMIUM_PATH.');
  return false;
}

const isInstalled = existsSync(bin('.package-lock.json')) || step('install', () => run('npm', ['ci', '--no-audit', '--no-fund']));
if (isInstalled) {
  step('types', () => run(process.execPath, [bin('next/dist/bin/next'), 'typegen']) && run(process.execPath, [bin('typescript/bin/tsc'), '--noEmit']));
  step('lint', () => run(process.execPath, [bin('eslint/bin/eslint.js'), '.', '--max-warnings', '0']));
  step('unit', () => vitest('unit'));
  step('reference', () => vitest('reference'));
  const isBuilt = step('build', () => run(process.execPath, ['--input-type=module', '--eval', "import { build } from './lib/start/build.mjs'; await build();"]));
  if (isBuilt) {
    step('integration', () => vitest('integration'));
    step('browser', () => requireChromium() && playwright());
  }
}
rmSync(reports, { recursive: true, force: true });
console.log(`\n${totals.passed} passed, ${totals.failed} failed`);
process.exit(totals.failed > 0 || !isInstalled ? 1 : 0);
