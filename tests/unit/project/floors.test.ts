import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';

const lock = JSON.parse(readFileSync('package-lock.json', 'utf8')) as { packages: Record<string, { version: string; resolved?: string }> };
const versionOf = (name: string) => lock.packages[`node_modules/${name}`]!.version;
const number = (version: string) => version.split('.').map(Number).reduce((sum, part) => sum * 1000 + part, 0);

function filesUnder(folder: string): string[] {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    const file = path.join(folder, entry.name);
    return entry.isDirectory() ? filesUnder(file) : /\.(ts|tsx|mjs)$/.test(entry.name) ? [file] : [];
  });
}

describe('the lock file', () => {
  it('holds a Next.js with the fixes of August 2026 (16.3.3)', () => {
    expect(number(versionOf('next'))).toBeGreaterThanOrEqual(number('16.3.3'));
  });

  it('holds versions that run on Node.js 20: better-sqlite3 12, iron-session 8', () => {
    expect(versionOf('better-sqlite3')).toMatch(/^12\./);
    expect(versionOf('iron-session')).toMatch(/^8\./);
  });

  it('names no registry, and package.json pins exactly', () => {
    expect(Object.values(lock.packages).filter((entry) => entry.resolved?.startsWith('http'))).toEqual([]);
    const { dependencies, devDependencies } = JSON.parse(readFileSync('package.json', 'utf8')) as Record<string, Record<string, string>>;
    for (const [name, version] of Object.entries({ ...dependencies, ...devDependencies })) expect(`${name} ${version}`).toMatch(/^[@\w/.-]+ \d+\.\d+\.\d+$/);
  });
});

describe('the sources', () => {
  it('draw no chance from Math.random on the server', () => {
    for (const file of [...filesUnder('app'), ...filesUnder('lib'), ...filesUnder('db'), ...filesUnder('stats')]) expect(`${file}: ${readFileSync(file, 'utf8').includes('Math.random')}`).toBe(`${file}: false`);
  });

  it('put no HTML into a page as text', () => {
    for (const file of [...filesUnder('app'), ...filesUnder('components')]) expect(`${file}: ${readFileSync(file, 'utf8').includes('dangerouslySetInnerHTML')}`).toBe(`${file}: false`);
  });

  it('open the vault in few places: the blind, the life cycle, the demo', () => {
    const users = [...filesUnder('app'), ...filesUnder('components'), ...filesUnder('lib')].filter((file) => /from '(\.\.?\/)+(blind\/)?vault'|blind\/vault'/.test(readFileSync(file, 'utf8')));
    expect(users.sort()).toEqual(['lib/blind/read-key.ts', 'lib/demo/tasting.ts', 'lib/sessions/early-opening.ts', 'lib/sessions/lifecycle.ts', 'lib/sessions/seal.ts']);
  });

  it('hand no database row to a component: client files name no table type', () => {
    for (const file of filesUnder('components')) expect(`${file}: ${/\$inferSelect|@\/db\/(schema|client)/.test(readFileSync(file, 'utf8'))}`).toBe(`${file}: false`);
  });
});
