import 'server-only';
import { databaseFile } from '@/db/client';
import { migrateDatabase } from '@/db/migrate';
import { fillDemo } from './demo/fill';

/** Migrates, and fills the demo cellar unless `TERCET_DEMO=0` or the database holds a cellar. */
export async function prepare(): Promise<void> {
  migrateDatabase(databaseFile());
  if (process.env.TERCET_DEMO !== '0') await fillDemo();
}
