import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { choose } from '@/lib/planner/choose';
import { planDiscrimination } from '@/lib/planner/plan-discrimination';
import { planProfile } from '@/lib/planner/plan-profile';
import { choosingSchema, discriminationSchema, profileSchema, readQuery } from '@/lib/planner/schema';

const errorsOf = (query: Record<string, string>) => {
  const read = readQuery(discriminationSchema(8), query);
  return read.ok ? {} : read.errors;
};

describe('what is typed', () => {
  it('may be nothing at all', () => {
    expect(readQuery(discriminationSchema(8), {})).toMatchObject({ ok: true, value: { protocol: 'triangle', panel: 8, size: { by: 'pd', value: 0.5 } } });
    expect(readQuery(choosingSchema, {})).toMatchObject({ ok: true, value: { wineMl: null, people: null, servingMl: 30, isStrong: false } });
    expect(readQuery(profileSchema(1), {})).toMatchObject({ ok: true, value: { panelists: 2 } });
  });

  it('may have a decimal comma, a repeated name, unknown names', () => {
    expect(readQuery(discriminationSchema(8), { alpha: '0,1', pd: ['0.4', '0.9'], other: 'x' })).toMatchObject({ ok: true, value: { alpha: 0.1, size: { value: 0.4 } } });
  });

  it.each([
    ['alpha', '0', 'α: a number from 0.001 to 0.5'],
    ['alpha', 'NaN', 'α: a number from 0.001 to 0.5'],
    ['beta', '1', 'β: a number from 0.001 to 0.5'],
    ['pd', '1', 'Share of people who taste it: a number from 0.05 to 0.95'],
    ['dprime', '-2', 'd′: a number from 0.5 to 5'],
    ['panel', '1e9', 'People at hand: a number from 1 to 500'],
    ['panel', '7.5', 'People at hand: a whole number'],
    ['panel', '1e400', 'People at hand: a number from 1 to 500'],
    ['replicates', 'two', 'Sets for each person: a number from 1 to 4'],
    ['protocol', 'coin', 'Choose one of the tests'],
    ['sided', 'two', 'Both directions: only a pair has two of them'],
  ])('%s = %s is answered in words', (name, text, words) => {
    expect(errorsOf({ [name]: text })[name]).toEqual([words]);
  });

  it('never throws, and what it lets through can be planned', () => {
    const text = fc.oneof(fc.string(), fc.constantFrom('', '0', '1', '12', '500', '0.05', '0.95', '-1', '1e309', '٣', 'two', 'tetrad', 'similarity', 'dprime'));
    const query = fc.dictionary(fc.constantFrom('protocol', 'aim', 'alpha', 'beta', 'by', 'pd', 'dprime', 'sided', 'replicates', 'panel', 'question', 'samples', 'wine', 'people', 'repeat', 'tasters', 'wines', 'palpha', 'rule'), text);
    fc.assert(fc.property(query, (given) => {
      const plan = readQuery(discriminationSchema(8), given);
      if (plan.ok) expect(planDiscrimination(plan.value).curve.length).toBeGreaterThan(0);
      const choice = readQuery(choosingSchema, given);
      if (choice.ok) choose(choice.value);
      const profile = readQuery(profileSchema(8), given);
      if (profile.ok) expect(Number.isFinite(planProfile(profile.value).found)).toBe(true);
    }), { numRuns: 200 });
  });
});
