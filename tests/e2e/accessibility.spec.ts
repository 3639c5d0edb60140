import { expect, test, type Page } from '@playwright/test';
import { e2eFolder, readDemo } from '../support/demo';
import { check } from './axe';
import { CELLAR, joinAsGuest, signedIn } from './support';

const WIDTHS = [360, 1280];
const MODES = ['paper', 'cellar'] as const;

async function inAllLights(page: Page, path: string): Promise<string[]> {
  const found: string[] = [];
  for (const width of WIDTHS) {
    await page.setViewportSize({ width, height: 800 });
    for (const mode of MODES) {
      await page.context().addCookies([{ name: 'tercet-mode', value: mode, url: new URL(page.url()).origin }]);
      await page.goto(path);
      await expect(page.locator('html')).toHaveAttribute('data-mode', mode);
      found.push(...(await check(page, `${path} at ${width} in ${mode}`)));
    }
  }
  return found;
}

/** Screens of the desk by subject; each opens the list first and follows the link by its name. */
const DESK: Record<string, (open: (list: string, name: string) => Promise<string>) => Promise<string[]>> = {
  'barrels and lots': async (open) => {
    const barrel = await open('barrels', '31');
    return [`${CELLAR}/barrels`, barrel, `${barrel}/edit`, `${barrel}/fill`, `${barrel}/pull`, `${CELLAR}/barrels/tags`, `${CELLAR}/lots`, `${CELLAR}/lots/new`];
  },
  'sessions before they close': async (open) => {
    const [board, draft, profile] = [await open('sessions', 'Open tasting'), await open('sessions', 'Next tasting'), await open('sessions', 'Wednesday tasting')];
    return [CELLAR, `${CELLAR}/sessions`, `${CELLAR}/plan`, board, `${board}/pour`, `${board}/handover`, draft, `${draft}/design`, profile];
  },
  'results, calls and settings': async (open) => [
    `${await open('sessions', 'Wednesday tasting')}/results`, `${await open('sessions', 'Thursday tasting')}/results`,
    `${CELLAR}/calls`, `${CELLAR}/calls/new`, `${CELLAR}/lexicon/new`, `${CELLAR}/settings`, '/account',
  ],
};

for (const [subject, pathsOf] of Object.entries(DESK)) {
  test(`desk: ${subject}`, async ({ browser }) => {
    test.setTimeout(240_000);
    const owner = await signedIn(browser, 'owner');
    const paths = await pathsOf(async (list, name) => {
      await owner.goto(`${CELLAR}/${list}`);
      return (await owner.getByRole('link', { name, exact: true }).first().getAttribute('href'))!;
    });
    const found: string[] = [];
    for (const path of paths) found.push(...(await inAllLights(owner, path)));
    expect(found).toEqual([]);
  });
}

test('the sheet and the pull sheet in three languages', async ({ browser }) => {
  test.setTimeout(240_000);
  const found: string[] = [];
  const phone = await joinAsGuest(browser, readDemo(e2eFolder()).joinPath, 'Axe too');
  const sheet = new URL(phone.url()).pathname;
  const hand = await signedIn(browser, 'cellar hand');
  for (const language of ['en', 'es', 'fr']) {
    for (const width of [320, 390, 768]) {
      for (const mode of MODES) {
        for (const [page, path, ready] of [[phone, sheet, '[role=slider]'], [hand, '/pull/pellow-rake', 'input[type=search]']] as const) {
          await page.setViewportSize({ width, height: 740 });
          await page.context().addCookies([{ name: 'tercet-mode', value: mode, url: new URL(page.url()).origin }, { name: 'tercet-language', value: language, url: new URL(page.url()).origin }]);
          await page.goto(path);
          await expect(page.locator(ready).first()).toBeVisible();
          await expect(page.locator('html')).toHaveAttribute('lang', language);
          found.push(...(await check(page, `${path} at ${width} in ${mode}, ${language}`)));
        }
      }
    }
    // Text at 200 %: everything is still there and nothing is wider than the screen.
    await phone.setViewportSize({ width: 320, height: 740 });
    await phone.evaluate(() => (document.documentElement.style.fontSize = '200%'));
    const overflow = await phone.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
    if (overflow > 0) found.push(`sheet with text at 200 % in ${language}: ${overflow} px too wide`);
    await phone.locator('.view-menu summary').click();
    found.push(...(await check(phone, `view menu at 200 % in ${language}`)));
  }
  expect(found).toEqual([]);
});

test('doors and the phone', async ({ browser, page }) => {
  test.setTimeout(120_000);
  await page.goto('/sign-in');
  const { joinPath } = readDemo(e2eFolder());
  const found: string[] = [];
  for (const path of ['/sign-in', '/j', joinPath, '/check', '/nowhere']) found.push(...(await inAllLights(page, path)));
  const phone = await joinAsGuest(browser, joinPath, 'Axe');
  const sheet = new URL(phone.url()).pathname;
  for (const width of [320, 360, 768]) {
    await phone.setViewportSize({ width, height: 740 });
    for (const mode of MODES) {
      await phone.context().addCookies([{ name: 'tercet-mode', value: mode, url: new URL(phone.url()).origin }]);
      await phone.goto(sheet);
      await expect(phone.getByRole('slider').first()).toBeVisible();
      found.push(...(await check(phone, `sheet at ${width} in ${mode}`)));
    }
  }
  expect(found).toEqual([]);
  // Gloves: what is touched in the sheet is at least 48 px high (DESIGN), the light switch included.
  for (const control of await phone.locator('button:visible, [role=slider]:visible, .tick-row:visible').all()) {
    const box = (await control.boundingBox())!;
    expect(`${await control.innerText()} ${Math.round(box.height)}`).toMatch(/ (4[89]|[5-9]\d|\d{3,})$/);
  }
});
