import { networkInterfaces } from 'node:os';

/** How phones reach this server. */
export type ReachMode = 'https' | 'lan' | 'localhost';

export interface Reach {
  /** Without a slash at its end. QR codes and links are built from it, never from a request's Host. */
  url: string;
  mode: ReachMode;
}

/** The machine's first IPv4 address that others on the network can reach, or null. */
function lanAddress(): string | null {
  for (const addresses of Object.values(networkInterfaces())) {
    for (const address of addresses ?? []) {
      if (address.family === 'IPv4' && !address.internal) return address.address;
    }
  }
  return null;
}

/** `APP_URL` when set; otherwise this machine's LAN address with the port in use. */
export function reach(): Reach {
  const set = process.env.APP_URL?.replace(/\/+$/, '');
  const port = process.env.PORT ?? '3000';
  const lan = lanAddress();
  const url = set ?? (lan ? `http://${lan}:${port}` : `http://localhost:${port}`);
  if (url.startsWith('https://')) return { url, mode: 'https' };
  const host = new URL(url).hostname;
  return { url, mode: host === 'localhost' || host === '127.0.0.1' ? 'localhost' : 'lan' };
}

/** Cookies may demand https only where phones come by https: on plain http they would be dropped. */
export const isSecureReach = (): boolean => reach().mode === 'https';
