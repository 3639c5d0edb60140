import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readDemo, signInOf } from '../../support/demo';
import { Client } from '../../support/http';
import { startServer, type TestServer } from '../../support/server';

const HOME = '/c/pellow-rake';
let server: TestServer;
beforeAll(async () => {
  server = await startServer({ demo: true });
});
afterAll(() => server?.stop());

async function signedIn(role: string): Promise<Client> {
  const client = new Client(server.url);
  const { email, password } = signInOf(readDemo(server.folder), role);
  await client.signIn(email, password);
  return client;
}
const isIn = async (client: Client) => new URL((await client.get('/account')).url).pathname === '/account';

describe('signing in', () => {
  it('says the same of a wrong password and an unknown address, and keeps the address, not the password', async () => {
    const { email } = signInOf(readDemo(server.folder), 'leader');
    const client = new Client(server.url);
    const answers = [];
    for (const address of [email, 'nobody@example.com']) answers.push(await client.submitForm(await client.get('/sign-in'), 'Sign in', { email: address, password: 'not it at all' }));
    for (const page of answers) expect(page.text).toContain('do not fit together');
    expect(answers[0]!.document.querySelector<HTMLInputElement>('input[name=email]')!.value).toBe(email);
    expect(answers[0]!.html).not.toContain('not it at all');
    expect(await isIn(client)).toBe(false);
  });

  it('checks every field with words beside it', async () => {
    const client = new Client(server.url);
    for (const fields of [{ email: '', password: '' }, { email: 'x', password: 'y' }, { email: `${'a'.repeat(300)}@example.com`, password: 'y' }]) {
      const page = await client.submitForm(await client.get('/sign-in'), 'Sign in', fields);
      expect(page.document.querySelector('[aria-invalid=true]')).not.toBeNull();
      expect(page.document.querySelector('.summary')!.textContent).toBeTruthy();
    }
  });

  it('goes on to a page of this site only', async () => {
    const { email, password } = signInOf(readDemo(server.folder), 'leader');
    for (const next of ['https://evil.example', '//evil.example', '/\\evil.example', 'javascript:alert(1)']) {
      const client = new Client(server.url);
      const page = await client.submitForm(await client.get(`/sign-in?next=${encodeURIComponent(next)}`), 'Sign in', { email, password });
      expect(new URL(page.url).host).toBe(new URL(server.url).host);
      expect(new URL(page.url).pathname).toBe(HOME);
    }
  });

  it('stops guessing after ten wrong passwords', async () => {
    const client = new Client(server.url);
    let text = '';
    for (let i = 0; i < 11; i += 1) text = (await client.submitForm(await client.get('/sign-in'), 'Sign in', { email: 'guess@example.com', password: `wrong ${i}` })).text;
    expect(text).toContain('Too many tries');
  });
});

describe('signing out', () => {
  it('ends the sign-in on the server: the old cookie is worth nothing', async () => {
    const client = await signedIn('leader');
    const kept = new Map(client.cookies);
    await client.submitForm(await client.get('/account'), 'Sign out');
    expect(await isIn(client)).toBe(false);
    const thief = new Client(server.url);
    for (const [name, value] of kept) thief.cookies.set(name, value);
    expect(await isIn(thief)).toBe(false);
  });

  it('everywhere ends the others too', async () => {
    const [here, there] = [await signedIn('cellar hand'), await signedIn('cellar hand')];
    await here.submitForm(await here.get('/account'), 'Sign out everywhere');
    expect(await isIn(there)).toBe(false);
  });

  it('a forged or cut cookie is nobody', async () => {
    const client = await signedIn('leader');
    for (const [name, value] of client.cookies) if (name.includes('sign-in')) client.cookies.set(name, `${value.slice(0, -4)}AAAA`);
    expect(await isIn(client)).toBe(false);
  });
});

