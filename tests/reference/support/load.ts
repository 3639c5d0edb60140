import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Case, Cell, Table } from '../answer/types';

/** Every NN_*.json of a folder with its cases, in order. */
export function readCases(folder: string): { file: string; cases: Case[] }[] {
  return readdirSync(folder)
    .filter((name) => /^\d\d_.*\.json$/.test(name))
    .sort()
    .map((file) => ({ file, cases: JSON.parse(readFileSync(join(folder, file), 'utf8')) as Case[] }));
}

/** Reads CSV files of the folder, or of `fallback` when the folder has none of that name. */
export function csvLoader(folder: string, fallback: string): (name: string) => Table {
  const kept = new Map<string, Table>();
  return (name) => {
    if (name.includes('/') || name.includes('\\')) throw new Error(`${name} is not a file of the folder`);
    let table = kept.get(name);
    if (!table) {
      const path = existsSync(join(folder, name)) ? join(folder, name) : join(fallback, name);
      table = parseCsv(readFileSync(path, 'utf8'));
      kept.set(name, table);
    }
    return table;
  };
}

/** Comma-separated text with a header row; quoted fields allowed; numbers parsed; empty or NA = null. */
export function parseCsv(text: string): Table {
  const lines = text.split(/\r?\n/).filter((line) => line !== '');
  const columns = split(lines[0]);
  return {
    columns,
    rows: lines.slice(1).map((line) => {
      const fields = split(line);
      return Object.freeze(Object.fromEntries(columns.map((column, i) => [column, cell(fields[i] ?? '')])));
    }),
  };
}

function split(line: string): string[] {
  const fields: string[] = [];
  const pattern = /(?:^|,)(?:"((?:[^"]|"")*)"|([^,]*))/g;
  for (const match of line.matchAll(pattern)) fields.push(match[1] === undefined ? match[2] : match[1].replaceAll('""', '"'));
  return fields;
}

function cell(field: string): Cell {
  if (field === '' || field === 'NA') return null;
  return /^[-+]?(\d+\.?\d*|\.\d+)([eE][-+]?\d+)?$/.test(field) ? Number(field) : field;
}

/** Freezes a value and everything inside it. */
export function deepFreeze<T>(value: T): T {
  if (value && typeof value === 'object' && !Object.isFrozen(value)) {
    Object.freeze(value);
    Object.values(value).forEach(deepFreeze);
  }
  return value;
}
