import { PHASES, type Phase } from '@/db/enums';
import { OWED_KINDS, type Sheet, type SheetItem } from '@/lib/ballots/types';
import { choiceKey, orderKey, scoreKey, type Answer } from '@/lib/offline/answers';
import type { Place } from '@/lib/offline/types';

/** The lines that this seat scores: a nose-only taster gets look and nose. */
export function linesOf(sheet: Sheet): SheetItem[] {
  const forNose = sheet.items.filter((item) => item.phase === 'look' || item.phase === 'nose');
  return sheet.seatRole === 'nose_only' && forNose.length > 0 ? forNose : sheet.items;
}

/** Whether the sheet goes from glass to glass, not from set to set. */
export const isByGlass = ({ ballot }: Sheet): boolean => ballot.kind === 'glasses' || ballot.kind === 'note';

/** The parts of one glass in the order in which it is tasted. */
export function phasesOf(sheet: Sheet): Phase[] {
  const used = new Set(linesOf(sheet).map((item) => item.phase));
  return PHASES.filter((phase) => used.has(phase));
}

export const firstPlace = (sheet: Sheet): Place => ({
  view: 'glass', block: sheet.blocks[0]!.block, position: 1, phase: sheet.ballot.kind === 'glasses' ? phasesOf(sheet)[0]! : null, restUntil: null,
});

/** The glass after this one: in the block, then in the next; null after the last. */
export function nextGlass(sheet: Sheet, place: Place): { block: number; position: number } | null {
  const index = sheet.blocks.findIndex((block) => block.block === place.block);
  if (place.position < sheet.blocks[index]!.glasses.length) return { block: place.block, position: place.position + 1 };
  const next = sheet.blocks[index + 1];
  return next ? { block: next.block, position: 1 } : null;
}

/** The block after this one (the next set); null after the last. */
export function nextBlock(sheet: Sheet, block: number): number | null {
  const index = sheet.blocks.findIndex((candidate) => candidate.block === block);
  return sheet.blocks[index + 1]?.block ?? null;
}

/** The next glass or set, behind its rest if the session has one. */
export const afterRest = (sheet: Sheet, next: Pick<Place, 'block' | 'position' | 'phase'>): Place => ({
  ...next, view: sheet.restS > 0 ? 'rest' : 'glass', restUntil: Date.now() + sheet.restS * 1000,
});

export const codeAt = (sheet: Sheet, block: number, position: number): string =>
  sheet.blocks.find((candidate) => candidate.block === block)!.glasses[position - 1]!.code;

/** The first eight digits of the seal, as the label shows them. */
export const sealShort = ({ commitment }: Sheet): string => `${commitment.slice(0, 4)} ${commitment.slice(4, 8)}`;

export interface Gap {
  block: number;
  position: number;
  code: string;
  phase: Phase;
  missing: number;
}

/** Where lines that are owed an answer are still untouched, glass by glass and part by part. */
export function gapsOf(sheet: Sheet, answers: ReadonlyMap<string, Answer>): Gap[] {
  const gaps: Gap[] = [];
  const lines = linesOf(sheet).filter((item) => OWED_KINDS.includes(item.kind));
  for (const { block, glasses } of sheet.blocks) {
    for (const { position, code } of glasses) {
      for (const phase of phasesOf(sheet)) {
        const missing = lines.filter((line) => line.phase === phase && answers.get(scoreKey(block, position, line.item))?.op?.kind !== 'score').length;
        if (missing > 0) gaps.push({ block, position, code, phase, missing });
      }
    }
  }
  return gaps;
}

/** Sets that are not answered yet: not locked, or not wholly ordered. */
export function openSets(sheet: Sheet, answers: ReadonlyMap<string, Answer>): number[] {
  return sheet.blocks.filter(({ block, glasses }) => {
    if (sheet.ballot.kind === 'pick') return !answers.has(choiceKey(block));
    const op = answers.get(orderKey(block))?.op;
    return sheet.ballot.kind === 'order' && !(op?.kind === 'order' && op.order.length === glasses.length);
  }).map(({ block }) => block);
}