describe('people and links', () => {
  it('an owner adds a person, whose link sets a password once', async () => {
    const owner = await signedIn('owner');
    const settings = await owner.get(`${HOME}/settings`);
    const added = await owner.submitForm(settings, 'Add the person', { name: 'Wren', email: 'wren@example.com', roles: ['panelist'] });
    const userId = [...added.document.querySelectorAll('details')].find((one) => one.textContent.includes('wren@example.com'))!.querySelector<HTMLInputElement>('input[name=userId]')!.value;
    const shown = await owner.submitForm(added, `form:has(input[value="${userId}"]):has(button:not(.btn-main)):not(:has([name=roles]))`);
    const link = /\/set-password\/[\w-]{20,}/.exec(shown.html)![0];
    const wren = new Client(server.url);
    const tooShort = await wren.submitForm(await wren.get(link), 'Set password and sign in', { password: 'short' });
    expect(tooShort.text).toContain('At least 12 characters');
    const inside = await wren.submitForm(await wren.get(link), 'Set password and sign in', { password: 'three unrelated words' });
    expect(new URL(inside.url).pathname).toBe(HOME);
    expect((await new Client(server.url).get(link)).text).toContain('This link has run out');
    // A panelist sees sessions, not the register or the settings.
    for (const path of ['/barrels', '/settings', '/sessions/new', '/calls']) expect(new URL((await wren.get(HOME + path)).url).pathname).toBe(`${HOME}/not-allowed`);
    expect((await wren.get(`${HOME}/sessions`)).text).toContain('Wednesday tasting');
  });

  it('nobody of outside finds a cellar, in the same words as one that is not there', async () => {
    const page = await new Client(server.url).get(`${HOME}/barrels`);
    expect(new URL(page.url).pathname).toBe('/sign-in');
    const leader = await signedIn('leader');
    const missing = await leader.get('/c/not-there/barrels');
    expect(missing.status).toBe(404);
    expect((await leader.get(`${HOME}/sessions/00000000-0000-4000-8000-000000000000`)).status).toBe(404);
    expect((await leader.get(`${HOME}/barrels/00000000-0000-4000-8000-000000000000`)).status).toBe(404);
  });
});

describe('forms with bad input', () => {
  it('keep what was typed and write nothing', async () => {
    const hand = await signedIn('cellar hand');
    const page = await hand.submitForm(await hand.get(`${HOME}/barrels/new`), 'Add the vessel', { name: 'X'.repeat(60), volumeL: '-5', cooper: 'Harrowdine', year: '12' });
    expect(page.text).toContain('At most 20 characters');
    expect(page.text).toContain('More than 0 L');
    expect(page.document.querySelector<HTMLInputElement>('input[name=cooper]')!.value).toBe('Harrowdine');
    expect((await hand.get(`${HOME}/barrels?q=XXXXXXXX`)).text).toContain('No vessel fits');
  });

  it('refuse a draft that somebody changed meanwhile', async () => {
    const leader = await signedIn('leader');
    const list = await leader.get(`${HOME}/sessions?state=draft`);
    const path = [...list.document.querySelectorAll('a')].find((link) => link.textContent === 'Next tasting')!.getAttribute('href')!;
    const [mine, theirs] = [await leader.get(`${path}/design`), await leader.get(`${path}/design`)];
    await leader.submitForm(mine, 'Save the draft', { title: 'First to save' });
    const late = await leader.submitForm(theirs, 'Save the draft', { title: 'Too late' });
    expect(late.text).toContain('Somebody changed this');
    expect((await leader.get(path)).text).toContain('First to save');
    const tampered = await leader.get(`${path}/design`);
    const foreignId = '00000000-0000-4000-8000-000000000000';
    tampered.document.querySelector<HTMLInputElement>('input[name=pulls]')!.value = foreignId;
    const foreign = await leader.submitForm(tampered, 'Save the draft', { pulls: [foreignId] });
    expect(foreign.text).toContain('is not there any more');
  });
});
