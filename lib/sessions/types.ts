import type { Allergen, Coding, Method, SessionState } from '@/db/enums';
import type { MethodFacts } from '../methods/types';

export interface SessionListItem {
  id: string;
  title: string;
  method: Method;
  state: SessionState;
  leader: string;
  /** When it is, was or will be. */
  when: string;
}

/** A session's own page. Holds no mapping of code to sample, and the private question only for those who may read it. */
export interface SessionView {
  id: string;
  version: number;
  title: string;
  instruction: string;
  method: Method;
  state: SessionState;
  /** Null for a person who tastes in it, until it is unsealed. */
  privateQuestion: string | null;
  leader: string;
  scheduledFor: string | null;
  samples: { label: string; isControl: boolean }[];
  lines: { name: string; phase: string }[];
  flags: string[];
  coding: Coding;
  pourers: string[];
  seatsPlanned: number;
  reservesPlanned: number;
  replicates: number;
  alpha: number;
  servingTemperatureC: number | null;
  servingVolumeMl: number;
  restS: number;
  allergens: Allergen[];
  joinCode: string | null;
  joinUrl: string | null;
  joinQr: string | null;
  commitment: string | null;
  sealedAt: string | null;
  openedAt: string | null;
  closedAt: string | null;
  unsealedAt: string | null;
  abandonedAt: string | null;
  abandonReason: string | null;
  closeReason: string | null;
  missing: string[];
  warnings: string[];
  isPourer: boolean;
  isTaster: boolean;
  lateAnswers: number;
  openings: OpeningView[];
}

export interface OpeningView {
  id: string;
  code: string | null;
  reason: string;
  requestedBy: string;
  requestedAt: string;
  state: 'waits' | 'approved' | 'refused';
  approvedBy: string | null;
  isOwnRequest: boolean;
  mayRead: boolean;
}

export interface Choice {
  value: string;
  label: string;
}

/** What the design form offers. */
export interface DesignChoices {
  pulls: (Choice & { volumeMl: number })[];
  lexicon: { family: string; sense: string; entries: (Choice & { phase: string })[] }[];
  faults: Choice[];
  members: Choice[];
  methods: MethodFacts[];
}
