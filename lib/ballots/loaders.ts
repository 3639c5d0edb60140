import 'server-only';
import { getDb } from '@/db/client';
import { ballotItems, descriptors, seals, servings } from '@/db/schema';
import { and, asc, eq } from 'drizzle-orm';
import { handoverKey } from '../handover/key';
import type { Locale } from '../i18n/locales';
import { synonymsOf, translateLine } from '../lexicon/translate';
import { factsOf } from '../methods/facts';
import type { SeatAccess } from '../seats/access';
import { seatLabel } from '../seats/format';
import { standingAnswers } from './data';
import type { Sheet, SheetAnswers } from './types';
import { placesOf } from './values';

function answersOf(seatId: string): SheetAnswers {
  const answers: SheetAnswers = { scores: [], faults: [], choices: [], orders: [], comments: [] };
  for (const row of standingAnswers(getDb(), seatId)) {
    const place = { block: row.block!, position: row.position! };
    if (row.kind === 'order') answers.orders.push({ block: row.block!, order: placesOf(row.valueText ?? '') });
    if (row.kind === 'score') answers.scores.push({ ...place, item: row.item!, value: row.valueNumber! });
    if (row.kind === 'fault' && row.valueNumber === 1) answers.faults.push({ ...place, item: row.item! });
    if (row.kind === 'choice') answers.choices.push({ ...place, ...(row.valueNumber !== null && { also: row.valueNumber }), isGuess: row.isGuess ?? false });
    if (row.kind === 'comment' && row.valueText) answers.comments.push({ ...place, text: row.valueText });
  }
  return answers;
}

/** Everything that a seat is sent, and nothing else (see `Sheet`), the ballot's words in the panelist's language. */
export function loadSheet({ seat, session }: SeatAccess, locale: Locale): Sheet {
  const db = getDb();
  const { ballot } = factsOf(session.method);
  const glasses = db.select({ block: servings.block, position: servings.position, code: servings.code }).from(servings).where(eq(servings.seatId, seat.id)).orderBy(asc(servings.block), asc(servings.position)).all();
  const items = db
    .select({ position: ballotItems.position, phase: ballotItems.phase, kind: ballotItems.kind, name: ballotItems.name, definition: ballotItems.definition, lowAnchor: ballotItems.lowAnchor, highAnchor: ballotItems.highAnchor, key: descriptors.key })
    .from(ballotItems)
    .leftJoin(descriptors, and(eq(descriptors.id, ballotItems.descriptorId), eq(descriptors.cellarId, ballotItems.cellarId)))
    .where(eq(ballotItems.sessionId, session.id))
    .orderBy(asc(ballotItems.position))
    .all();
  const blocks = [...new Set(glasses.map((glass) => glass.block))];
  return {
    protocol: 1,
    joinKey: session.joinKey!,
    state: session.state,
    method: session.method,
    ballot,
    title: session.title,
    instruction: session.instruction,
    seatLabel: seatLabel(seat.number, seat.isReserve, session.seatsPlanned),
    seatRole: seat.seatRole ?? 'taste',
    commitment: db.select({ commitment: seals.commitment }).from(seals).where(eq(seals.sessionId, session.id)).get()!.commitment,
    handoverKey: handoverKey(seat),
    restS: session.restS,
    servingVolumeMl: session.servingVolumeMl,
    allergens: session.allergens,
    blocks: blocks.map((block) => ({ block, glasses: glasses.filter((glass) => glass.block === block).map(({ position, code }) => ({ position, code })) })),
    items: items.map(({ position, phase, kind, key, ...words }) => ({ item: position, phase, kind, ...translateLine(words, key, locale), ...(ballot.kind === 'note' && { synonyms: synonymsOf(key, locale) }) })),
    answers: answersOf(seat.id),
    isSubmitted: seat.submittedAt !== null,
  };
}
