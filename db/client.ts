import Database from 'better-sqlite3';
import { drizzle, type BetterSQLite3Database } from 'drizzle-orm/better-sqlite3';
import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { DB_CASING } from './casing';
import * as schema from './schema';

export type Db = BetterSQLite3Database<typeof schema> & { $client: Database.Database };
/** What a mutation receives inside `db.transaction`. */
export type Tx = Parameters<Parameters<Db['transaction']>[0]>[0];

/** Below it SQLite can corrupt a file in WAL mode that two connections use. */
const SQLITE_FLOOR = [3, 51, 3] as const;

/** How long a write waits for another process. Short: the driver blocks the whole event loop. */
export const BUSY_TIMEOUT_MS = 300;

function requireSqliteFloor(sqlite: Database.Database): void {
  const found = String(sqlite.prepare('SELECT sqlite_version()').pluck().get());
  const parts = found.split('.').map(Number);
  for (let i = 0; i < 3; i += 1) {
    const difference = (parts[i] ?? 0) - SQLITE_FLOOR[i]!;
    if (difference > 0) return;
    if (difference < 0) throw new Error(`SQLite ${found} is too old: ${SQLITE_FLOOR.join('.')} or later is needed`);
  }
}

/**
 * Opens the one connection kind of the application.
 * WAL, and `synchronous=FULL` said out loud: the driver's default drops to NORMAL after the first
 * write in WAL mode, and an acknowledged answer could then be lost in a power cut.
 * @param file absolute path, or `:memory:`
 */
export function openDatabase(file: string): Db {
  if (file !== ':memory:') mkdirSync(path.dirname(file), { recursive: true });
  const sqlite = new Database(file);
  requireSqliteFloor(sqlite);
  sqlite.pragma(`busy_timeout = ${BUSY_TIMEOUT_MS}`);
  sqlite.pragma('journal_mode = WAL');
  sqlite.pragma('synchronous = FULL');
  sqlite.pragma('foreign_keys = ON');
  sqlite.pragma('secure_delete = ON');
  sqlite.pragma('mmap_size = 0');
  return drizzle(sqlite, { schema, casing: DB_CASING });
}

/** Where the database lies: `DATABASE_FILE`, or `data/tercet.db` beside the application. */
export function databaseFile(): string {
  return process.env.DATABASE_FILE ?? path.join(/* turbopackIgnore: true */ process.cwd(), 'data', 'tercet.db');
}

const kept = globalThis as typeof globalThis & { tercetDb?: Db };

/** The process's connection, opened at the first use so that a build never touches the file. */
export function getDb(): Db {
  kept.tercetDb ??= openDatabase(databaseFile());
  return kept.tercetDb;
}

/** Closes the process's connection (tests; end of the process). */
export function closeDb(): void {
  kept.tercetDb?.$client.close();
  delete kept.tercetDb;
}
