import { networkInterfaces } from 'node:os';

/** Bridges and tunnels of this machine: a phone can't reach their addresses. */
const OWN_NETWORKS = /^(lo|docker|br-|veth|virbr|vmnet|vboxnet|utun|tun|tap|tailscale|wg)/;

/**
 * The machine's first IPv4 address that others on the network can reach, or null.
 * @param {ReturnType<typeof networkInterfaces>} [interfaces]
 * @returns {string | null}
 */
export function lanAddress(interfaces = networkInterfaces()) {
  for (const [name, addresses] of Object.entries(interfaces)) {
    if (OWN_NETWORKS.test(name)) continue;
    for (const address of addresses ?? []) {
      // 169.254.…: an address that the machine gave itself because nobody answered.
      if (address.family === 'IPv4' && !address.internal && !address.address.startsWith('169.254.')) return address.address;
    }
  }
  return null;
}

/**
 * `APP_URL` when set; otherwise the LAN address with the port in use.
 * @param {{ APP_URL?: string, PORT?: string }} env
 * @returns {{ url: string, mode: 'https' | 'lan' | 'localhost' }} url without a slash at its end
 */
export function reachOf(env) {
  const port = env.PORT || '3000';
  const set = env.APP_URL ? env.APP_URL.replace(/\/+$/, '') : undefined;
  const lan = lanAddress();
  const url = set ?? (lan ? `http://${lan}:${port}` : `http://localhost:${port}`);
  if (url.startsWith('https://')) return { url, mode: 'https' };
  const { hostname } = new URL(url);
  return { url, mode: ['localhost', '127.0.0.1', '[::1]'].includes(hostname) ? 'localhost' : 'lan' };
}
