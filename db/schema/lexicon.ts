import { sqliteTable, text, unique, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { PHASES, SENSES } from '../enums';
import { id, moment, version } from './columns';
import { cellars } from './identity';

/** An attribute of the cellar's lexicon, with its definition, reference and anchors. */
export const descriptors = sqliteTable(
  'descriptors',
  {
    id: id(),
    cellarId: text().notNull().references(() => cellars.id),
    /** Stable name of the built-in entry it came from; the cellar's own start with "own-". */
    key: text().notNull(),
    sense: text({ enum: SENSES }).notNull(),
    family: text().notNull(),
    name: text().notNull(),
    definition: text().notNull(),
    reference: text().notNull().default(''),
    phase: text({ enum: PHASES }).notNull(),
    lowAnchor: text().notNull(),
    highAnchor: text().notNull(),
    createdAt: moment().notNull(),
    archivedAt: moment(),
    version: version(),
  },
  (t) => [
    uniqueIndex('descriptors_cellar_id_key_idx').on(t.cellarId, t.key),
    unique('descriptors_cellar_id_id').on(t.cellarId, t.id),
  ],
);
