import { sql } from 'drizzle-orm';
import { blob, check, foreignKey, index, integer, primaryKey, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { ADMISSIONS, OPERATION_KINDS } from '../enums';
import { id, moment } from './columns';
import { cellars, users } from './identity';
import { samples, seats, servings, sessions } from './sessions';

/** The sealed plan of a session: one ciphertext that only `lib/blind` opens. Append-only. */
export const seals = sqliteTable(
  'seals',
  {
    sessionId: text().primaryKey(),
    cellarId: text().notNull(),
    /** AES-256-GCM of the canonical plan file (plan, key and salt). */
    ciphertext: blob({ mode: 'buffer' }).notNull(),
    nonce: blob({ mode: 'buffer' }).notNull(),
    tag: blob({ mode: 'buffer' }).notNull(),
    /** SHA-256 of the canonical plan file, hex: published at once. */
    commitment: text().notNull(),
    sealedAt: moment().notNull(),
  },
  (t) => [
    uniqueIndex('seals_commitment_idx').on(t.commitment),
    foreignKey({ columns: [t.cellarId, t.sessionId], foreignColumns: [sessions.cellarId, sessions.id] }),
  ],
);

/** Which sample a serving was: written at unsealing, and only then. Append-only. */
export const servingSamples = sqliteTable(
  'serving_samples',
  {
    servingId: text().primaryKey(),
    cellarId: text().notNull(),
    sampleId: text().notNull(),
  },
  (t) => [
    foreignKey({ columns: [t.cellarId, t.servingId], foreignColumns: [servings.cellarId, servings.id] }),
    foreignKey({ columns: [t.cellarId, t.sampleId], foreignColumns: [samples.cellarId, samples.id] }),
    index('serving_samples_sample_id_idx').on(t.sampleId),
  ],
);

/**
 * Everything that a phone has said, in the order in which the server took it. Append-only: a
 * panelist's later answer is a further row, and the earlier one stays.
 */
export const operations = sqliteTable(
  'operations',
  {
    receiptNo: integer().primaryKey({ autoIncrement: true }),
    opId: text().notNull(),
    cellarId: text().notNull(),
    sessionId: text().notNull(),
    seatId: text().notNull(),
    /** Which holding of the seat sent it (see `seats.token_generation`). */
    tokenGeneration: integer().notNull(),
    deviceId: text().notNull(),
    /** Counts up on the phone; with the generation it says which answer is the latest. */
    seq: integer().notNull(),
    kind: text({ enum: OPERATION_KINDS }).notNull(),
    block: integer(),
    position: integer(),
    item: integer(),
    valueNumber: real(),
    valueText: text(),
    isGuess: integer({ mode: 'boolean' }),
    /** SHA-256 of the body as sent: the same id with another body is refused. */
    bodyHash: text().notNull(),
    clientAt: moment().notNull(),
    receivedAt: moment().notNull(),
    admission: text({ enum: ADMISSIONS }).notNull(),
  },
  (t) => [
    uniqueIndex('operations_op_id_idx').on(t.opId),
    index('operations_seat_id_idx').on(t.seatId),
    index('operations_session_id_idx').on(t.sessionId),
    foreignKey({ columns: [t.cellarId, t.seatId], foreignColumns: [seats.cellarId, seats.id] }),
    check('operations_score_check', sql`${t.kind} <> 'score' OR (${t.valueNumber} BETWEEN 0 AND 100)`),
  ],
);

/** A request to open before close, or one sample in an emergency. Needs a second person. */
export const earlyOpenings = sqliteTable(
  'early_openings',
  {
    id: id(),
    cellarId: text().notNull(),
    sessionId: text().notNull(),
    /** The code to open; null asks for the whole session. */
    code: text(),
    reason: text().notNull(),
    requestedBy: text().notNull().references(() => users.id),
    requestedAt: moment().notNull(),
    approvedBy: text().references(() => users.id),
    approvedAt: moment(),
    refusedAt: moment(),
  },
  (t) => [foreignKey({ columns: [t.cellarId, t.sessionId], foreignColumns: [sessions.cellarId, sessions.id] })],
);

/** The audit log, a hash chain per cellar. Append-only. Text that could name a barrel is `isBlinding`. */
export const auditEvents = sqliteTable(
  'audit_events',
  {
    cellarId: text().notNull().references(() => cellars.id),
    seq: integer().notNull(),
    at: moment().notNull(),
    actorUserId: text().references(() => users.id),
    /** Set when a seat, not a user, acted. */
    actorSeatId: text(),
    action: text().notNull(),
    sessionId: text(),
    subjectType: text().notNull(),
    subjectId: text().notNull(),
    detail: text({ mode: 'json' }).$type<Record<string, string | number | boolean | null>>().notNull(),
    isBlinding: integer({ mode: 'boolean' }).notNull().default(false),
    previousHash: text().notNull(),
    hash: text().notNull(),
  },
  (t) => [primaryKey({ columns: [t.cellarId, t.seq] }), index('audit_events_session_id_idx').on(t.sessionId)],
);
