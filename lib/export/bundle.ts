import { strToU8, zipSync } from 'fflate';
import { factsOf } from '../methods/facts';
import type { Evidence } from '../results/loaders';
import { toCsv } from './csv';
import { figuresOf } from './figures';
import { answerRows, cellsOf, COLUMNS } from './rows';
import { REPRODUCE_R } from './script';

/** Which right answer a method's sets have; the constant reference is judged like the balanced one. */
const PROTOCOLS: Record<string, string> = { triangle: 'triangle', tetrad: 'tetrad', duo_trio: 'duo_trio', duo_trio_constant: 'duo_trio', two_of_five: 'two_of_five' };

function readMe(evidence: Evidence): string {
  const { results, session } = evidence;
  const gaps = results.profile?.lines.filter((line) => line.method === 'mixed').map((line) => line.name) ?? [];
  return [
    `${session.title}: ${factsOf(session.method).reportName}.`,
    '', 'answers.csv   every counted answer, one row each; people by seat number',
    'session.csv   method, risk, replicates', 'figures.csv   figures of the report, to full precision', 'reproduce.R   computes them anew with base R and compares',
    '', 'In this folder: Rscript reproduce.R', '',
    ...(gaps.length > 0 ? [`Lines with gaps were fitted by REML and are not compared: ${gaps.join(', ')}.`, ''] : []),
    'given is FALSE where a word or a rating was left alone on an answered glass and counts as 0.',
    'An order’s p, d′ and tests of words are not in figures.csv: base R has no function for them, or counts otherwise.', '',
  ].join('\r\n');
}

/** A zip with the data, the report's figures and a script that computes them anew. The same bytes each time. */
export function reproduceBundle(evidence: Evidence): Uint8Array {
  const { session, results } = evidence;
  const facts = factsOf(session.method);
  const about = [session.method, results.pair ? 'pair' : facts.ballot.kind, PROTOCOLS[session.method] ?? '', session.alpha, facts.chance, session.replicates, results.samples.length];
  const files: Record<string, string> = {
    'answers.csv': toCsv(COLUMNS, answerRows(evidence).map(cellsOf)),
    'session.csv': toCsv(['method', 'family', 'protocol', 'alpha', 'chance', 'replicates', 'samples'], [about]),
    'figures.csv': toCsv(['id', 'value'], figuresOf(results).map(({ id, value }) => [id, value])),
    'reproduce.R': REPRODUCE_R,
    'README.txt': readMe(evidence),
  };
  // A zip holds local times of even seconds: the unsealing, so that the bytes don't change.
  return zipSync(Object.fromEntries(Object.entries(files).map(([name, text]) => [name, strToU8(text)])), { mtime: session.unsealedAt!, level: 9 });
}
