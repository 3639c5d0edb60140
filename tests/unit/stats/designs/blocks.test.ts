import { describe, expect, it } from 'vitest';
import { blockDesigns, blockEfficiency, blockParameters, checkBalance, findBlockDesign, isRuledOut, StatsError } from '@/stats';

describe('balanced incomplete blocks', () => {
  it.each(blockDesigns().map((design) => [`${design.t} samples in ${design.b} blocks of ${design.k}`, design] as const))('%s is balanced by counting', (_, { t, k, b, r, lambda, blocks }) => {
    const balance = checkBalance(blocks, t);
    expect(balance.balancedIncompleteBlock).toBe(true);
    expect(balance.length).toBe(k);
    expect(balance.sequences).toBe(b);
    expect(balance.replication[0]).toBe(r);
    expect(balance.concurrence[0][1]).toBe(lambda);
  });

  it('cover every set of parameters up to 16 samples and 10 repeats that is not ruled out, by itself or repeated', () => {
    for (const { t, k, r } of blockParameters(16, 10).filter((parameters) => !isRuledOut(parameters))) {
      const smallest = findBlockDesign(t, k);
      const other = blockDesigns().some((design) => design.t === t && design.k === k && r % design.r === 0);
      expect(other, `${t} samples of ${k}, ${r} times; known with r = ${smallest.r}`).toBe(true);
    }
  });

  it('leave out the one that does not exist: 15 samples in 21 blocks of 5 (Cochran & Cox 1957)', () => {
    expect(blockParameters(16, 10).filter(isRuledOut)).toEqual([{ t: 15, k: 5, b: 21, r: 7, lambda: 2 }]);
    expect(() => findBlockDesign(15, 5)).toThrow(StatsError);
  });

  it('keep λt / rk of the information', () => expect(blockEfficiency(findBlockDesign(7, 3))).toBeCloseTo(7 / 9, 12));

  it('of all samples are one complete block', () => expect(findBlockDesign(5, 5).blocks).toEqual([[0, 1, 2, 3, 4]]));

  it.each([[1, 1], [4, 1], [4, 5], [4, 2.5], [NaN, 2]])('%d samples of %d are refused', (t, k) => expect(() => findBlockDesign(t, k)).toThrow(StatsError));
});
