import { expect } from 'vitest';
import { StatsError, type StatsErrorCode } from '@/stats';

/** Expects a StatsError of this code: a screen picks its words by the code, so the class alone is not enough. */
export function expectRefusal(work: () => unknown, code: StatsErrorCode): void {
  let thrown: unknown;
  try {
    const value = work();
    thrown = `no error, but ${JSON.stringify(value)}`;
  } catch (error) {
    thrown = error;
  }
  expect(thrown).toBeInstanceOf(StatsError);
  expect((thrown as StatsError).code).toBe(code);
}
