import { sql } from 'drizzle-orm';
import { check, foreignKey, index, integer, primaryKey, real, sqliteTable, text, unique, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { CODINGS, ITEM_KINDS, METHODS, PHASES, POUR_STEPS, SEAT_ROLES, SESSION_STATES, type Allergen } from '../enums';
import { pulls } from './cellar';
import { id, moment, version } from './columns';
import { cellars, users } from './identity';
import { descriptors } from './lexicon';

export const sessions = sqliteTable(
  'sessions',
  {
    id: id(),
    cellarId: text().notNull().references(() => cellars.id),
    state: text({ enum: SESSION_STATES }).notNull(),
    method: text({ enum: METHODS }).notNull(),
    /** Neutral: panelists read it. */
    title: text().notNull(),
    /** Neutral: panelists read it. */
    instruction: text().notNull(),
    coding: text({ enum: CODINGS }).notNull().default('pourer'),
    /** Why the cellar asks. Never sent to a person who tastes. */
    privateQuestion: text().notNull(),
    leaderId: text().notNull().references(() => users.id),
    scheduledFor: moment(),
    seatsPlanned: integer().notNull(),
    reservesPlanned: integer().notNull(),
    /** Profile: blocks of all samples. Triangle: sets a seat tastes. */
    replicates: integer().notNull(),
    alpha: real().notNull(),
    servingTemperatureC: real(),
    servingVolumeMl: integer().notNull(),
    restS: integer().notNull(),
    allergens: text({ mode: 'json' }).$type<Allergen[]>().notNull(),
    /** Six digits that a person types; unique among sessions that can still be joined. */
    joinCode: text(),
    /** The unguessable part of the join link. */
    joinKey: text(),
    createdAt: moment().notNull(),
    sealedAt: moment(),
    openedAt: moment(),
    closedAt: moment(),
    unsealedAt: moment(),
    abandonedAt: moment(),
    abandonReason: text(),
    /** Why it was closed although seats still owed answers. */
    closeReason: text(),
    version: version(),
  },
  (t) => [
    unique('sessions_cellar_id_id').on(t.cellarId, t.id),
    uniqueIndex('sessions_join_code_idx').on(t.joinCode),
    uniqueIndex('sessions_join_key_idx').on(t.joinKey),
    index('sessions_cellar_id_created_at_idx').on(t.cellarId, t.createdAt),
    check('sessions_replicates_check', sql`${t.replicates} BETWEEN 1 AND 12`),
    check('sessions_seats_check', sql`${t.seatsPlanned} BETWEEN 1 AND 200`),
  ],
);

/** Who prepares the glasses, and what of the key each may read before unsealing. Only readers of the whole key don't taste. */
export const sessionPourers = sqliteTable(
  'session_pourers',
  {
    cellarId: text().notNull(),
    sessionId: text().notNull(),
    userId: text().notNull().references(() => users.id),
    step: text({ enum: POUR_STEPS }).notNull().default('key'),
  },
  (t) => [
    primaryKey({ columns: [t.sessionId, t.userId] }),
    foreignKey({ columns: [t.cellarId, t.sessionId], foreignColumns: [sessions.cellarId, sessions.id] }),
  ],
);

/** What is under test: one pull or more by share, or a labelled outside control. */
export const samples = sqliteTable(
  'samples',
  {
    id: id(),
    cellarId: text().notNull(),
    sessionId: text().notNull(),
    ordinal: integer().notNull(),
    label: text().notNull(),
    isControl: integer({ mode: 'boolean' }).notNull().default(false),
  },
  (t) => [
    unique('samples_cellar_id_id').on(t.cellarId, t.id),
    uniqueIndex('samples_session_id_ordinal_idx').on(t.sessionId, t.ordinal),
    foreignKey({ columns: [t.cellarId, t.sessionId], foreignColumns: [sessions.cellarId, sessions.id] }),
  ],
);

export const sampleComponents = sqliteTable(
  'sample_components',
  {
    cellarId: text().notNull(),
    sampleId: text().notNull(),
    pullId: text().notNull(),
    /** Part of the volume, 0 to 1; the parts of one sample add up to 1. */
    share: real().notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.sampleId, t.pullId] }),
    foreignKey({ columns: [t.cellarId, t.sampleId], foreignColumns: [samples.cellarId, samples.id] }),
    foreignKey({ columns: [t.cellarId, t.pullId], foreignColumns: [pulls.cellarId, pulls.id] }),
    check('sample_components_share_check', sql`${t.share} > 0 AND ${t.share} <= 1`),
  ],
);

