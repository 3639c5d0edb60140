import type { ItemKind } from '@/db/enums';
import type { ItemFact } from './data';
import { glassFinder, type OperationFact } from './evidence';
import { viewOf, type Found, type MethodQuestion } from './found';
import { analyseProfile } from './profile';
import type { LineView, SampleView, ScaleView, VerdictView } from './types';
import { profileVerdict } from './verdict';
import { profileWarnings } from './warnings';

/** A scale on which every line of a ballot is scored. */
export interface LineScale extends ScaleView {
  kind: ItemKind;
  /** What an untouched line of an answered glass counts as; left out: as missing. */
  absent?: number;
}

/** Glasses that somebody said something of, with the lines that were left alone filled in. */
function filled({ answers, glasses, seats }: MethodQuestion, lines: readonly ItemFact[], absent: number): OperationFact[] {
  const find = glassFinder(glasses);
  const given = new Set(answers.scores.map((op) => `${op.seatId}/${op.block}/${op.position}/${op.item}`));
  const touched = new Set(answers.scores.flatMap((op) => (find(op) ? [`${op.seatId}/${op.block}/${op.position}`] : [])));
  const handedIn = new Set(seats.filter((seat) => seat.isSubmitted).map((seat) => seat.id));
  const extra = glasses
    .filter((glass) => handedIn.has(glass.seatId) || touched.has(`${glass.seatId}/${glass.block}/${glass.position}`))
    .flatMap(({ seatId, block, position }) => lines.filter((line) => !given.has(`${seatId}/${block}/${position}/${line.item}`)).map((line): OperationFact => ({
      seatId, block, position, item: line.item, kind: 'score', number: absent, text: null, isGuess: null, isLate: false, tokenGeneration: 0, seq: 0, receiptNo: 0,
    })));
  return [...answers.scores, ...extra];
}

/** Scores line by line: analysis of variance with the panelists, as `analyseProfile` says. */
export function profileFound(question: MethodQuestion, { kind, low, high, absent }: LineScale): Found {
  const { answers, glasses, seats, items, samples, replicates, alpha } = question;
  const lines = items.filter((item) => item.kind === kind);
  const scores = absent === undefined ? answers.scores : filled(question, lines, absent);
  return { kind: 'profile', profile: analyseProfile({ lines, scores, glasses, seats, samples, replicates, alpha, scale: { low, high } }) };
}

/** The overall liking beside other questions, as one line on nine points. */
export function likingLine({ answers, glasses, seats, samples, replicates, alpha }: MethodQuestion, item: ItemFact): LineView {
  return analyseProfile({ lines: [item], scores: answers.scores, glasses, seats, samples, replicates, alpha, scale: { low: 1, high: 9 } }).lines[0]!;
}

export const profileSays = (found: Found, samples: readonly SampleView[]): VerdictView => profileVerdict(viewOf(found, 'profile'), samples);

export const profileCautions = (found: Found): string[] => profileWarnings(viewOf(found, 'profile'));
