import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { fail, say } from './say.mjs';
import { NEXT_BIN, ROOT, run } from './run.mjs';

/** Everything that a build is made of. */
const FOLDERS = ['app', 'components', 'db', 'lib', 'public', 'stats'];
const FILES = ['instrumentation.ts', 'next.config.mjs', 'package-lock.json', 'postcss.config.mjs', 'proxy.ts', 'tailwind.config.ts', 'tsconfig.json'];
const STAMP = path.join(ROOT, '.next/sources.sha256');

function* filesUnder(folder) {
  if (!existsSync(folder)) return;
  for (const entry of readdirSync(folder, { withFileTypes: true }).sort((a, b) => (a.name < b.name ? -1 : 1))) {
    const file = path.join(folder, entry.name);
    if (entry.isDirectory()) yield* filesUnder(file);
    else if (entry.isFile()) yield file;
  }
}

/** SHA-256 over names and contents of all sources, and the version of Node.js. */
export function sourcesHash() {
  const hash = createHash('sha256').update(process.versions.node);
  const files = [...FOLDERS.flatMap((folder) => [...filesUnder(path.join(ROOT, folder))]), ...FILES.map((file) => path.join(ROOT, file))];
  for (const file of files) {
    if (!existsSync(file)) continue;
    const content = readFileSync(file);
    hash.update(`\0${path.relative(ROOT, file)}\0${content.length}\0`).update(content);
  }
  return hash.digest('hex');
}

/** Whether `.next` holds a finished build of these very sources. */
export const isBuilt = () => existsSync(path.join(ROOT, '.next/BUILD_ID')) && existsSync(STAMP) && readFileSync(STAMP, 'utf8') === sourcesHash();

/**
 * Bundles the service worker beside the build; `app/sw.js/route.ts` serves it. The page for no signal is
 * named with the build's own id, so that a new build brings a new one.
 */
async function buildWorker() {
  const { build } = await import('vite');
  const revision = readFileSync(path.join(ROOT, '.next/BUILD_ID'), 'utf8').trim();
  await build({
    root: ROOT,
    configFile: false,
    publicDir: false,
    logLevel: 'error',
    define: { 'self.__OFFLINE_PAGE': JSON.stringify({ url: '/offline', revision }), 'process.env.NODE_ENV': '"production"' },
    build: { outDir: path.join(ROOT, '.next'), emptyOutDir: false, lib: { entry: path.join(ROOT, 'lib/offline/worker.ts'), formats: ['iife'], name: 'worker', fileName: () => 'sw.js' } },
  });
}

/** Builds for production. @returns {Promise<number>} exit code */
export async function buildNow() {
  // Taken before: what changes while the build runs makes the next start build again.
  const hash = sourcesHash();
  rmSync(STAMP, { force: true });
  const code = await run(process.execPath, [NEXT_BIN, 'build'], { NODE_ENV: 'production' });
  if (code !== 0) return code;
  await buildWorker();
  writeFileSync(STAMP, hash);
  return 0;
}

/** Builds when the sources have changed since the last build. */
export async function build() {
  if (isBuilt()) return;
  say('Building. About half a minute.');
  if ((await buildNow()) !== 0) fail('The build failed; the lines above say where.');
}

if (process.argv[1] === fileURLToPath(import.meta.url)) process.exit(await buildNow());
