import { resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { getCurrentTest } from 'vitest/suite';
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

for (const { file, cases } of files) {
  describe(file, () => {
    it.each(cases.map((c, i) => [`${i + 1}. ${c.case}`, c] as const))('%s', (_, c) => {
      const { meta } = getCurrentTest()!;
      meta.compared = { of: 'Reference', values: 0, differs: true };
      const { expected, ...open } = c;
      const input = deepFreeze({ ...structuredClone(open), file, given: questionsOf(file, expected) });
      const answerer = answerers.find((a) => a.matches(input));
      if (!answerer) throw new Error('No answering code recognises this case');
      const { values, failures } = compare(expected, answerer.answer(input, load), c.tolerance);
      meta.compared = { of: 'Reference', values, differs: failures.length > 0 };
      expect(failures.slice(0, 12), `${failures.length} of ${values} values differ`).toEqual([]);
      expect(values).toBeGreaterThan(0);
    });
  });
}
