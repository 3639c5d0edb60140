import 'server-only';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import type { Method } from '@/db/enums';
import { strToU8, zipSync, type Zippable } from 'fflate';
import { factsOf } from '../methods/facts';
import type { ResultsView } from '../results/types';
import { csvOf } from './csv';
import { figuresOf, figuresTable } from './figures';
import { answersTable, glassesTable, longRows, type ExportFacts } from './long-data';
import { readmeOf } from './readme';
import { seatsTable } from './sheets';
import type { Table } from './table';

export interface BundleSource {
  results: ResultsView;
  facts: ExportFacts;
  design: { method: Method; alpha: number; replicates: number };
  unsealedAt: Date;
}

/** The parts of the script; the first is the one to run. */
const SCRIPTS = ['reproduce.R', 'read.R', 'compare.R', 'range.R', 'lines.R', 'gaps.R', 'panelists.R', 'choices.R', 'orders.R', 'counts.R'] as const;

/** What an untouched line of an answered glass counts as, where it is not missing. */
const ABSENT: Partial<Record<Method, number>> = { rate_all: 0 };

const scriptsFolder = () => path.join(/* turbopackIgnore: true */ process.cwd(), 'lib', 'export', 'r');

/** What was fixed before the tasting and the script can't read off the answers. */
function designTable({ results, design }: BundleSource): Table {
  const { profile } = results;
  // The overall liking beside other questions is asked on nine points.
  const scale = profile?.scale ?? { low: 1, high: 9 };
  const rows: [string, string | number | null][] = [
    ['method', design.method], ['alpha', design.alpha], ['replicates', design.replicates], ['samples', results.samples.length],
    ['scale_low', scale.low], ['scale_high', scale.high], ['absent', ABSENT[design.method] ?? null], ['chance', factsOf(design.method).chance],
  ];
  return { columns: ['name', 'value'], rows };
}

/**
 * The same time of day in the machine's zone as `at` has in UTC. Zip archives keep local time without a
 * zone, so the bytes would otherwise hang on where the server stands.
 */
const asLocal = (at: Date): Date => new Date(at.getUTCFullYear(), at.getUTCMonth(), at.getUTCDate(), at.getUTCHours(), at.getUTCMinutes(), at.getUTCSeconds());

/**
 * The bundle as a zip: data, figures, script, and what they are. The same session gives the same bytes: every
 * file bears the time of unsealing. Seats stand by their numbers, no name is in it.
 */
export function bundleOf(source: BundleSource): Uint8Array<ArrayBuffer> {
  const { results, facts } = source;
  const flags = facts.items.filter((item) => item.kind === 'flag').map((item) => item.item);
  const figures = figuresOf(results, flags);
  const files: Zippable = {
    'README.txt': strToU8(readmeOf(results)),
    'reproduce.R': readFileSync(path.join(scriptsFolder(), 'reproduce.R')),
    ...Object.fromEntries(SCRIPTS.slice(1).map((name) => [`R/${name}`, readFileSync(path.join(scriptsFolder(), name))])),
    'figures.csv': strToU8(csvOf(figuresTable(figures))),
    'data/answers.csv': strToU8(csvOf(answersTable(longRows(facts)))),
    'data/glasses.csv': strToU8(csvOf(glassesTable(facts))),
    'data/seats.csv': strToU8(csvOf(seatsTable(results))),
    'data/design.csv': strToU8(csvOf(designTable(source))),
  };
  return zipSync(files, { mtime: asLocal(source.unsealedAt), level: 9 });
}
