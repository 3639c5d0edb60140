import { existsSync } from 'node:fs';
import path from 'node:path';
import { performance } from 'node:perf_hooks';
import { build } from './start/build.mjs';
import { greet } from './start/greeting.mjs';
import { install, requireNode } from './start/install.mjs';
import { ROOT } from './start/run.mjs';
import { fail, say } from './start/say.mjs';
import { requireFreePort, serve } from './start/serve.mjs';

// `npm start`: from a fresh clone to a served application. Node's own modules only, because it
// runs before anything is installed. Migration and the demo's filling are done by the server
// itself at its start (instrumentation.ts).

const port = Number(process.env.PORT || 3000);
if (!Number.isInteger(port) || port < 1 || port > 65_535) fail('PORT must be a number from 1 to 65535.');
const absolute = (file, otherwise) => path.resolve(ROOT, file || otherwise);
const databaseFile = absolute(process.env.DATABASE_FILE, 'data/tercet.db');
const beside = (name) => path.join(path.dirname(databaseFile), name);
const settings = {
  DATABASE_FILE: databaseFile,
  TERCET_SECRETS_DIR: absolute(process.env.TERCET_SECRETS_DIR, 'data/secrets'),
  TERCET_DEMO_FILE: absolute(process.env.TERCET_DEMO_FILE, beside('demo.json')),
  TERCET_FIRST_OWNER_FILE: absolute(process.env.TERCET_FIRST_OWNER_FILE, beside('first-owner.json')),
};
Object.assign(process.env, settings);

requireNode();
await requireFreePort(port);
await install();
await build();
say(existsSync(databaseFile) ? 'Starting.' : 'Starting, with a new database.');
// Database, copies and files with sign-ins are for this user's eyes only.
process.umask(0o077);
const began = performance.now();
const { ended } = await serve(port);
say(`Ready in ${((performance.now() - began) / 1000).toFixed(1)} s.`);
greet({ port, demoFile: settings.TERCET_DEMO_FILE, firstOwnerFile: settings.TERCET_FIRST_OWNER_FILE, isDemo: process.env.TERCET_DEMO !== '0' });
process.exit(await ended);
