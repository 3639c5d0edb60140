import { CHANCE, inversePsychometric, proportionCorrect, proportionFromDistinguishers } from '@/stats';
import type { PlannedProtocol, Size } from './types';

/** A true difference in three dresses. */
export interface Effect {
  /** Proportion correct of the protocol. */
  pc: number;
  /** Proportion of distinguishers that gives it. */
  pd: number;
  /** Thurstone's d′ that gives it; null where the protocol has no model here. */
  dPrime: number | null;
}

/** What the plain words for a size stand for, in d′. Our own reading; no standard names sizes so. */
export const SIZE_D_PRIME: Record<Size, number> = { clear: 2, middling: 1.5, slight: 1 };

/** The effect of a share `pd` of distinguishers in (0, 1). @throws StatsError on pd out of range */
export function effectOfShare(protocol: PlannedProtocol, pd: number): Effect {
  const pc = proportionFromDistinguishers(pd, CHANCE[protocol]);
  return { pc, pd, dPrime: protocol === 'two_out_of_five' ? null : inversePsychometric(protocol, pc) };
}

/**
 * The effect of two wines d′ standard deviations apart, by Thurstone's model of the protocol.
 * Two out of five has no model in stats: it is given the share of distinguishers that the triangle has
 * at that d′, a hopeful stand-in, which whoever shows it has to say.
 * @throws StatsError on d′ below 0 or not finite
 */
export function effectOfDPrime(protocol: PlannedProtocol, dPrime: number): Effect {
  if (protocol === 'two_out_of_five') {
    const { pd } = effectOfDPrime('triangle', dPrime);
    return { pc: proportionFromDistinguishers(pd, CHANCE[protocol]), pd, dPrime: null };
  }
  const pc = proportionCorrect(protocol, dPrime);
  return { pc, pd: (pc - CHANCE[protocol]) / (1 - CHANCE[protocol]), dPrime };
}
