import type { ItemKind, Method } from '@/db/enums';
import type { Ballot } from '../ballots/types';
import type { Found, MethodQuestion } from '../results/found';
import type { SampleView, VerdictView } from '../results/types';

/** A draw of n: a whole number in [0, n), from the system's random source (or a seeded one in tests). */
export type Draw = (n: number) => number;

export interface PlanQuestion {
  sampleCount: number;
  /** Numbered seats and reserves together. */
  seatCount: number;
  /** Glass by glass: blocks of all samples. Sets: sets for each seat. */
  replicates: number;
  /** The sample (1…n) that a constant reference is poured from: the control where there is one. */
  reference?: number;
}

/** One glass of the plan: which sample (1…n) stands at which place of which seat (1…n). */
export interface PlannedServing {
  seat: number;
  block: number;
  position: number;
  sample: number;
  code: string;
}

/** The lines that a method's ballot takes. */
export interface ItemRule {
  kind: ItemKind;
  /** `chosen` by the leader from the lexicon, `whole` lexicon, or `none` but the overall liking. */
  from: 'chosen' | 'whole' | 'none';
  min: number;
  max: number;
  /** What the choosing is called on the design form. */
  label: string;
  hint: string;
  /** Whether faults can be ticked beside the lines. */
  hasFlags: boolean;
  /** Whether the overall liking is asked after the lines. */
  asksLiking: boolean;
}

/** What screens and forms know of a method: plain data. */
export interface MethodFacts {
  method: Method;
  name: string;
  /** The cellar's question that it answers. */
  answers: string;
  /** Its name in a report, with the standard that it follows in outline. */
  reportName: string;
  sampleCount: { min: number; max: number };
  /** Whether people answer glass by glass or set by set. */
  unit: 'glass' | 'set';
  /** Glasses that a seat gets in one block; null: every sample once. */
  glassesPerBlock: number | null;
  /** Glasses of one sample in one block of one seat, on average over the orders (the larger of the two samples'). */
  glassesPerSample: number;
  items: ItemRule | null;
  /** Chance of a right answer by guessing; null where no answer is right. */
  chance: number | null;
  ballot: Ballot;
  /** For the report: what an answer is, and how the orders were made. */
  scale: string;
  orders: string;
}

/** What a tasting method says of itself; one folder each. */
export interface MethodDescription {
  facts: MethodFacts;
  /** Codes and orders, drawn afresh. */
  plan(question: PlanQuestion, draw: Draw): PlannedServing[];
  /** Warnings for the leader: too few seats for balance, too many glasses… Never forbids. */
  warnings(question: PlanQuestion): string[];
  /** What the counted answers show, once the key is open. */
  analyse(question: MethodQuestion): Found;
  /** The results in sentences, and the weak points that travel with them. */
  verdict(found: Found, samples: readonly SampleView[]): VerdictView;
  cautions(found: Found): string[];
}

/** How many glasses a seat gets in one block. */
export const glassesPerBlock = ({ glassesPerBlock: fixed }: MethodFacts, sampleCount: number): number => fixed ?? sampleCount;

/** What one unit of a ballot is called, and a block of them. */
export const UNIT_WORDS = { glass: { one: 'glass', many: 'glasses', block: 'Flight' }, set: { one: 'set', many: 'sets', block: 'Set' } } as const;
