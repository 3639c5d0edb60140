import type { OutboxRow } from './types';

/** The last resort beside IndexedDB: what has not been received yet, as one text. */
export interface Mirror {
  read(sheetKey: string): OutboxRow[];
  /** @returns whether it was kept */
  write(sheetKey: string, rows: OutboxRow[]): boolean;
}

const nameOf = (sheetKey: string) => `tercet-outbox:${sheetKey}`;

/** In `localStorage`, which may be missing, full or forbidden: then it keeps nothing and says so. */
export function localMirror(): Mirror {
  return {
    read(sheetKey) {
      try {
        const rows: unknown = JSON.parse(localStorage.getItem(nameOf(sheetKey)) ?? '[]');
        return Array.isArray(rows) ? (rows as OutboxRow[]) : [];
      } catch {
        return [];
      }
    },
    write(sheetKey, rows) {
      try {
        if (rows.length === 0) localStorage.removeItem(nameOf(sheetKey));
        else localStorage.setItem(nameOf(sheetKey), JSON.stringify(rows));
        return true;
      } catch {
        return false;
      }
    },
  };
}
