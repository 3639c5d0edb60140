import 'server-only';
import { getIronSession, type IronSession } from 'iron-session';
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

async function openCookie<T extends object>(name: string, days: number): Promise<IronSession<T>> {
  const secure = isSecureReach();
  return getIronSession<T>(await cookies(), {
    // `__Host-` binds the cookie to this very host, but browsers take it over https only.
    cookieName: secure ? `__Host-${name}` : name,
    password: cookieSecret(),
    ttl: days * DAY_S,
    cookieOptions: { secure, httpOnly: true, sameSite: 'lax', path: '/' },
  });
}

export const signInCookie = () => openCookie<SignInCookie>('tercet-sign-in', SIGN_IN_DAYS);
export const seatCookie = () => openCookie<SeatCookie>('tercet-seat', 7);
