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
  /** Served in flights: the code of each block. Sets: empty, every glass had its own. */
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

/** The ends of a scale. */
export interface ScaleView {
  low: number;
  high: number;
}

export interface ProfileView {
  scale: ScaleView;
  lines: LineView[];
  replicates: number;
  alpha: number;
  /** Per sample: the lines on which it stood highest and lowest, most marked first. */
  extremes: { sample: number; highest: string[]; lowest: string[] }[];
  panel: PanelView;
}

/** A forced choice with a right answer: triangle, tetrad, duo-trio, two out of five. */
export interface ChoiceView {
  n: number;
  correct: number;
  guesses: number;
  correctGuesses: number;
  sets: number;
  unanswered: number;
  alpha: number;
  /** Chance of a right answer by guessing. */
  chance: number;
  /** Serving orders of the method: answers come in full rounds of so many. */
  orders: number;
  /** Exact one-sided binomial. */
  p: number | null;
  /** Smallest number correct that would have been significant; null when none would. */
  minimumCorrect: number | null;
  isShown: boolean;
  /** Proportion of distinguishers, exact (Clopper–Pearson) two-sided limits at 95 %; not cut at 0. */
  pd: { value: number; lower: number; upper: number } | null;
  /** Thurstone's d′ with likelihood limits at 95 %; null where all were right (no upper end) or the method has none. */
  dPrime: { value: number | null; lower: number; upper: number | null } | null;
  /** True shares of distinguishers and the chance that this panel would have shown them. */
  power: { pd: number; power: number }[];
  /** Smallest panel that shows half the people tasting it, at 80 %. */
  neededForHalf: number;
  whyNot: string | null;
  bySeat: SeatSets[];
}

/** What one seat answered, set by set. `isCorrect` is null where it did not answer. */
export interface SeatSets {
  seat: number;
  name: string | null;
  sets: { set: number; isCorrect: boolean | null; isGuess: boolean }[];
}

/** Two samples and the one that was chosen: which has more of it, or which is liked better. No answer is right. */
export interface PairFoundView {
  asks: 'more' | 'liked';
  /** What there is more of; null for liking. */
  trait: string | null;
  n: number;
  unanswered: number;
  sets: number;
  alpha: number;
  /** Sample and how often it was chosen, in the order of samples. */
  chosen: { sample: number; count: number }[];
  /** Exact two-sided binomial that both are chosen equally often. */
  p: number | null;
  /** Smallest count of the more chosen one that would have shown a difference; null when none would. */
  needed: number | null;
  isShown: boolean;
  /** Share of the answers for the first sample, with exact limits at 95 %. */
  share: LimitedView | null;
  whyNot: string | null;
  bySeat: { seat: number; name: string | null; sets: { set: number; sample: number | null; isGuess: boolean }[] }[];
}

/** Samples in an order from least to most of a trait. */
export interface OrderView {
  trait: string;
  /** People whose orders are whole. */
  assessors: number;
  leftOut: number[];
  replicates: number;
  alpha: number;
  /** Rank sums (1 = least) in the order of samples; letters as elsewhere, by rank sums' HSD. */
  cells: { sample: number; rankSum: number; meanRank: number; letters: string }[];
  friedman: { statistic: number; df: number; p: number; isExact: boolean } | null;
  kendallW: number | null;
  /** Difference of rank sums that was shown at alpha, allowing for all pairs. */
  hsd: number | null;
  isShown: boolean;
  whyNot: string | null;
  bySeat: { seat: number; name: string | null; orders: { block: number; samples: number[] }[] }[];
}

/** One word that was ticked, or found in what was written. */
export interface TickLineView {
  item: number;
  name: string;
  phase: Phase;
  /** Out of the glasses that were answered; mean strength where it was rated. */
  counts: { sample: number; ticked: number; of: number; strength: number | null; letters: string }[];
  /** Cochran's Q over people who answered every sample; null where it can't be told. */
  p: number | null;
  isExact: boolean;
  /** Mean liking of glasses with the word less that of glasses without it. */
  lift: { difference: number; with: number; without: number } | null;
}

export interface TicksView {
  kind: 'check' | 'term';
  lines: TickLineView[];
  assessors: number;
  alpha: number;
  liking: LineView | null;
  whyNot: string | null;
}

/** How much of a trait was right, for one sample. */
export interface RightCellView {
  sample: number;
  n: number;
  /** Answers at each of the five points. */
  counts: number[];
  low: RightSideView;
  high: RightSideView;
  /** Share of "just right". */
  right: number;
}

export interface RightSideView {
  share: number;
  /** Liking lost against those who found it just right; null where a group is empty. */
  drop: number | null;
  p: number | null;
  /** Chosen by a fifth or more, with a drop that was shown. */
  isMarked: boolean;
}

export interface RightView {
  lines: { item: number; name: string; phase: Phase; cells: RightCellView[] }[];
  alpha: number;
  liking: LineView | null;
  whyNot: string | null;
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
  /** One of these, by the method. */
  profile: ProfileView | null;
  choice: ChoiceView | null;
  pair: PairFoundView | null;
  order: OrderView | null;
  ticks: TicksView | null;
  right: RightView | null;
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
