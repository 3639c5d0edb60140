import 'server-only';
import { getDb } from '@/db/client';

/** Reads once from the database. @throws when it can't */
export const isHealthy = (): boolean => getDb().$client.prepare('SELECT 1').pluck().get() === 1;
