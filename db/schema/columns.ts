import { integer, text } from 'drizzle-orm/sqlite-core';

/** A random (version 4) id: tells nothing of order or time. */
export const id = () => text().primaryKey();

/** A moment in UTC, milliseconds since 1970. */
export const moment = () => integer({ mode: 'timestamp_ms' });

/** A calendar day of the cellar's zone, `YYYY-MM-DD`. */
export const day = () => text();

/** Counts saves of a row, so that a form built on an older one is refused. */
export const version = () => integer().notNull().default(1);
