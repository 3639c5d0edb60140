import 'server-only';
import { getDb } from '@/db/client';
import { RateLimiterRes, RateLimiterSQLite } from 'rate-limiter-flexible';
import { AppError } from '../errors';

/** Kept in the database, so that a restart doesn't give an attacker a new start. */
function limiter(name: string, points: number, duration: number): Promise<RateLimiterSQLite> {
  return new Promise((resolve, reject) => {
    const made = new RateLimiterSQLite(
      { storeClient: getDb().$client, storeType: 'better-sqlite3', tableName: 'rate_limits', keyPrefix: name, points, duration },
      (error?: Error) => (error ? reject(error) : resolve(made)),
    );
  });
}

const FIVE_MINUTES = 5 * 60;

const LIMITS = {
  /** Wrong passwords by address. */
  signIn: { points: 10, duration: FIVE_MINUTES },
  /** Join codes typed on one phone. */
  joinDevice: { points: 10, duration: FIVE_MINUTES },
  /** Join codes that led nowhere, by everybody: six digits must not be guessable by many phones. */
  joinWrong: { points: 50, duration: FIVE_MINUTES },
} as const;

const made = new Map<string, Promise<RateLimiterSQLite>>();

function get(name: keyof typeof LIMITS): Promise<RateLimiterSQLite> {
  let found = made.get(name);
  if (!found) {
    found = limiter(name, LIMITS[name].points, LIMITS[name].duration);
    made.set(name, found);
  }
  return found;
}

/** Takes one try. @throws AppError `too_many` when none is left */
export async function takeTry(name: keyof typeof LIMITS, key: string): Promise<void> {
  try {
    await (await get(name)).consume(key);
  } catch (error) {
    if (error instanceof RateLimiterRes) throw new AppError('too_many');
    throw error;
  }
}

/** @throws AppError `too_many` when no try is left; takes none */
export async function requireTriesLeft(name: keyof typeof LIMITS, key: string): Promise<void> {
  const state = await (await get(name)).get(key);
  if (state && state.consumedPoints >= LIMITS[name].points) throw new AppError('too_many');
}

/** Gives the tries back, after a success. */
export async function resetTries(name: keyof typeof LIMITS, key: string): Promise<void> {
  await (await get(name)).delete(key);
}
