import { foreignKey, index, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { CALLS } from '../enums';
import { fills } from './cellar';
import { day, id, moment } from './columns';
import { users } from './identity';
import { sessions } from './sessions';

/** The decision on a fill, with its reasons and its next date. */
export const calls = sqliteTable(
  'calls',
  {
    id: id(),
    cellarId: text().notNull(),
    fillId: text().notNull(),
    sessionId: text(),
    kind: text({ enum: CALLS }).notNull(),
    reasons: text().notNull(),
    /** "Hold until", "next racking", "bottle on": the day on which somebody looks again. */
    nextDay: day(),
    decidedBy: text().notNull().references(() => users.id),
    decidedAt: moment().notNull(),
    withdrawnAt: moment(),
    withdrawnBy: text().references(() => users.id),
    withdrawReason: text(),
  },
  (t) => [
    index('calls_fill_id_idx').on(t.fillId),
    foreignKey({ columns: [t.cellarId, t.fillId], foreignColumns: [fills.cellarId, fills.id] }),
    foreignKey({ columns: [t.cellarId, t.sessionId], foreignColumns: [sessions.cellarId, sessions.id] }),
  ],
);
