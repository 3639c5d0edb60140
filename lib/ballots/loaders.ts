import 'server-only';
import { getDb } from '@/db/client';
import { ballotItems, seals, servings } from '@/db/schema';
import { asc, eq } from 'drizzle-orm';
import type { SeatAccess } from '../seats/access';
import { seatLabel } from '../seats/format';
import { standingAnswers } from './data';
import type { Sheet, SheetAnswers } from './types';

function answersOf(seatId: string): SheetAnswers {
  const answers: SheetAnswers = { scores: [], faults: [], choices: [], comments: [] };
  for (const row of standingAnswers(getDb(), seatId)) {
    const place = { block: row.block!, position: row.position! };
    if (row.kind === 'score') answers.scores.push({ ...place, item: row.item!, value: row.valueNumber! });
    if (row.kind === 'fault' && row.valueNumber === 1) answers.faults.push({ ...place, item: row.item! });
    if (row.kind === 'choice') answers.choices.push({ ...place, isGuess: row.isGuess ?? false });
    if (row.kind === 'comment' && row.valueText) answers.comments.push({ ...place, text: row.valueText });
  }
  return answers;
}

/** Everything that a seat is sent, and nothing else (see `Sheet`). */
export function loadSheet({ seat, session }: SeatAccess): Sheet {
  const db = getDb();
  const glasses = db.select({ block: servings.block, position: servings.position, code: servings.code }).from(servings).where(eq(servings.seatId, seat.id)).orderBy(asc(servings.block), asc(servings.position)).all();
  const items = db.select().from(ballotItems).where(eq(ballotItems.sessionId, session.id)).orderBy(asc(ballotItems.position)).all();
  const blocks = [...new Set(glasses.map((glass) => glass.block))];
  return {
    protocol: 1,
    joinKey: session.joinKey!,
    state: session.state,
    method: session.method,
    title: session.title,
    instruction: session.instruction,
    seatLabel: seatLabel(seat.number, seat.isReserve, session.seatsPlanned),
    seatRole: seat.seatRole ?? 'taste',
    commitment: db.select({ commitment: seals.commitment }).from(seals).where(eq(seals.sessionId, session.id)).get()!.commitment,
    restS: session.restS,
    servingVolumeMl: session.servingVolumeMl,
    allergens: session.allergens,
    blocks: blocks.map((block) => ({ block, glasses: glasses.filter((glass) => glass.block === block).map(({ position, code }) => ({ position, code })) })),
    items: items.map(({ position, phase, kind, name, definition, lowAnchor, highAnchor }) => ({ item: position, phase, kind, name, definition, lowAnchor, highAnchor })),
    answers: answersOf(seat.id),
    isSubmitted: seat.submittedAt !== null,
  };
}
