import { openDB, type DBSchema, type IDBPDatabase } from 'idb';
import type { OutboxRow, PullRow, SheetMeta } from './types';

interface TercetDb extends DBSchema {
  outbox: { key: string; value: OutboxRow; indexes: { sheet: string } };
  meta: { key: string; value: SheetMeta };
  pulls: { key: string; value: PullRow };
}

export interface Kept {
  rows: OutboxRow[];
  meta: SheetMeta | null;
}

/** Where a sheet's operations are kept on the phone. */
export interface PhoneDatabase {
  load(sheetKey: string): Promise<Kept>;
  /** One strict transaction: when it resolves, the rows and the meta are on the disk. */
  keep(rows: OutboxRow[], meta: SheetMeta | null): Promise<void>;
  /** Every pull that this phone holds, of all cellars and hands. */
  loadPulls(): Promise<PullRow[]>;
  keepPulls(rows: readonly PullRow[]): Promise<void>;
}

/**
 * IndexedDB with strict durability. Browsers kill connections of pages in the background: a dead
 * one is opened again once, and only a second failure is passed on.
 */
export function openPhoneDatabase(name = 'tercet'): PhoneDatabase {
  let connection: Promise<IDBPDatabase<TercetDb>> | null = null;
  const open = () => {
    connection ??= openDB<TercetDb>(name, 2, {
      upgrade(db, from) {
        if (from < 1) {
          db.createObjectStore('outbox', { keyPath: 'opId' }).createIndex('sheet', 'sheetKey');
          db.createObjectStore('meta', { keyPath: 'sheetKey' });
        }
        if (from < 2) db.createObjectStore('pulls', { keyPath: 'opId' });
      },
      terminated: () => {
        connection = null;
      },
      blocking: (_current, _blocked, event) => (event.target as IDBDatabase).close(),
    });
    return connection;
  };
  const withReopen = async <T>(work: (db: IDBPDatabase<TercetDb>) => Promise<T>): Promise<T> => {
    try {
      return await work(await open());
    } catch {
      connection = null;
      return work(await open());
    }
  };
  return {
    load: (sheetKey) =>
      withReopen(async (db) => ({
        rows: await db.getAllFromIndex('outbox', 'sheet', sheetKey),
        meta: (await db.get('meta', sheetKey)) ?? null,
      })),
    keep: (rows, meta) =>
      withReopen(async (db) => {
        const tx = db.transaction(['outbox', 'meta'], 'readwrite', { durability: 'strict' });
        const writes: Promise<unknown>[] = rows.map((row) => tx.objectStore('outbox').put(row));
        if (meta) writes.push(tx.objectStore('meta').put(meta));
        await Promise.all([...writes, tx.done]);
      }),
    loadPulls: () => withReopen((db) => db.getAll('pulls')),
    keepPulls: (rows) =>
      withReopen(async (db) => {
        const tx = db.transaction('pulls', 'readwrite', { durability: 'strict' });
        await Promise.all([...rows.map((row) => tx.store.put(row)), tx.done]);
      }),
  };
}
