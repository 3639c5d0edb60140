import { sql } from 'drizzle-orm';
import { check, foreignKey, index, integer, real, sqliteTable, text, unique, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { DRAW_METHODS, DRINKS, GRAINS, TOASTS, VESSEL_KINDS } from '../enums';
import { day, id, moment, version } from './columns';
import { cellars, users } from './identity';

/** A wine (cider, perry, mead) followed through the cellar. */
export const lots = sqliteTable(
  'lots',
  {
    id: id(),
    cellarId: text().notNull().references(() => cellars.id),
    code: text().notNull(),
    name: text().notNull(),
    drink: text({ enum: DRINKS }).notNull(),
    vintage: integer(),
    note: text().notNull().default(''),
    createdAt: moment().notNull(),
    archivedAt: moment(),
    version: version(),
  },
  (t) => [uniqueIndex('lots_cellar_id_code_idx').on(t.cellarId, t.code), unique('lots_cellar_id_id').on(t.cellarId, t.id)],
);

/** Barrel, puncheon, tank, keg… */
export const vessels = sqliteTable(
  'vessels',
  {
    id: id(),
    cellarId: text().notNull().references(() => cellars.id),
    /** What stands on its head: "41". Unique in the cellar. */
    name: text().notNull(),
    kind: text({ enum: VESSEL_KINDS }).notNull(),
    volumeL: real().notNull(),
    cooper: text().notNull().default(''),
    woodSpecies: text().notNull().default(''),
    woodOrigin: text().notNull().default(''),
    grain: text({ enum: GRAINS }),
    toast: text({ enum: TOASTS }),
    year: integer(),
    location: text().notNull().default(''),
    note: text().notNull().default(''),
    createdAt: moment().notNull(),
    archivedAt: moment(),
    version: version(),
  },
  (t) => [
    uniqueIndex('vessels_cellar_id_name_idx').on(t.cellarId, t.name),
    unique('vessels_cellar_id_id').on(t.cellarId, t.id),
    check('vessels_volume_l_check', sql`${t.volumeL} > 0`),
  ],
);

/** A lot's stay in a vessel, from a day to a day. */
export const fills = sqliteTable(
  'fills',
  {
    id: id(),
    cellarId: text().notNull().references(() => cellars.id),
    vesselId: text().notNull(),
    lotId: text().notNull(),
    fromDay: day().notNull(),
    /** The day it left; null while it is still in. */
    toDay: day(),
    note: text().notNull().default(''),
    createdAt: moment().notNull(),
    version: version(),
  },
  (t) => [
    unique('fills_cellar_id_id').on(t.cellarId, t.id),
    foreignKey({ columns: [t.cellarId, t.vesselId], foreignColumns: [vessels.cellarId, vessels.id] }),
    foreignKey({ columns: [t.cellarId, t.lotId], foreignColumns: [lots.cellarId, lots.id] }),
    index('fills_vessel_id_idx').on(t.vesselId),
    check('fills_days_check', sql`${t.toDay} IS NULL OR ${t.toDay} >= ${t.fromDay}`),
  ],
);

/** One drawing of a sample from a fill. */
export const pulls = sqliteTable(
  'pulls',
  {
    id: id(),
    cellarId: text().notNull().references(() => cellars.id),
    fillId: text().notNull(),
    pulledAt: moment().notNull(),
    pulledBy: text().notNull().references(() => users.id),
    drawMethod: text({ enum: DRAW_METHODS }).notNull(),
    volumeMl: integer().notNull(),
    temperatureC: real(),
    /** The clean-pull checklist: each tick is what the hand said was done. */
    isSanitised: integer({ mode: 'boolean' }).notNull(),
    /** Seconds that the hand waited for the alcohol to evaporate. */
    evaporationS: integer().notNull(),
    isVented: integer({ mode: 'boolean' }).notNull(),
    isHissHeard: integer({ mode: 'boolean' }),
    isResealed: integer({ mode: 'boolean' }).notNull(),
    isToppedUp: integer({ mode: 'boolean' }).notNull(),
    toppedWith: text().notNull().default(''),
    isWiped: integer({ mode: 'boolean' }).notNull(),
    note: text().notNull().default(''),
    createdAt: moment().notNull(),
    archivedAt: moment(),
    version: version(),
  },
  (t) => [
    unique('pulls_cellar_id_id').on(t.cellarId, t.id),
    foreignKey({ columns: [t.cellarId, t.fillId], foreignColumns: [fills.cellarId, fills.id] }),
    index('pulls_cellar_id_pulled_at_idx').on(t.cellarId, t.pulledAt),
    check('pulls_volume_ml_check', sql`${t.volumeMl} > 0`),
  ],
);
