import type { SessionRow } from '../sessions/find';
import { count, listWords, sayP, showPercent } from './format';
import { wereShownToDiffer } from './profile-line';
import type { CountsView, LineView, ProfileView, SampleView, SeatView } from './types';

/** Fewest trained panelists that a profile is usually scored by. */
const PROFILE_PANEL = 8;

/** From this many tested lines on, a single one that stands out is called exploratory. */
const MANY_LINES = 5;

/** Below this the panel's mean is poorly reproducible (a rough rule of thumb for ICC). */
const LOW_ICC = 0.5;

/** More than this share of scores within 2 points of an end hides differences (common practice, no standard). */
const MANY_AT_ENDS = 0.25;

const seatWords = (numbers: readonly number[]) => `${numbers.length === 1 ? 'seat' : 'seats'} ${listWords(numbers)}`;

const namesOf = (lines: readonly LineView[]) => listWords(lines.map((line) => line.name.toLowerCase()));

const seatsOf = (lists: readonly (readonly number[])[]) => seatWords([...new Set(lists.flat())].sort((a, b) => a - b));

function missingWarnings(profile: ProfileView): string[] {
  const gaps = profile.lines.filter((line) => line.gaps.length > 0);
  const left = profile.lines.filter((line) => line.leftOut.length > 0);
  const warnings: string[] = [];
  if (gaps.length > 0) {
    warnings.push(`Scores are missing (${seatsOf(gaps.map((line) => line.gaps))}; ${count(gaps.length, 'line')}). The means there are what the samples would have scored had everybody tasted all of them, and each pair is judged by its own error.`);
  }
  if (left.length > 0) {
    warnings.push(`Scores are missing (${seatsOf(left.map((line) => line.leftOut))}; ${count(left.length, 'line')}). There is too little to allow for it, so only panelists who scored every glass are tested; the others’ scores are kept, not counted in the means.`);
  }
  return warnings;
}

/** What leans on how the glasses were served and how the line was used. */
function servingWarnings(profile: ProfileView): string[] {
  const warnings: string[] = [];
  const tested = profile.lines.filter((line) => line.position !== null);
  // Over many lines one place or another always seems to matter: the risk is shared out among them.
  const moved = tested.filter((line) => line.position!.p <= profile.alpha / tested.length);
  if (moved.length > 0) {
    const most = Math.max(...moved.map((line) => line.position!.span));
    warnings.push(`The place of a glass in the flight moved scores of ${namesOf(moved)} (up to ${Math.round(most)} points). The serving orders even this out between samples; it makes the test less sharp.`);
  }
  const scaled = profile.lines.filter((line) => line.scaling && line.scaling.p <= profile.alpha);
  if (scaled.length > 0) warnings.push(`Panelists spread their scores differently on ${namesOf(scaled)}: some use much more of the line than others. Means lean towards those who use more.`);
  // On a short scale the ends are answers like the others.
  const isLong = profile.scale.high - profile.scale.low >= 50;
  const ended = !isLong ? [] : profile.lines.filter((line) => line.atEnds > MANY_AT_ENDS);
  if (ended.length > 0) warnings.push(`Many scores of ${namesOf(ended)} lie at an end of the line. Differences beyond the end can’t be seen; other anchors would help next time.`);
  return warnings;
}

function agreementWarnings(profile: ProfileView): string[] {
  const low = profile.lines.filter((line) => line.product && ((line.icc !== null && line.icc.value < LOW_ICC) || (line.kendallP !== null && line.kendallP > profile.alpha)));
  const shownButLow = low.filter((line) => line.product!.p <= profile.alpha);
  const disagree = profile.lines.filter((line) => line.interaction && line.interaction.p <= profile.alpha);
  const warnings: string[] = [];
  if (low.length > 0) warnings.push(`Low agreement in ${listWords(low.map((line) => line.name.toLowerCase()))} (Kendall’s W or ICC).${shownButLow.length > 0 ? ` Read ${listWords(shownButLow.map((line) => line.name.toLowerCase()))} with care.` : ''}`);
  if (disagree.length > 0) warnings.push(`Panelists differ in how they see ${listWords(disagree.map((line) => `${line.name.toLowerCase()} (${sayP(line.interaction!.p)})`))}: the panelist × sample interaction is larger than their repeats explain. The tests allow for it.`);
  return warnings;
}

/** Tukey's rule and F rarely disagree; when they do, the line counts as not shown. */
function splitWarning(profile: ProfileView): string[] {
  const split = profile.lines.filter((line) => line.product && line.product.p > profile.alpha && line.cells.some((a) => line.cells.some((b) => wereShownToDiffer(a, b))));
  return split.map((line) => `${line.name}: one pair passes Tukey’s rule although the F test over all samples shows nothing (${sayP(line.product!.p)}). It is counted as not shown.`);
}

/** The assumptions and weak points that travel with a profile's results. */
export function profileWarnings(profile: ProfileView): string[] {
  const tested = profile.lines.filter((line) => line.product !== null);
  const fewest = Math.min(...tested.map((line) => line.assessors));
  const warnings: string[] = [];
  if (tested.length > 0 && fewest < PROFILE_PANEL) warnings.push(`${count(fewest, 'panelist')} only: profiles are usually scored by 8 to 12 trained panelists, and fewer show large differences only.`);
  warnings.push(...missingWarnings(profile));
  if (profile.replicates === 1) warnings.push('One replicate: the panelist × sample interaction can’t be told from error, and there is no repeatability. Samples are judged by the two together.');
  warnings.push(...agreementWarnings(profile), ...servingWarnings(profile), ...splitWarning(profile));
  if (tested.length >= MANY_LINES) {
    warnings.push(`${tested.length} lines were tested, each at ${showPercent(profile.alpha)}: with no difference at all about ${(tested.length * profile.alpha).toFixed(1)} of them would still seem to show one. A single line that stands out is exploratory until it is tasted again.`);
  }
  return warnings;
}

/** Samples that were not drawn on one day differ in how long they stood, too. */
function pullWarning(samples: readonly SampleView[]): string[] {
  const days = [...new Set(samples.flatMap((sample) => sample.components.map((part) => part.pulledOn)))];
  return days.length > 1 ? [`The samples were pulled on ${days.length} different days: part of a difference may come of that.`] : [];
}

/** What concerns every method: early openings, late answers, seats that are missing. */
export function commonWarnings(session: SessionRow, counts: CountsView, seats: readonly SeatView[], samples: readonly SampleView[], granted: number): string[] {
  const warnings: string[] = pullWarning(samples);
  if (granted > 0) warnings.push(`The key was opened early (${granted === 1 ? 'once' : `${granted} times`}). See “How was it run?”.`);
  if (session.state === 'abandoned') warnings.push(`The session was given up after unsealing: ${session.abandonReason ?? 'no reason kept'}.`);
  if (counts.late > 0) warnings.push(`${count(counts.late, 'answer')} came after close: set aside, shown below, never counted.`);
  const nose = seats.filter((seat) => seat.role === 'nose_only').map((seat) => seat.number);
  if (nose.length > 0) warnings.push(`Nose only: ${seatWords(nose)}.`);
  if (counts.seatsSilent.length > 0) warnings.push(`Joined and answered nothing: ${seatWords(counts.seatsSilent)}.`);
  if (counts.seatsLeft.length > 0) warnings.push(`Left before the end: ${seatWords(counts.seatsLeft)}. What they had answered counts where it is whole.`);
  return warnings;
}
