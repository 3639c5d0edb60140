import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { statsEntries, statsReadme } from '../../support/stats-table';

const root = fileURLToPath(new URL('../../../', import.meta.url));
const entries = statsEntries(root);

describe('the public statistics', () => {
  it('are all in stats/README.md as their docstrings and tests have them', async () => {
    await expect(statsReadme(entries)).toMatchFileSnapshot(`${root}stats/README.md`);
  });

  it.each(entries.map((entry) => [entry.name, entry] as const))('%s says what it computes and is checked by a test', (_, { docs, tests }) => {
    expect(docs.length).toBeGreaterThan(20);
    expect(tests).not.toEqual([]);
  });
});
