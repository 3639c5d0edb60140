import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { describe, expect, it } from 'vitest';
import { getCurrentTest } from 'vitest/suite';
import { deepFreeze } from './support/load';
import { parsePrinted, plain, Printed } from './support/printed';
import type { WorkedAnswerer, WorkedInput } from './worked/types';

/*
 * Published and recalled examples of worked-examples.json, answered from `inputs` (and the test's name) alone.
 * REFERENCE_DIR names another folder with such a file. `verified` binds to the digits it prints; `published`
 * too, to one and a half units of its last digit, unless the file marks it as wrong: then ours must differ from it.
 */
const own = fileURLToPath(new URL('./cases', import.meta.url));
const file = join(process.env.REFERENCE_DIR ? resolve(process.env.REFERENCE_DIR) : own, 'worked-examples.json');

interface Example extends WorkedInput {
  readonly published: unknown;
  readonly verified: unknown;
  readonly agrees: boolean | null;
}

/** Parts of examples that are not figures of ours to compute, with the reason. */
const SKIPPED_PARTS: Readonly<Record<string, string>> = {
  decision: 'a sentence',
  statement: 'a sentence',
  rule: 'a sentence',
  formula: 'a formula',
  identities: 'a formula',
  recalled_before_computing: 'the same cells stand in `verified`',
  recalled: 'the same cells stand in `verified`',
  '7_3_blocks': 'one of many designs; ours is counted',
};

const folder = fileURLToPath(new URL('./worked/', import.meta.url));
const modules = await Promise.all(
  readdirSync(folder)
    .filter((name) => name.endsWith('.ts') && name !== 'types.ts')
    .map((name) => import(/* @vite-ignore */ pathToFileURL(join(folder, name)).href) as Promise<{ answers: WorkedAnswerer[] }>),
);
const answerers = modules.flatMap((module) => module.answers);

interface Outcome {
  values: number;
  differences: string[];
}

/** Compares every printed figure that the answer has a place for; a missing place is a difference when `binding`. */
function compare(expected: unknown, actual: unknown, units: number, binding: boolean, path: string, outcome: Outcome): void {
  if (expected instanceof Printed) {
    if (actual === undefined && !binding) return;
    outcome.values += 1;
    const isWhole = Number.isInteger(actual) && expected.decimals <= 0;
    const reach = isWhole ? 0 : units * expected.unit * (1 + 1e-9);
    if (typeof actual !== 'number' || Math.abs(actual - expected.value) > reach) outcome.differences.push(`${path}: ${expected.text} expected, ${String(actual)} computed`);
  } else if (Array.isArray(expected) || (expected !== null && typeof expected === 'object')) {
    // More rows than printed are wrong rows. Not so for `published`, which may quote a part, and where length alone must not make a negative control.
    if (binding && Array.isArray(expected) && Array.isArray(actual) && actual.length > expected.length) {
      outcome.differences.push(`${path}: ${expected.length} items expected, ${actual.length} computed`);
    }
    for (const [key, inner] of Object.entries(expected)) {
      if (SKIPPED_PARTS[key] && !Array.isArray(expected)) continue;
      compare(inner, (actual as Record<string, unknown> | undefined)?.[key], units, binding, `${path}.${key}`, outcome);
    }
  } else if (actual !== undefined || binding) {
    outcome.values += 1;
    if (actual !== expected && !isFraction(expected, actual)) outcome.differences.push(`${path}: ${String(expected)} expected, ${String(actual)} computed`);
  }
}

/** "1/70" or "21.0" beside a number. */
function isFraction(expected: unknown, actual: unknown): boolean {
  if (typeof expected !== 'string' || typeof actual !== 'number') return false;
  const [over, under = '1'] = expected.split('/');
  return Math.abs(actual - Number(over) / Number(under)) <= 0.05 * (over.includes('.') ? 1 : 1e-9);
}

describe.skipIf(!existsSync(file))('worked examples', () => {
  const examples = existsSync(file) ? (parsePrinted(readFileSync(file, 'utf8')) as Example[]) : [];
  it.each(examples.map((example) => [example.id, example] as const))('%s', (_, example) => {
    const { meta } = getCurrentTest()!;
    meta.compared = { of: 'Worked examples', values: 0, differs: true };
    const input = deepFreeze({ id: example.id, test: example.test, inputs: plain(example.inputs) as WorkedInput['inputs'] });
    const answerer = answerers.find((a) => a.matches(input));
    if (!answerer) throw new Error(`No answering code recognises ${example.test}`);
    const answer = answerer.answer(input);
    const verified: Outcome = { values: 0, differences: [] };
    compare(example.verified, answer, 0.5, true, 'verified', verified);
    const published: Outcome = { values: 0, differences: [] };
    if (example.published !== null) compare(example.published, answer, 1.5, false, 'published', published);
    const agrees = published.differences.length === 0;
    meta.compared = { of: 'Worked examples', values: verified.values + published.values, differs: verified.differences.length > 0 || agrees === (example.agrees === false) };
    expect(verified.differences).toEqual([]);
    expect(verified.values).toBeGreaterThan(0);
    if (example.agrees === false) expect(published.differences).not.toEqual([]);
    else expect(published.differences).toEqual([]);
  });
});
