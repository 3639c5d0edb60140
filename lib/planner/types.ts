import type { Method } from '@/db/enums';

/** What the cellar wants to know. */
export const QUESTIONS = ['difference', 'direction', 'order', 'taste', 'right', 'liking'] as const;
export type Question = (typeof QUESTIONS)[number];

/** How large a difference has to be before it matters; each stands for a d′. */
export const SIZES = ['clear', 'middling', 'slight'] as const;
export type Size = (typeof SIZES)[number];

/** The plain questions, answered. */
export interface Choosing {
  question: Question;
  /** Wines under test. */
  samples: number;
  /** Millilitres at hand of each sample; null when it doesn't matter. */
  wineMl: number | null;
  /** People who can taste; null when not known yet. */
  people: number | null;
  /** Tannic, strong or sweet: fewer glasses in a flight. */
  isStrong: boolean;
  size: Size;
  servingMl: number;
  /** Seconds spent on one glass, and of rest after it (after each set, where glasses are compared). */
  glassS: number;
  restS: number;
}

/** A number for the usual panel and for the smallest that is worth while. */
export interface UsualAndFewest {
  usual: number;
  fewest: number;
}

/** What a method asks of the cellar. */
export interface Needs {
  panelists: UsualAndFewest;
  glassesEach: number;
  glassesInAll: UsualAndFewest;
  /** Of each sample, one spare glass counted; of the one that is poured most. */
  mlPerSample: UsualAndFewest;
  minutesEach: number;
  /** Flights for each panelist. */
  flights: number;
}

export interface Offer {
  method: Method;
  name: string;
  /** One sentence: why it fits. */
  why: string;
  needs: Needs;
  /** Where the number of panelists comes from: a power calculation, or practice. */
  basis: string;
  isCounted: boolean;
  /** What to know before choosing it. */
  cautions: string[];
}

/** A method that answers the question and does not fit what is at hand; it may be taken all the same. */
export interface Misfit extends Offer {
  reasons: string[];
}

export interface Choice {
  offers: Offer[];
  misfits: Misfit[];
}

/** Discrimination tests that the planner knows. The pair serves both direction (one-sided) and preference. */
export const PLANNED_PROTOCOLS = ['triangle', 'tetrad', 'duo_trio', 'two_afc', 'two_out_of_five'] as const;
export type PlannedProtocol = (typeof PLANNED_PROTOCOLS)[number];

/** The sizes of a panel that a profile is planned with, in points of the scale. */
export interface Scatter {
  /** Standard deviation of one panelist's repeats of one sample. */
  repeatability: number;
  /** Standard deviation of the panelists' disagreement about samples (panelist × sample). */
  disagreement: number;
}
