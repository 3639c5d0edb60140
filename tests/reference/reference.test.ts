import { resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, describe, expect, it } from 'vitest';
import { loadAnswerers } from './support/answerers';
import { compare } from './support/compare';
import { csvLoader, deepFreeze, readCases } from './support/load';
import { questionsOf } from './support/questions';

/*
 * Answers every case of a folder of reference values from its inputs and data alone, and compares.
 * REFERENCE_DIR names another folder of the same form; its README.md says what the fields mean.
 */
const own = fileURLToPath(new URL('./cases', import.meta.url));
const folder = process.env.REFERENCE_DIR ? resolve(process.env.REFERENCE_DIR) : own;
const load = csvLoader(folder, own);
const answerers = await loadAnswerers();
const files = readCases(folder);

let cases = 0;
let values = 0;
let wrong = 0;

for (const { file, cases: list } of files) {
  describe(file, () => {
    it.each(list.map((c, i) => [`${i + 1}. ${c.case}`, c] as const))('%s', (_, c) => {
      cases += 1;
      const { expected, ...open } = c;
      const input = deepFreeze({ ...structuredClone(open), file, given: questionsOf(file, expected) });
      const answerer = answerers.find((a) => a.matches(input));
      if (!answerer) {
        wrong += 1;
        throw new Error('No answering code recognises this case');
      }
      const { values: compared, failures } = compare(expected, answerer.answer(input, load), c.tolerance);
      values += compared;
      if (failures.length > 0) wrong += 1;
      expect(failures.slice(0, 12), `${failures.length} of ${compared} values differ`).toEqual([]);
      expect(compared).toBeGreaterThan(0);
    });
  });
}

afterAll(() => {
  console.log(`Reference: ${cases} cases compared, ${values} values, ${wrong} cases with differences`);
});
