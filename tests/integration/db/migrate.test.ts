import Database from 'better-sqlite3';
import { cpSync, mkdtempSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { openDatabase } from '@/db/client';
import { migrateDatabase, REQUIRED_TRIGGERS } from '@/db/migrate';

const own = path.resolve('db/migrations');

/** The project's migrations with one more, written by the test. */
function withMigration(sql: string): string {
  const folder = path.join(mkdtempSync(path.join(tmpdir(), 'tercet-migrations-')), 'migrations');
  cpSync(own, folder, { recursive: true });
  const file = path.join(folder, 'meta', '_journal.json');
  const journal = JSON.parse(readFileSync(file, 'utf8'));
  const last = journal.entries.at(-1);
  journal.entries.push({ ...last, idx: last.idx + 1, when: last.when + 1, tag: '9999_test' });
  writeFileSync(file, JSON.stringify(journal));
  writeFileSync(path.join(folder, '9999_test.sql'), sql);
  return folder;
}

const newFile = () => path.join(mkdtempSync(path.join(tmpdir(), 'tercet-db-')), 'tercet.db');

function withLots(): string {
  const file = newFile();
  migrateDatabase(file);
  const { $client: sqlite } = openDatabase(file);
  sqlite.exec("INSERT INTO cellars (id, slug, name, time_zone, drink, is_demo, created_at, version) VALUES ('c', 'c', 'C', 'UTC', 'wine', 0, 0, 1)");
  const insert = sqlite.prepare("INSERT INTO lots (id, cellar_id, code, name, drink, note, created_at, version) VALUES (?, 'c', ?, 'x', 'wine', '', 0, 1)");
  for (let i = 0; i < 500; i += 1) insert.run(String(i), String(i));
  sqlite.close();
  return file;
}

const countLots = (file: string) => {
  const sqlite = new Database(file, { readonly: true });
  const count = sqlite.prepare('SELECT count(*) FROM lots').pluck().get();
  sqlite.close();
  return count;
};

/** The shape that drizzle-kit writes when a column's default changes: the parent is made anew. */
const REBUILD = `PRAGMA foreign_keys=OFF;--> statement-breakpoint
CREATE TABLE children (id text PRIMARY KEY, cellar_id text NOT NULL REFERENCES cellars(id) ON DELETE CASCADE);--> statement-breakpoint
INSERT INTO children SELECT id, cellar_id FROM lots;--> statement-breakpoint
CREATE TABLE __new_cellars AS SELECT * FROM cellars;--> statement-breakpoint
DROP TABLE cellars;--> statement-breakpoint
CREATE TABLE cellars (id text PRIMARY KEY NOT NULL, slug text NOT NULL, name text NOT NULL, time_zone text NOT NULL, drink text NOT NULL, is_demo integer DEFAULT false NOT NULL, created_at integer NOT NULL, version integer DEFAULT 2 NOT NULL);--> statement-breakpoint
INSERT INTO cellars SELECT * FROM __new_cellars;--> statement-breakpoint
DROP TABLE __new_cellars;--> statement-breakpoint
PRAGMA foreign_keys=ON;`;

describe('migrations', () => {
  it('keep the children of a rebuilt parent table (drizzle-orm issue 5782)', () => {
    const file = withLots();
    expect(migrateDatabase(file, withMigration(REBUILD))).toBe(1);
    const sqlite = new Database(file, { readonly: true });
    expect(sqlite.prepare('SELECT count(*) FROM children').pluck().get()).toBe(500);
    expect(sqlite.pragma('foreign_key_check')).toEqual([]);
    sqlite.close();
  });

  it('are refused, with the former file back, when rows are lost', () => {
    const file = withLots();
    expect(() => migrateDatabase(file, withMigration('DELETE FROM lots WHERE id < \'250\';'))).toThrow(/lost rows of lots/);
    expect(countLots(file)).toBe(500);
    expect(migrateDatabase(file)).toBe(0);
  });

  it('are refused when a trigger that protects evidence is gone', () => {
    for (const trigger of ['operations_no_update', 'audit_events_no_delete']) {
      const file = withLots();
      expect(() => migrateDatabase(file, withMigration(`DROP TRIGGER ${trigger};`))).toThrow(new RegExp(trigger));
      expect(countLots(file)).toBe(500);
    }
  });

  it('never drop a table or cascade a deletion in this project without being looked at', () => {
    const files = readdirSync(own).filter((name) => name.endsWith('.sql'));
    expect(files.length).toBeGreaterThanOrEqual(2);
    const sql = files.map((name) => readFileSync(path.join(own, name), 'utf8')).join('\n');
    expect(sql).not.toMatch(/DROP TABLE/i);
    expect(sql).not.toMatch(/ON DELETE CASCADE/i);
    for (const trigger of REQUIRED_TRIGGERS) expect(sql).toContain(`CREATE TRIGGER ${trigger}`);
  });
});