/**
 * One line of the ballot: descriptor × phase. In draft it points at the lexicon; sealing copies the
 * words, so that later edits of the lexicon change nothing.
 */
export const ballotItems = sqliteTable(
  'ballot_items',
  {
    id: id(),
    cellarId: text().notNull(),
    sessionId: text().notNull(),
    position: integer().notNull(),
    phase: text({ enum: PHASES }).notNull(),
    kind: text({ enum: ITEM_KINDS }).notNull(),
    descriptorId: text().notNull(),
    name: text().notNull(),
    definition: text().notNull(),
    lowAnchor: text().notNull(),
    highAnchor: text().notNull(),
  },
  (t) => [
    uniqueIndex('ballot_items_session_id_position_idx').on(t.sessionId, t.position),
    uniqueIndex('ballot_items_session_id_descriptor_id_phase_idx').on(t.sessionId, t.descriptorId, t.phase),
    foreignKey({ columns: [t.cellarId, t.sessionId], foreignColumns: [sessions.cellarId, sessions.id] }),
    foreignKey({ columns: [t.cellarId, t.descriptorId], foreignColumns: [descriptors.cellarId, descriptors.id] }),
  ],
);

/** A numbered place at the session. Its name stands in `seat_people`, outside the evidence. */
export const seats = sqliteTable(
  'seats',
  {
    id: id(),
    cellarId: text().notNull(),
    sessionId: text().notNull(),
    number: integer().notNull(),
    isReserve: integer({ mode: 'boolean' }).notNull(),
    /** Goes up when the seat is given to another phone; older cookies die. */
    tokenGeneration: integer().notNull().default(0),
    claimedAt: moment(),
    seatRole: text({ enum: SEAT_ROLES }),
    /** When legal drinking age was confirmed, allergens seen and the spit advice read. */
    consentedAt: moment(),
    submittedAt: moment(),
    leftAt: moment(),
    lastHeardAt: moment(),
    /** What the phone last said of itself: where it is and how much it has not sent. */
    atBlock: integer(),
    atPosition: integer(),
    atPhase: text({ enum: PHASES }),
    onPhone: integer().notNull().default(0),
  },
  (t) => [
    unique('seats_cellar_id_id').on(t.cellarId, t.id),
    uniqueIndex('seats_session_id_number_idx').on(t.sessionId, t.number),
    foreignKey({ columns: [t.cellarId, t.sessionId], foreignColumns: [sessions.cellarId, sessions.id] }),
  ],
);

/** Who sits there: erasable on request without touching the evidence. */
export const seatPeople = sqliteTable(
  'seat_people',
  {
    seatId: text().primaryKey(),
    cellarId: text().notNull(),
    displayName: text().notNull(),
    userId: text().references(() => users.id),
  },
  (t) => [foreignKey({ columns: [t.cellarId, t.seatId], foreignColumns: [seats.cellarId, seats.id] })],
);

/** One glass before one seat. Which sample it is stands only in the sealed key until unsealing. */
export const servings = sqliteTable(
  'servings',
  {
    id: id(),
    cellarId: text().notNull(),
    sessionId: text().notNull(),
    seatId: text().notNull(),
    block: integer().notNull(),
    position: integer().notNull(),
    code: text().notNull(),
  },
  (t) => [
    unique('servings_cellar_id_id').on(t.cellarId, t.id),
    uniqueIndex('servings_seat_id_block_position_idx').on(t.seatId, t.block, t.position),
    uniqueIndex('servings_seat_id_code_idx').on(t.seatId, t.code),
    index('servings_session_id_idx').on(t.sessionId),
    foreignKey({ columns: [t.cellarId, t.seatId], foreignColumns: [seats.cellarId, seats.id] }),
  ],
);
