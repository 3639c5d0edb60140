import { requireInteger } from '../check';
import { findBlockDesign } from './incomplete-blocks';
import { shuffled, type DrawBelow } from './orders';
import { williamsSquare } from './williams';

/** Serving orders: [seat][flight][place] = sample 0..t − 1. */
export type FlightPlan = number[][][];

export interface PlanQuestion {
  readonly samples: number;
  readonly seats: number;
  /** How often each seat tastes every sample of its plan. */
  readonly replicates: number;
  /** Most glasses in one flight; a longer row is cut into flights of equal or nearly equal length. */
  readonly flightSize: number;
  readonly draw: DrawBelow;
}

function requirePlan({ samples, seats, replicates, flightSize }: PlanQuestion): void {
  requireInteger(samples, 'number of samples', 2, 100);
  requireInteger(seats, 'number of seats', 1, 10_000);
  requireInteger(replicates, 'number of replicates', 1, 100);
  requireInteger(flightSize, 'glasses per flight', 1, 100);
}

/**
 * Every seat tastes every sample, `replicates` times, in flights. Rows are those of Williams' design dealt
 * in whole shuffled sets, so that over every set positions and carry-over are exactly balanced; a seat's
 * replicates come from different rows as long as there are any. Samples are renamed at random once.
 * Throws on numbers that are not whole or out of range.
 */
export function completePlan(question: PlanQuestion): FlightPlan {
  requirePlan(question);
  const { samples, seats, replicates, flightSize, draw } = question;
  const names = shuffled(Array.from({ length: samples }, (_, sample) => sample), draw);
  const square = williamsSquare(samples).map((row) => row.map((sample) => names[sample]));
  const deck = dealRows(square.length, seats * replicates, draw);
  // Replicate after replicate over all seats: a seat's rows are `seats` apart in the deck.
  const rows = Array.from({ length: seats }, (_, seat) => Array.from({ length: replicates }, (_, replicate) => deck[replicate * seats + seat]));
  spread(rows);
  return rows.map((own) => own.flatMap((row) => cut(square[row], flightSize)));
}

/**
 * Each seat tastes only `perSeat` of the samples: blocks of a balanced incomplete block design dealt in whole
 * shuffled sets, each set arranged so that samples stand as evenly in the positions, and follow each other
 * as evenly, as a search finds. Every b seats are balanced exactly in who meets whom.
 * @throws StatsError `not_estimable` when no design is known for these numbers
 */
export function incompletePlan(question: PlanQuestion & { readonly perSeat: number }): FlightPlan {
  requirePlan(question);
  const { samples, seats, replicates, flightSize, perSeat, draw } = question;
  const design = findBlockDesign(samples, perSeat);
  const names = shuffled(Array.from({ length: samples }, (_, sample) => sample), draw);
  const rows: number[][] = [];
  while (rows.length < seats * replicates) {
    const set = arrangeRows(shuffled(design.blocks, draw), samples, draw);
    rows.push(...set.map((row) => row.map((sample) => names[sample])));
  }
  return Array.from({ length: seats }, (_, seat) =>
    Array.from({ length: replicates }, (_, replicate) => rows[replicate * seats + seat]).flatMap((row) => cut(row, flightSize)),
  );
}

/** Whole shuffled sets of 0..size − 1, one after another, cut at `count`. */
function dealRows(size: number, count: number, draw: DrawBelow): number[] {
  const all = Array.from({ length: size }, (_, row) => row);
  const deck: number[] = [];
  while (deck.length < count) deck.push(...shuffled(all, draw));
  return deck.slice(0, count);
}

/** Exchanges rows within a replicate where a seat would taste in the same order twice, if an exchange helps. */
function spread(rows: number[][]): void {
  const replicates = rows[0].length;
  const clash = (seat: number, replicate: number, row: number) => rows[seat].some((other, at) => at < replicate && other === row);
  for (let replicate = 1; replicate < replicates; replicate += 1) {
    for (let seat = 0; seat < rows.length; seat += 1) {
      if (!clash(seat, replicate, rows[seat][replicate])) continue;
      const other = rows.findIndex((own, at) => at !== seat && !clash(seat, replicate, own[replicate]) && !clash(at, replicate, rows[seat][replicate]));
      if (other < 0) continue;
      [rows[seat][replicate], rows[other][replicate]] = [rows[other][replicate], rows[seat][replicate]];
    }
  }
}

/** Cuts a row into the fewest flights of at most `most` glasses, lengths differing by at most one. */
function cut(row: readonly number[], most: number): number[][] {
  const flights = Math.ceil(row.length / most);
  return Array.from({ length: flights }, (_, i) => row.slice(Math.round((i * row.length) / flights), Math.round(((i + 1) * row.length) / flights)));
}

const TRIES_PER_GLASS = 60;

/**
 * Reorders each row of samples 0..treatments − 1 so that every sample stands as evenly as possible in every
 * position and follows every other as evenly. Exchanges two glasses of a row as long as that does not
 * worsen the sum of squared counts (positions first). Rows keep their samples; the answer is new arrays.
 */
export function arrangeRows(rows: readonly (readonly number[])[], treatments: number, draw: DrawBelow): number[][] {
  requireInteger(treatments, 'number of treatments', 2, 1000);
  const plan = rows.map((row) => shuffled(row, draw));
  const length = Math.max(0, ...plan.map((row) => row.length));
  const positions = new Int32Array(treatments * length);
  const follows = new Int32Array(treatments * treatments);
  for (const row of plan) count(row, 1);
  function count(row: readonly number[], step: number): void {
    row.forEach((sample, place) => {
      positions[sample * length + place] += step;
      if (place > 0) follows[row[place - 1] * treatments + sample] += step;
    });
  }
  // A row's share in the cost: squares change only where it stands.
  const cost = (): number => {
    let sum = 0;
    for (const n of positions) sum += 4 * n * n;
    for (const n of follows) sum += n * n;
    return sum;
  };
  let best = cost();
  const tries = TRIES_PER_GLASS * plan.reduce((sum, row) => sum + row.length, 0);
  for (let attempt = 0; attempt < tries; attempt += 1) {
    const row = plan[draw(plan.length)];
    if (row.length < 2) continue;
    const a = draw(row.length);
    const b = (a + 1 + draw(row.length - 1)) % row.length;
    count(row, -1);
    [row[a], row[b]] = [row[b], row[a]];
    count(row, 1);
    const next = cost();
    if (next <= best) {
      best = next;
      continue;
    }
    count(row, -1);
    [row[a], row[b]] = [row[b], row[a]];
    count(row, 1);
  }
  return plan;
}
