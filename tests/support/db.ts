import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { closeDb, getDb, type Db } from '@/db/client';
import { migrateDatabase } from '@/db/migrate';

/**
 * A migrated database file and secrets of their own, bound to `getDb()`. Call it in `beforeEach` or
 * `beforeAll`; the former one is closed.
 */
export function testDb(): Db {
  closeDb();
  const folder = mkdtempSync(path.join(tmpdir(), 'tercet-test-'));
  process.env.DATABASE_FILE = path.join(folder, 'tercet.db');
  process.env.TERCET_SECRETS_DIR = path.join(folder, 'secrets');
  process.env.TERCET_DEMO_FILE = path.join(folder, 'demo.json');
  migrateDatabase(process.env.DATABASE_FILE);
  return getDb();
}
