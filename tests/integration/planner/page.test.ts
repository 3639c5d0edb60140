import { readFileSync } from 'node:fs';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readDemo, signInOf, type DemoFile } from '../../support/demo';
import { Client } from '../../support/http';
import { startServer, type TestServer } from '../../support/server';

let server: TestServer;
let demo: DemoFile;
let home: string;
let owner: Client;

async function signedIn(role: string): Promise<Client> {
  const client = new Client(server.url);
  const { email, password } = signInOf(demo, role);
  await client.signIn(email, password);
  return client;
}

beforeAll(async () => {
  server = await startServer({ demo: true });
  demo = readDemo(server.folder);
  owner = await signedIn('owner');
  home = new URL((await owner.get('/')).url).pathname;
});
afterAll(() => server?.stop('SIGKILL'));

describe('the page to plan a test, without JavaScript', () => {
  it('answers the questions by a GET form, and leads to the design with the method in it', async () => {
    const page = await owner.submitForm(await owner.get(`${home}/plan`), 'Show what fits', { question: 'taste', samples: 6, people: 12, wine: '' });
    expect(page.status).toBe(200);
    expect(page.text).toContain('Category profile');
    expect(page.document.querySelector(`a[href="${home}/sessions/new?method=profile"]`)).not.toBeNull();
    const design = await owner.get(`${home}/sessions/new?method=triangle`);
    expect(design.document.querySelector('select[name=method] option[selected]')?.getAttribute('value')).toBe('triangle');
  });

  it('plans a triangle, with the curve in figures, and keeps the questions', async () => {
    const asked = await owner.get(`${home}/plan?question=order&samples=5`);
    const page = await owner.submitForm(asked, 'Work it out', { pd: '0.3', panel: 12 });
    // ISO 4120 table A.3 by the exact binomial: 40; table A.1: 8 of 12.
    expect(page.text).toContain('The smallest panel is 40 people.');
    expect(page.text).toContain('At least 8 of 12 must be right.');
    expect(new URL(page.url).searchParams.get('question')).toBe('order');
    expect(page.document.querySelector('#panel-of-a-test + .a table tbody tr.sel')).not.toBeNull();
  });

  it('says in words what is wrong with an address, and keeps it in the field', async () => {
    const page = await owner.get(`${home}/plan?alpha=0&panel=1e9&samples=x`);
    expect(page.status).toBe(200);
    expect([...page.document.querySelectorAll('.summary li')].map((line) => line.textContent)).toEqual(['Samples: a number from 1 to 12', 'α: a number from 0.001 to 0.5', 'People at hand: a number from 1 to 500']);
    expect(page.document.querySelector<HTMLInputElement>('input[name=panel]:not([type=hidden])')!.value).toBe('1e9');
  });

  it('is linked from the sessions, and from there only for those who design', async () => {
    expect((await owner.get(`${home}/sessions`)).document.querySelector(`a[href="${home}/plan"]`)).not.toBeNull();
    const panelist = await signedIn('panelist');
    expect((await panelist.get(`${home}/sessions`)).document.querySelector(`a[href="${home}/plan"]`)).toBeNull();
    expect(new URL((await panelist.get(`${home}/plan`)).url).pathname).toBe(`${home}/not-allowed`);
  });

  it('shows a new cellar a range in place of its own figures, and is not found by strangers to it', async () => {
    const { path: link } = JSON.parse(readFileSync(path.join(server.folder, 'first-owner.json'), 'utf8')) as { path: string };
    const newcomer = new Client(server.url);
    const fields = { cellarName: 'Own Cellar', drink: 'cider', timeZone: 'Europe/Madrid', name: 'Owen', email: 'owen@example.com', password: 'apples under the ladder' };
    await newcomer.submitForm(await newcomer.get(link), 'Make the cellar', fields);
    const page = await newcomer.get('/c/own-cellar/plan');
    expect(page.status).toBe(200);
    expect(page.text).toContain('No profile has been unsealed yet');
    expect(page.text).toContain('A range to choose from');
    expect(page.text).toContain('As asked, nothing fits.');
    const foreign = await owner.get('/c/own-cellar/plan');
    const missing = await owner.get('/c/no-cellar-at-all/plan');
    expect([foreign.status, missing.status]).toEqual([404, 404]);
    expect(foreign.text).toBe(missing.text);
    expect(new URL((await new Client(server.url).get('/c/own-cellar/plan')).url).pathname).toBe('/sign-in');
  });
});
