import type { Method } from '@/db/enums';

/** A draw of n: a whole number in [0, n), from the system's random source (or a seeded one in tests). */
export type Draw = (n: number) => number;

export interface PlanQuestion {
  sampleCount: number;
  /** Numbered seats and reserves together. */
  seatCount: number;
  /** Profile: blocks of all samples. Triangle: sets for each seat. */
  replicates: number;
}

/** One glass of the plan: which sample (1…n) stands at which place of which seat (1…n). */
export interface PlannedServing {
  seat: number;
  block: number;
  position: number;
  sample: number;
  code: string;
}

/** What a tasting method says of itself; one folder each. */
export interface MethodDescription {
  method: Method;
  name: string;
  /** The cellar's question that it answers. */
  answers: string;
  sampleCount: { min: number; max: number };
  /** How many glasses a seat gets in one block. */
  glassesPerBlock(sampleCount: number): number;
  /** What a block is called on the sheet: "Flight", "Set". */
  blockWord: string;
  /** Whether a ballot of descriptors belongs to it. */
  hasItems: boolean;
  /** Codes and orders, drawn afresh. */
  plan(question: PlanQuestion, draw: Draw): PlannedServing[];
  /** Warnings for the leader: too few seats for balance, too many glasses… Never forbids. */
  warnings(question: PlanQuestion): string[];
}
