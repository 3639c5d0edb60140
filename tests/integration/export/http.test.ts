import Database from 'better-sqlite3';
import { unzipSync } from 'fflate';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readDemo, signInOf, type DemoFile } from '../../support/demo';
import { Client } from '../../support/http';
import { startServer, type TestServer } from '../../support/server';

const FILES = ['answers.csv', 'answers.csv?names=yes', 'answers.xlsx', 'reproduce.zip'];

let server: TestServer;
let demo: DemoFile;
let winemaker: Client;
let cellar: string;
let idOf: (state: string) => string;

beforeAll(async () => {
  server = await startServer({ demo: true });
  demo = readDemo(server.folder);
  winemaker = await signedIn('winemaker');
  const sqlite = new Database(server.databaseFile, { readonly: true });
  cellar = sqlite.prepare('SELECT slug FROM cellars').pluck().get() as string;
  const ids = new Map(sqlite.prepare('SELECT state, id FROM sessions ORDER BY method DESC').raw().all() as [string, string][]);
  sqlite.close();
  idOf = (state) => ids.get(state)!;
});
afterAll(() => server?.stop());

async function signedIn(role: string): Promise<Client> {
  const client = new Client(server.url);
  const { email, password } = signInOf(demo, role);
  await client.signIn(email, password);
  return client;
}

const results = (id: string, slug = cellar) => `/api/v1/c/${slug}/sessions/${id}/results`;

/** Status and bytes of each file, and of the results as JSON last. */
const answersTo = (client: Client, id: string, slug?: string) =>
  Promise.all([...FILES.map((file) => `${results(id, slug)}/${file}`), results(id, slug)].map(async (path) => {
    const answer = await client.request(path);
    return { status: answer.status, type: answer.headers.get('content-type'), text: await answer.text() };
  }));

/** Each file is refused with that status, in the very bytes in which the results are. */
async function expectRefusal(client: Client, status: number, id: string, slug?: string): Promise<void> {
  const all = await answersTo(client, id, slug);
  for (const answer of all) expect(answer).toEqual({ ...all.at(-1)!, status, type: 'application/json' });
}

describe('the files of a session', () => {
  it('are linked from the results page and come as downloads that nothing keeps', async () => {
    const page = await winemaker.get(`/c/${cellar}/sessions/${idOf('unsealed')}/results`);
    expect(page.text).toContain('Take it with you');
    const links = [...page.document.querySelectorAll<HTMLAnchorElement>(`a[href^="${results(idOf('unsealed'))}/"]`)].map((link) => link.getAttribute('href')!);
    expect(links).toHaveLength(5);
    for (const href of links) {
      const answer = await winemaker.request(href);
      expect(answer.status).toBe(200);
      expect(answer.headers.get('cache-control')).toContain('no-store');
      expect(answer.headers.get('x-content-type-options')).toBe('nosniff');
      const ending = new URL(href, server.url).pathname.split('/').at(-1)!.replace('.', '\\.');
      expect(answer.headers.get('content-disposition')).toMatch(new RegExp(`^attachment; filename="[a-z0-9-]+-${ending}"$`));
      const bytes = new Uint8Array(await answer.arrayBuffer());
      if (href.endsWith('.zip')) expect(Object.keys(unzipSync(bytes))).toContain('R/lines.R');
      else if (href.includes('.xlsx')) expect(Object.keys(unzipSync(bytes))).toContain('xl/workbook.xml');
      else expect([...bytes.slice(0, 7)]).toEqual([0xef, 0xbb, 0xbf, ...new TextEncoder().encode('seat')]);
    }
  });

  it('are refused before unsealing, as the results are', async () => {
    for (const state of ['draft', 'open']) await expectRefusal(winemaker, 409, idOf(state));
  });

  it('are not there in another cellar, nor of no session', async () => {
    await expectRefusal(winemaker, 404, idOf('unsealed'), 'other-cellar');
    await expectRefusal(winemaker, 404, 'no-such-session');
  });

  it('are refused to strangers, to a panelist who holds only a seat, and to a member without a role', async () => {
    await expectRefusal(new Client(server.url), 401, idOf('unsealed'));
    const guest = new Client(server.url);
    await guest.submitForm(await guest.get(demo.joinPath), 'Take a seat', { displayName: 'Wren', seatRole: 'taste', isOfAge: true, hasRead: true });
    await expectRefusal(guest, 401, idOf('unsealed'));
    const hand = await signedIn('cellar hand');
    const sqlite = new Database(server.databaseFile);
    sqlite.prepare('DELETE FROM membership_roles WHERE user_id = (SELECT id FROM users WHERE email = ?)').run(signInOf(demo, 'cellar hand').email);
    sqlite.close();
    await expectRefusal(hand, 403, idOf('unsealed'));
  });
});
