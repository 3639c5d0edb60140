import 'server-only';
import { getDb } from '@/db/client';
import type { Access } from '../auth/access';
import { slugOf } from '../cellars/slug';
import { listGlasses, listItems, listOperations, listSeats } from '../results/data';
import { countAnswers } from '../results/evidence';
import { readResults } from '../results/loaders';
import { findSession } from '../sessions/find';
import { bundleOf, type BundleSource } from './bundle';
import { csvOf } from './csv';
import { answersTable, longRows } from './long-data';
import { reportTable, samplesTable, seatsTable } from './sheets';
import { xlsxOf } from './xlsx';

/** A file with the name that it is saved under. */
export interface ExportFile<Body> {
  name: string;
  body: Body;
}

interface Wish {
  /** Panelists' names beside their seats. */
  withNames: boolean;
}

/**
 * The results and the facts behind them, as of one moment. `readResults` comes first: what it refuses is
 * refused here, before any answer is read.
 */
function readSource(access: Access, sessionId: string): BundleSource {
  return getDb().transaction((tx) => {
    const results = readResults(access, sessionId);
    const session = findSession(tx, access.cellar.id, sessionId);
    return {
      results,
      facts: {
        answers: countAnswers(listOperations(tx, session)), glasses: listGlasses(tx, session), seats: listSeats(tx, session), items: listItems(tx, session), samples: results.samples,
      },
      design: { method: session.method, alpha: session.alpha, replicates: session.replicates },
      unsealedAt: session.unsealedAt!,
    };
  });
}

/** Named by the neutral title: a file's name travels further than the file. */
const nameOf = ({ results }: BundleSource, rest: string) => `${slugOf(results.session.title)}-${rest}`;

/**
 * Every answer that counts, in the long form, as CSV.
 * @throws AppError `not_found`, and `wrong_state` until the key is open
 */
export function readAnswersCsv(access: Access, sessionId: string, wish: Wish): ExportFile<string> {
  const source = readSource(access, sessionId);
  return { name: nameOf(source, 'answers.csv'), body: csvOf(answersTable(longRows(source.facts), wish)) };
}

/**
 * A workbook of answers, samples, seats and how the session was run.
 * @throws AppError `not_found`, and `wrong_state` until the key is open
 */
export async function readWorkbook(access: Access, sessionId: string, wish: Wish): Promise<ExportFile<Uint8Array<ArrayBuffer>>> {
  const source = readSource(access, sessionId);
  const body = await xlsxOf([
    { name: 'answers', table: answersTable(longRows(source.facts), wish) },
    { name: 'samples', table: samplesTable(source.results) },
    { name: 'seats', table: seatsTable(source.results, wish) },
    { name: 'report', table: reportTable(source.results) },
  ]);
  return { name: nameOf(source, 'answers.xlsx'), body };
}

/**
 * The data, the figures of the results and a script that computes these from those, as a zip. No names.
 * @throws AppError `not_found`, and `wrong_state` until the key is open
 */
export function readBundle(access: Access, sessionId: string): ExportFile<Uint8Array<ArrayBuffer>> {
  const source = readSource(access, sessionId);
  return { name: nameOf(source, 'reproduce.zip'), body: bundleOf(source) };
}
