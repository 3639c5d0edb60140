import { reachOf } from './start/address.mjs';

/** How phones reach this server. */
export type ReachMode = 'https' | 'lan' | 'localhost';

export interface Reach {
  /** Without a slash at its end. QR codes and links are built from it, never from a request's Host. */
  url: string;
  mode: ReachMode;
}

/** `APP_URL` when set; otherwise this machine's LAN address with the port in use. */
export const reach = (): Reach => reachOf({ APP_URL: process.env.APP_URL, PORT: process.env.PORT });

/** Cookies may demand https only where phones come by https: on plain http they would be dropped. */
export const isSecureReach = (): boolean => reach().mode === 'https';
