import 'server-only';
import { getIronSession, unsealData, type IronSession } from 'iron-session';
import { cookies } from 'next/headers';
import { isSecureReach } from '../reach';
import { cookieSecret } from '../secrets';

/** The cookies hold ids only; every right is read from the database at each request. */
export interface SignInCookie {
  signInId?: string;
}

/** One entry a seat held by this phone: the generation tells a reissued seat's old phone apart. */
export interface SeatCookie {
  seats?: { seatId: string; generation: number }[];
  /** Names this phone for the limits on join codes. */
  device?: string;
}

const DAY_S = 24 * 60 * 60;
export const SIGN_IN_DAYS = 30;

const nameOf = (name: string): string => (isSecureReach() ? `__Host-${name}` : name);

async function openCookie<T extends object>(name: string, days: number): Promise<IronSession<T>> {
  const secure = isSecureReach();
  return getIronSession<T>(await cookies(), {
    // `__Host-` binds the cookie to this very host, but browsers take it over https only.
    cookieName: nameOf(name),
    password: cookieSecret(),
    ttl: days * DAY_S,
    cookieOptions: { secure, httpOnly: true, sameSite: 'lax', path: '/' },
  });
}

export const signInCookie = () => openCookie<SignInCookie>('tercet-sign-in', SIGN_IN_DAYS);
const SEAT_COOKIE = 'tercet-seat';
const SEAT_DAYS = 7;
export const seatCookie = () => openCookie<SeatCookie>(SEAT_COOKIE, SEAT_DAYS);

/** Seals that were opened lately: a phone sends the same one with every delivery. */
const opened = new Map<string, { cookie: SeatCookie; until: number }>();
const OPENED_LIMIT = 2_000;
const OPENED_MS = 5 * 60_000;

/** The seats that this phone holds, for reading only; what the seal says is checked against the database by the caller. */
export async function readSeatCookie(): Promise<SeatCookie> {
  const sealed = (await cookies()).get(nameOf(SEAT_COOKIE))?.value;
  if (!sealed) return {};
  const known = opened.get(sealed);
  if (known && known.until > Date.now()) return known.cookie;
  const cookie = await unsealData<SeatCookie>(sealed, { password: cookieSecret(), ttl: SEAT_DAYS * DAY_S });
  if (opened.size >= OPENED_LIMIT) opened.clear();
  opened.set(sealed, { cookie, until: Date.now() + OPENED_MS });
  return cookie;
}
