import { foreignKey, index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { DRINKS, ROLES } from '../enums';
import { id, moment, version } from './columns';

export const users = sqliteTable(
  'users',
  {
    id: id(),
    email: text().notNull(),
    name: text().notNull(),
    /** argon2id; null until the person has set one by a one-time link. */
    passwordHash: text(),
    createdAt: moment().notNull(),
    disabledAt: moment(),
  },
  (t) => [uniqueIndex('users_email_idx').on(t.email)],
);

/** A signed-in browser. The cookie holds only this id; ending the row ends the sign-in. */
export const signIns = sqliteTable(
  'sign_ins',
  {
    id: id(),
    userId: text().notNull().references(() => users.id),
    createdAt: moment().notNull(),
    lastSeenAt: moment().notNull(),
    expiresAt: moment().notNull(),
    endedAt: moment(),
    userAgent: text().notNull(),
  },
  (t) => [index('sign_ins_user_id_idx').on(t.userId)],
);

export const cellars = sqliteTable(
  'cellars',
  {
    id: id(),
    slug: text().notNull(),
    name: text().notNull(),
    timeZone: text().notNull(),
    drink: text({ enum: DRINKS }).notNull(),
    isDemo: integer({ mode: 'boolean' }).notNull().default(false),
    createdAt: moment().notNull(),
    version: version(),
  },
  (t) => [uniqueIndex('cellars_slug_idx').on(t.slug)],
);

export const memberships = sqliteTable(
  'memberships',
  {
    cellarId: text().notNull().references(() => cellars.id),
    userId: text().notNull().references(() => users.id),
    createdAt: moment().notNull(),
    endedAt: moment(),
  },
  (t) => [primaryKey({ columns: [t.cellarId, t.userId] }), index('memberships_user_id_idx').on(t.userId)],
);

export const membershipRoles = sqliteTable(
  'membership_roles',
  {
    cellarId: text().notNull(),
    userId: text().notNull(),
    role: text({ enum: ROLES }).notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.cellarId, t.userId, t.role] }),
    foreignKey({ columns: [t.cellarId, t.userId], foreignColumns: [memberships.cellarId, memberships.userId] }),
  ],
);

/** A link that works once: only the hash of its token rests here. */
export const oneTimeLinks = sqliteTable(
  'one_time_links',
  {
    id: id(),
    purpose: text({ enum: ['set_password', 'first_owner', 'seat'] }).notNull(),
    tokenHash: text().notNull(),
    userId: text().references(() => users.id),
    seatId: text(),
    createdBy: text().references(() => users.id),
    createdAt: moment().notNull(),
    expiresAt: moment().notNull(),
    usedAt: moment(),
  },
  (t) => [uniqueIndex('one_time_links_token_hash_idx').on(t.tokenHash)],
);
