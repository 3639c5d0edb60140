import type { DrawMethod, Method, Phase, SeatRole, SessionState, Toast, VesselKind } from '@/db/enums';

/** One barrel's part of a sample. */
export interface ComponentView {
  fillId: string;
  vesselId: string;
  vessel: string;
  vesselKind: VesselKind;
  cooper: string;
  woodSpecies: string;
  woodOrigin: string;
  toast: Toast | null;
  year: number | null;
  lot: string;
  lotName: string;
  pulledOn: string;
  drawMethod: DrawMethod;
  /** Part of the volume, 0 to 1. */
  share: number;
}

/** What was under test, after unsealing. */
export interface SampleView {
  /** 1…n in the session's design. */
  sample: number;
  id: string;
  label: string;
  isControl: boolean;
  components: ComponentView[];
  /** Profile: the code of each block. Triangle: empty, every glass had its own. */
  codes: string[];
}

/** A seat as the results name it. */
export interface SeatView {
  number: number;
  name: string | null;
  role: SeatRole;
  isSubmitted: boolean;
  hasLeft: boolean;
  /** Answers of the seat that count. */
  answers: number;
  late: number;
}

/** The F test of a term of the analysis of variance. */
export interface TestView {
  F: number;
  df1: number;
  df2: number;
  p: number;
}

/** One sample on one line of the ballot. */
export interface CellView {
  sample: number;
  mean: number;
  /** Scores behind the mean. */
  n: number;
  /** Ends of the Tukey interval (mean ± half the smallest difference shown), or null. */
  low: number | null;
  high: number | null;
  /** Compact letters: samples that share none were shown to differ. Empty when nothing was tested. */
  letters: string;
}

/** Two samples on one line: `difference` = mean of `b` − mean of `a`, with Tukey's limits at 1 − alpha. */
export interface PairView {
  a: number;
  b: number;
  difference: number;
  low: number;
  high: number;
  /** Adjusted for all pairs of the line. */
  p: number;
}

/** A coefficient with its limits at 95 %. */
export interface LimitedView {
  value: number;
  low: number;
  high: number;
}

/** What the place of a glass in the flight did to scores of a line. */
export interface PositionView extends TestView {
  /** Between the place with the highest scores and that with the lowest, points of the scale. */
  span: number;
}

/** What one line of the ballot showed. */
export interface LineView {
  item: number;
  name: string;
  phase: Phase;
  definition: string;
  lowAnchor: string;
  highAnchor: string;
  cells: CellView[];
  /** Panelists in the analysis. */
  assessors: number;
  /** Seats in the analysis that scored some glasses of this line but not all. */
  gaps: number[];
  /** Seats with some scores that are in no mean of a tested line. */
  leftOut: number[];
  /** `anova`: every panelist scored every glass. `mixed`: with gaps, by REML. `none`: not computed, see `whyNot`. */
  method: 'anova' | 'mixed' | 'none';
  product: TestView | null;
  /** The panelist × sample interaction over the error; null with one replicate or with gaps. */
  interaction: TestView | null;
  assessor: TestView | null;
  /** Different use of the scale, over what else panelists disagree in; null with gaps or two samples. */
  scaling: TestView | null;
  position: PositionView | null;
  /** Share of the scores that lie at an end of the line. */
  atEnds: number;
  /** Tukey's honestly significant difference at the session's alpha; with gaps the largest of the pairs'. */
  smallestDifference: number | null;
  pairs: PairView[];
  kendallW: number | null;
  /** p of Friedman's test, which is the test of W. */
  kendallP: number | null;
  /** Agreement of the panel's mean, ICC(2,k) on the panelists' means by sample. */
  icc: LimitedView | null;
  whyNot: string | null;
}

/** How one panelist did, over the lines. */
export interface PanelistView {
  seat: number;
  name: string | null;
  /** Mean correlation with the mean of the other panelists, over the lines that showed a difference. */
  agreement: number | null;
  /** Lines on which this panelist alone told the samples apart, by a one-way F at the session's alpha. */
  discriminated: number | null;
  /** Largest of those F values, and its line. */
  bestF: { F: number; p: number; line: string } | null;
  /** Repeatability: root mean square of the error over the lines, in points of the scale. */
  repeatability: number | null;
  /** Lines used the other way round: a clearly negative correlation where the panel showed a difference. */
  reversed: string[];
  word: 'fine' | 'needs a refresher' | 'not judged';
}

export interface PanelView {
  headline: string;
  sentences: string[];
  lines: number;
  panelists: PanelistView[];
}

export interface ProfileView {
  lines: LineView[];
  replicates: number;
  alpha: number;
  /** Per sample: the lines on which it stood highest and lowest, most marked first. */
  extremes: { sample: number; highest: string[]; lowest: string[] }[];
  panel: PanelView;
}

export interface TriangleView {
  n: number;
  correct: number;
  guesses: number;
  correctGuesses: number;
  sets: number;
  unanswered: number;
  alpha: number;
  /** Exact one-sided binomial. */
  p: number | null;
  /** Smallest number correct that would have been significant; null when none would. */
  minimumCorrect: number | null;
  isShown: boolean;
  /** Proportion of distinguishers, exact (Clopper–Pearson) two-sided limits at 95 %; not cut at 0. */
  pd: { value: number; lower: number; upper: number } | null;
  /** Thurstone's d′ with likelihood limits at 95 %; null where all found the odd glass (no upper end). */
  dPrime: { value: number | null; lower: number; upper: number | null } | null;
  /** True shares of distinguishers and the chance that this panel would have shown them. */
  power: { pd: number; power: number }[];
  /** Smallest panel that shows half the people tasting it, at 80 %. */
  neededForHalf: number;
  whyNot: string | null;
  bySeat: { seat: number; name: string | null; sets: { set: number; isCorrect: boolean | null; isGuess: boolean }[] }[];
}

/** What was written and which faults were noted. */
export interface SaidView {
  comments: { sample: number | null; seat: number; name: string | null; text: string; where: string }[];
  faults: { name: string; counts: { sample: number; noted: number; of: number }[] }[];
}

export interface CountsView {
  counted: number;
  /** Earlier values, replaced by the same panelist before close: kept, not counted. */
  replaced: number;
  cleared: number;
  late: number;
  unanswered: number;
  seatsTaken: number;
  seatsSubmitted: number;
  /** Seats that left or answered nothing, and seats planned that nobody took. */
  seatsLeft: number[];
  seatsSilent: number[];
  seatsEmpty: number[];
}

export interface EarlyOpeningView {
  isGranted: boolean;
  scope: string;
  reason: string;
  requestedBy: string;
  requestedOn: string;
  decision: string;
}

export interface ReportItem {
  name: string;
  text: string;
  href?: string;
}

/** What the results say before any table: a headline, what was shown, and how far it reaches. */
export interface VerdictView {
  headline: string;
  sentences: string[];
  reach: string[];
}

export interface ResultsView {
  session: { id: string; title: string; question: string; method: Method; state: SessionState; abandonReason: string | null; unsealedOn: string; leader: string };
  verdict: VerdictView;
  warnings: string[];
  samples: SampleView[];
  seats: SeatView[];
  counts: CountsView;
  profile: ProfileView | null;
  triangle: TriangleView | null;
  said: SaidView;
  earlyOpenings: EarlyOpeningView[];
  report: ReportItem[];
  commitment: string | null;
}

/** What stands in place of results until the key is open: nothing of any answer. */
export interface NotYetView {
  id: string;
  title: string;
  state: SessionState;
  missing: string[];
}
