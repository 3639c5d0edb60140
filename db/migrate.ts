import Database from 'better-sqlite3';
import { drizzle } from 'drizzle-orm/better-sqlite3';
import { migrate } from 'drizzle-orm/better-sqlite3/migrator';
import { mkdirSync, readFileSync, renameSync, rmSync } from 'node:fs';
import path from 'node:path';

/** Without these the promises about evidence are empty, so their presence is checked each time. */
export const REQUIRED_TRIGGERS = [
  'audit_events_no_delete', 'audit_events_no_update', 'ballot_items_fixed_by_sealing',
  'operations_counted_only_while_open', 'operations_no_delete', 'operations_no_update',
  'samples_fixed_by_sealing', 'seals_no_delete', 'seals_no_update', 'serving_samples_no_delete',
  'serving_samples_no_update', 'serving_samples_only_after_unsealing', 'servings_no_delete',
  'servings_no_update', 'servings_only_while_sealing', 'sessions_states_in_order',
] as const;

export const migrationsFolder = () => path.join(/* turbopackIgnore: true */ process.cwd(), 'db', 'migrations');

function rowCounts(sqlite: Database.Database): Map<string, number> {
  const names = sqlite
    .prepare("SELECT name FROM sqlite_schema WHERE type = 'table' AND name NOT LIKE 'sqlite_%' AND name NOT LIKE '\\_\\_%' ESCAPE '\\'")
    .pluck()
    .all() as string[];
  return new Map(names.map((name) => [name, sqlite.prepare(`SELECT count(*) FROM "${name}"`).pluck().get() as number]));
}

function pendingMigrations(sqlite: Database.Database, folder: string): number {
  const journal = JSON.parse(readFileSync(path.join(folder, 'meta', '_journal.json'), 'utf8')) as { entries: unknown[] };
  const hasLog = sqlite.prepare("SELECT 1 FROM sqlite_schema WHERE name = '__drizzle_migrations'").get();
  const done = hasLog ? (sqlite.prepare('SELECT count(*) FROM __drizzle_migrations').pluck().get() as number) : 0;
  return journal.entries.length - done;
}

function requireNothingLost(sqlite: Database.Database, before: ReadonlyMap<string, number>, allowedLosses: readonly string[]): void {
  const after = rowCounts(sqlite);
  for (const [table, count] of before) {
    if (!allowedLosses.includes(table) && (after.get(table) ?? 0) < count) {
      throw new Error(`A migration lost rows of ${table}: ${count} before, ${after.get(table) ?? 0} after.`);
    }
  }
  const broken = sqlite.pragma('foreign_key_check') as unknown[];
  if (broken.length > 0) throw new Error(`A migration broke ${broken.length} references.`);
  requireTriggers(sqlite);
}

/** Puts the copy in the place of the file, so that the next start doesn't go on with what was damaged. */
function goBack(file: string, copy: string): void {
  for (const end of ['', '-wal', '-shm']) rmSync(`${file}${end}`, { force: true });
  renameSync(copy, file);
}

/**
 * Brings the file to the newest schema on a connection of its own with foreign keys off: a rebuilt
 * parent table would otherwise wipe its children inside the migrator's transaction, where turning
 * the keys off has no effect. A copy is made first; rows lost, broken references or missing
 * triggers afterwards are an error, and the copy takes the file's place again.
 * @param allowedLosses tables that a migration is meant to empty or drop
 * @returns how many migrations ran
 */
export function migrateDatabase(file: string, folder = migrationsFolder(), allowedLosses: readonly string[] = []): number {
  mkdirSync(path.dirname(file), { recursive: true });
  const sqlite = new Database(file);
  let copy: string | null = null;
  try {
    sqlite.pragma('journal_mode = WAL');
    sqlite.pragma('synchronous = FULL');
    const pending = pendingMigrations(sqlite, folder);
    if (pending === 0) {
      requireTriggers(sqlite);
      return 0;
    }
    const before = rowCounts(sqlite);
    if (before.size > 0) {
      const name = `${file}.before-${new Date().toISOString().replaceAll(/[:.]/g, '-')}`;
      sqlite.prepare('VACUUM INTO ?').run(name);
      copy = name;
    }
    sqlite.pragma('foreign_keys = OFF');
    migrate(drizzle(sqlite), { migrationsFolder: folder });
    requireNothingLost(sqlite, before, allowedLosses);
    return pending;
  } catch (error) {
    sqlite.close();
    if (copy) goBack(file, copy);
    const text = error instanceof Error ? error.message : String(error);
    throw new Error(copy ? `${text} The database is as it was before.` : text, { cause: error });
  } finally {
    sqlite.close();
  }
}

function requireTriggers(sqlite: Database.Database): void {
  const found = new Set(sqlite.prepare("SELECT name FROM sqlite_schema WHERE type = 'trigger'").pluck().all() as string[]);
  const missing = REQUIRED_TRIGGERS.filter((name) => !found.has(name));
  if (missing.length > 0) throw new Error(`The database lacks the triggers that protect evidence: ${missing.join(', ')}`);
}
