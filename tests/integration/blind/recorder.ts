import { randomUUID } from 'node:crypto';
import type { Sheet } from '@/lib/ballots/types';
import type { OperationBody } from '@/lib/ballots/schema';
import { Client } from '../../support/http';

export interface Recorded {
  what: string;
  bytes: Buffer;
}

/** A client that keeps every byte of every answer, heads included. */
export class Recorder extends Client {
  readonly answers: Recorded[] = [];

  override async request(path: string, init: RequestInit = {}): Promise<Response> {
    const answer = await super.request(path, init);
    const body = Buffer.from(await answer.clone().arrayBuffer());
    const heads = [...answer.headers].map(([name, value]) => `${name}: ${value}`).join('\n');
    this.answers.push({ what: `${init.method ?? 'GET'} ${new URL(path, this.base).pathname}`, bytes: Buffer.concat([Buffer.from(`${answer.status}\n${heads}\n\n`), body]) });
    return answer;
  }

  /** A page as a browser and as Next's own router ask for it. */
  async see(path: string): Promise<string> {
    const page = await this.get(path);
    await this.get(path, { RSC: '1' });
    await this.get(path, { RSC: '1', 'Next-Router-Prefetch': '1' });
    return page.html;
  }

  /** Scripts and styles that the pages name. */
  async seeAssets(): Promise<void> {
    const named = new Set<string>();
    for (const { bytes } of this.answers) for (const match of bytes.toString('utf8').matchAll(/\/_next\/static\/[\w./-]+\.(?:js|css)/g)) named.add(match[0]);
    for (const path of named) await this.request(path);
  }
}

/** Does on the phone what a guest does, from the link to handing in. */
export async function tasteAll(guest: Recorder, joinKey: string, name: string): Promise<void> {
  await guest.see('/j');
  await guest.see(`/j/${joinKey}`);
  await guest.submitForm(await guest.get(`/j/${joinKey}`), 'Take a seat', { displayName: name, seatRole: 'taste', isOfAge: true, hasRead: true });
  await guest.see(`/t/${joinKey}`);
  const sheet = (await guest.getJson(`/api/v1/sheet/${joinKey}`)).body as Sheet;
  const bodies: OperationBody[] = sheet.blocks.flatMap(({ block, glasses }): OperationBody[] =>
    sheet.method === 'triangle'
      ? [{ kind: 'choice', block, position: 2, isGuess: false }]
      : glasses.flatMap(({ position }) => sheet.items.map(({ item }): OperationBody => ({ kind: 'score', block, position, item, value: 50 }))));
  const deviceId = randomUUID();
  const ops = [...bodies, { kind: 'submit' } as OperationBody].map((body, index) => ({ opId: randomUUID(), deviceId, seq: index + 1, clientAt: 1, body }));
  await guest.json('/api/v1/sync', { protocol: 1, joinKey, at: { block: 1, position: 1, phase: null }, onPhone: 0, ops });
  // Errors are answers too.
  await guest.json('/api/v1/sync', { protocol: 1, joinKey, at: null, onPhone: 0, ops: [{ ...ops[0], body: { kind: 'submit' } }] });
  await guest.json('/api/v1/sync', { nonsense: true });
  await guest.see(`/t/${joinKey}`);
  await guest.see(`/t/${joinKey}/leave`);
  await guest.see(`/check/${sheet.commitment}`);
  await guest.getJson(`/api/v1/commitments/${sheet.commitment}`);
}
