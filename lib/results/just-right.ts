import { jarPenalties, type JarPenalty } from '@/stats';
import { orNull } from './agreement';
import { glassFinder } from './evidence';
import { viewOf, type Found, type MethodQuestion } from './found';
import { count, showPercent } from './format';
import { likingLine } from './profile-family';
import type { RightCellView, RightSideView, SampleView, VerdictView } from './types';

/** A side is looked at when so many chose it (ASTM MNL63). */
const MARKED_SHARE = 0.2;

const side = ({ percent, meanDrop, welch, pooled }: JarPenalty, alpha: number): RightSideView => {
  const p = (welch ?? pooled)?.p ?? null;
  return { share: percent / 100, drop: meanDrop, p, isMarked: percent / 100 >= MARKED_SHARE && meanDrop !== null && meanDrop > 0 && p !== null && p <= alpha };
};

/**
 * Just-about-right answers with their penalties, sample by sample: how many found too little, right, too much,
 * and what liking was lost on each side against those who found it right (Welch's t test). Glasses without an
 * overall liking count in the shares of nobody.
 */
export function rightFound(question: MethodQuestion): Found {
  const { answers, glasses, items, samples, alpha } = question;
  const find = glassFinder(glasses);
  const likingItem = items.find((item) => item.kind === 'liking');
  const placeOf = (op: { seatId: string; block: number | null; position: number | null }) => `${op.seatId}/${op.block}/${op.position}`;
  const likingAt = new Map(answers.scores.filter((op) => op.item === likingItem?.item).map((op) => [placeOf(op), op.number!]));
  const lines = items.filter((item) => item.kind === 'just_right').map((item) => {
    const own = answers.scores.filter((op) => op.item === item.item);
    const cells = samples.flatMap((sample): RightCellView[] => {
      const rows = own.filter((op) => find(op)?.sample === sample && likingAt.has(placeOf(op)));
      const found = orNull(() => jarPenalties(rows.map((op) => op.number!), rows.map((op) => likingAt.get(placeOf(op))!)));
      return found ? [{ sample, n: found.n, counts: found.counts, low: side(found.tooLow, alpha), high: side(found.tooHigh, alpha), right: found.jar.percent / 100 }] : [];
    });
    return { item: item.item, name: item.name, phase: item.phase, cells };
  });
  const isEmpty = lines.every((line) => line.cells.length === 0);
  return { kind: 'right', right: { lines, alpha, liking: likingItem ? likingLine(question, likingItem) : null, whyNot: isEmpty ? 'Nobody answered a trait together with the overall liking.' : null } };
}

/** What just-about-right answers say, in sentences. */
export function rightSays(found: Found, samples: readonly SampleView[]): VerdictView {
  const right = viewOf(found, 'right');
  if (right.whyNot) return { headline: 'Nothing could be said.', sentences: [right.whyNot], reach: [] };
  const nameOf = (sample: number) => samples.find((view) => view.sample === sample)!.label;
  const marked = right.lines.flatMap((line) => line.cells.flatMap((cell) => [
    cell.low.isMarked && { words: `${nameOf(cell.sample)}: too little ${line.name.toLowerCase()} for ${showPercent(cell.low.share)}, who liked it ${cell.low.drop!.toFixed(1)} points less`, drop: cell.low.share * cell.low.drop! },
    cell.high.isMarked && { words: `${nameOf(cell.sample)}: too much ${line.name.toLowerCase()} for ${showPercent(cell.high.share)}, who liked it ${cell.high.drop!.toFixed(1)} points less`, drop: cell.high.share * cell.high.drop! },
  ]).filter((entry) => entry !== false));
  marked.sort((a, b) => b.drop - a.drop);
  return {
    headline: marked.length > 0 ? `${count(marked.length, 'thing')} cost liking.` : 'Nothing was shown to cost liking.',
    sentences: marked.slice(0, 6).map(({ words }) => `${words}.`),
    reach: ['A loss of liking goes with the answer; whether a change of the wine would win it back, only a further tasting shows.', 'A side is looked at when a fifth of the people or more chose it and the loss was shown at the session’s risk.'],
  };
}

export function rightCautions(found: Found): string[] {
  const right = viewOf(found, 'right');
  const fewest = Math.min(...right.lines.flatMap((line) => line.cells.map((cell) => cell.n)));
  return Number.isFinite(fewest) && fewest < 60 ? [`${count(fewest, 'answer')} behind the smallest table: penalties usually rest on 60 people or more (common practice).`] : [];
}
