import { createServer, request, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';

/** What befalls a request. */
export type Mishap = 'none' | 'lost before' | 'lost after' | 'half an answer' | 'late';

export interface FlakyProxy {
  url: string;
  counts: Record<Mishap, number>;
  close(): Promise<void>;
}

/** A network between phone and server that loses requests, answers and halves of answers. `mishapOf` decides, request by request. */
export async function startFlakyProxy(target: string, mishapOf: (path: string) => Mishap): Promise<FlakyProxy> {
  const counts: Record<Mishap, number> = { none: 0, 'lost before': 0, 'lost after': 0, 'half an answer': 0, late: 0 };
  const to = new URL(target);
  const server: Server = createServer((incoming, outgoing) => {
    const mishap = mishapOf(incoming.url ?? '/');
    counts[mishap] += 1;
    if (mishap === 'lost before') return void incoming.socket.destroy();
    // The server believes its own address only.
    const headers = { ...incoming.headers, host: to.host, ...(incoming.headers.origin && { origin: to.origin }), ...(incoming.headers.referer && { referer: to.origin }) };
    const onward = request({ host: to.hostname, port: to.port, path: incoming.url, method: incoming.method, headers }, (answer) => {
      const parts: Buffer[] = [];
      answer.on('data', (part: Buffer) => parts.push(part));
      answer.on('end', () => {
        if (mishap === 'lost after') return void incoming.socket.destroy();
        const body = Buffer.concat(parts);
        const finish = () => {
          outgoing.writeHead(answer.statusCode ?? 502, answer.headers);
          if (mishap !== 'half an answer') return outgoing.end(body);
          outgoing.write(body.subarray(0, body.length / 2), () => incoming.socket.destroy());
        };
        if (mishap === 'late') setTimeout(finish, 1_500);
        else finish();
      });
    });
    onward.on('error', () => incoming.socket.destroy());
    incoming.pipe(onward);
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return {
    url: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    counts,
    close: () => new Promise((resolve) => { server.closeAllConnections(); server.close(() => resolve()); }),
  };
}
