import type { Client } from '../../support/http';

const DAY_MS = 86_400_000;
const dayAgo = (days: number) => new Date(Date.now() - days * DAY_MS).toISOString();

/** The path of a page without its query, after a form has led there. */
const pathOf = (url: string) => new URL(url).pathname;

/** Makes a lot through the application's form. */
export async function addLot(client: Client, home: string, code: string): Promise<void> {
  const page = await client.submitForm(await client.get(`${home}/lots/new`), 'form:has([name=code])', { code, name: 'White with skin contact', drink: 'wine' });
  if (!page.text.includes(code)) throw new Error(`the lot was not saved: ${page.text.slice(0, 400)}`);
}

/** A barrel, what it holds, and a pull from it, each through the application's form. */
export async function addBarrel(client: Client, home: string, name: string): Promise<void> {
  const saved = await client.submitForm(await client.get(`${home}/barrels/new`), 'form:has([name=volumeL])', { name, kind: 'barrel', volumeL: 225 });
  const barrel = pathOf(saved.url);
  if (!/\/barrels\/[0-9a-f-]{36}$/.test(barrel)) throw new Error(`the barrel was not saved: ${saved.text.slice(0, 400)}`);
  const fill = await client.get(`${barrel}/fill`);
  const lot = [...fill.document.querySelectorAll<HTMLOptionElement>('select[name=lotId] option')].find((option) => option.value !== '')!.value;
  await client.submitForm(fill, 'form:has([name=fromDay])', { lotId: lot, fromDay: dayAgo(90).slice(0, 10) });
  const pulled = await client.submitForm(await client.get(`${barrel}/pull`), 'form:has([name=drawMethod])', {
    pulledAt: dayAgo(1).slice(0, 16), drawMethod: 'thief', volumeMl: 900, isSanitised: true, evaporationS: 60, isVented: true, isResealed: true,
  });
  if (pathOf(pulled.url).endsWith('/pull')) throw new Error(`the pull was not saved: ${pulled.text.slice(0, 400)}`);
}
