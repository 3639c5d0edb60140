import { spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { ROOT } from '../support/server';

/** The peer: an application of the same framework whose one handler does one insert with FULL. Built at each run, outside the project. */
export function buildBareApp(): string {
  const folder = mkdtempSync(path.join(tmpdir(), 'tercet-bare-'));
  mkdirSync(path.join(folder, 'app/api/one'), { recursive: true });
  mkdirSync(path.join(folder, 'app/api/health'), { recursive: true });
  symlinkSync(path.join(ROOT, 'node_modules'), path.join(folder, 'node_modules'));
  const write = (name: string, text: string) => writeFileSync(path.join(folder, name), text);
  write('package.json', '{"private":true,"type":"module"}');
  write('next.config.mjs', "export default { agentRules: false, poweredByHeader: false, turbopack: { root: '/' } };");
  write('app/layout.js', 'export default function Layout({ children }) { return <html lang="en"><body>{children}</body></html>; }');
  write('app/page.js', 'export default function Page() { return null; }');
  write('app/api/health/route.js', "export const dynamic = 'force-dynamic';\nexport const GET = () => Response.json({ ok: true });");
  write('app/api/one/route.js', `import Database from 'better-sqlite3';
let insert;
export const dynamic = 'force-dynamic';
export async function POST(request) {
  if (!insert) {
    const db = new Database(process.env.DATABASE_FILE);
    db.pragma('journal_mode = WAL');
    db.pragma('synchronous = FULL');
    db.exec('CREATE TABLE IF NOT EXISTS answers (id TEXT PRIMARY KEY, value INTEGER)');
    insert = db.prepare('INSERT INTO answers VALUES (?, ?)');
  }
  const { id, value } = await request.json();
  insert.run(id, value);
  return Response.json({ ok: true });
}`);
  const built = spawnSync(process.execPath, [path.join(ROOT, 'node_modules/next/dist/bin/next'), 'build'], { cwd: folder, encoding: 'utf8', env: { ...process.env, NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' } });
  if (built.status !== 0) throw new Error(`the bare application did not build:\n${built.stdout}\n${built.stderr}`);
  return folder;
}
