import { spawn } from 'node:child_process';
import { beforeEach, describe, expect, it } from 'vitest';
import { BUSY_TIMEOUT_MS, type Db } from '@/db/client';
import { asAppError } from '@/lib/errors';
import { testDb } from '../../support/db';

let db: Db;
beforeEach(() => {
  db = testDb();
});

const addCellar = (slug: string) => db.$client.prepare("INSERT INTO cellars (id, slug, name, time_zone, drink, is_demo, created_at, version) VALUES (?, ?, 'C', 'UTC', 'wine', 0, 0, 1)").run(slug, slug);

describe('the connection', () => {
  it('still syncs every commit to the disk after the first write (the driver drops to NORMAL in WAL)', () => {
    addCellar('a');
    expect(db.$client.pragma('synchronous', { simple: true })).toBe(2);
    expect(db.$client.pragma('journal_mode', { simple: true })).toBe('wal');
    expect(db.$client.pragma('foreign_keys', { simple: true })).toBe(1);
    expect(db.$client.pragma('secure_delete', { simple: true })).toBe(1);
    expect(db.$client.pragma('mmap_size', { simple: true }) ?? 0).toBe(0);
  });

  it('runs on an SQLite without the WAL-reset bug: 3.51.3 or later', () => {
    const [major, minor, patch] = String(db.$client.prepare('SELECT sqlite_version()').pluck().get()).split('.').map(Number);
    expect(major! * 1e6 + minor! * 1e3 + patch!).toBeGreaterThanOrEqual(3_051_003);
  });

  it('waits shortly for another writer, then says busy, and writes again afterwards', async () => {
    const holder = spawn(process.execPath, ['-e', `
      const Database = require('better-sqlite3'); const db = new Database(process.argv[1]);
      db.exec('BEGIN IMMEDIATE'); console.log('held'); setTimeout(() => { db.exec('COMMIT'); process.exit(0); }, 1500);
    `, process.env.DATABASE_FILE!], { stdio: ['ignore', 'pipe', 'inherit'] });
    await new Promise((resolve) => holder.stdout.once('data', resolve));
    const began = performance.now();
    let refused: unknown;
    try {
      addCellar('b');
    } catch (error) {
      refused = error;
    }
    expect(asAppError(refused)).toMatchObject({ code: 'busy', status: 503 });
    expect(performance.now() - began).toBeLessThan(BUSY_TIMEOUT_MS + 400);
    await new Promise((resolve) => holder.once('exit', resolve));
    expect(addCellar('b').changes).toBe(1);
  });
});
