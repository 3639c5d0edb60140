import 'server-only';
import type { Access } from '../auth/access';
import { AppError } from '../errors';
import { readEvidence, type Evidence } from '../results/loaders';
import { reproduceBundle } from './bundle';
import { toCsv } from './csv';
import { answerRows, cellsOf, COLUMNS } from './rows';
import { toXlsx } from './xlsx';

export interface ExportFile {
  type: string;
  body: Uint8Array<ArrayBuffer>;
  /** What it is called where it is saved: neutral, by day and method. */
  name: string;
}

const bytes = (text: string): Uint8Array<ArrayBuffer> => new TextEncoder().encode(text);

async function workbook(evidence: Evidence): Promise<Uint8Array<ArrayBuffer>> {
  const { results } = evidence;
  return new Uint8Array(await toXlsx([
    { name: 'answers', columns: COLUMNS, rows: answerRows(evidence).map(cellsOf) },
    { name: 'samples', columns: ['sample', 'label', 'control', 'codes'], rows: results.samples.map((sample) => [sample.sample, sample.label, sample.isControl, sample.codes.join(' ')]) },
    { name: 'report', columns: ['item', 'text'], rows: results.report.map(({ name, text }) => [name, text]) },
  ]));
}

const FILES: Record<string, { type: string; extension: string; make(evidence: Evidence): Promise<Uint8Array<ArrayBuffer>> }> = {
  'answers.csv': { type: 'text/csv; charset=utf-8', extension: 'csv', make: async (evidence) => bytes(toCsv(COLUMNS, answerRows(evidence).map(cellsOf))) },
  'answers.xlsx': { type: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet', extension: 'xlsx', make: workbook },
  'reproduce.zip': { type: 'application/zip', extension: 'zip', make: async (evidence) => new Uint8Array(reproduceBundle(evidence)) },
};

/**
 * A file of an unsealed session.
 * @param file `answers.csv`, `answers.xlsx` or `reproduce.zip`
 * @throws AppError `not_found` (another file, or not the cellar's), `wrong_state` until the key is open
 */
export async function exportFile(access: Access, sessionId: string, file: string): Promise<ExportFile> {
  const known = Object.hasOwn(FILES, file) ? FILES[file] : undefined;
  if (!known) throw new AppError('not_found');
  const evidence = readEvidence(access, sessionId);
  const day = evidence.session.unsealedAt!.toISOString().slice(0, 10);
  return { type: known.type, body: await known.make(evidence), name: `tasting-${day}-${evidence.session.method.replaceAll('_', '-')}-${evidence.session.id.slice(0, 8)}.${known.extension}` };
}
