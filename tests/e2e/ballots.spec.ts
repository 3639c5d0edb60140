import { expect, test, type Browser, type Page } from '@playwright/test';
import { e2eFolder, readDemo, signInOf } from '../support/demo';
import { Client } from '../support/http';
import { check } from './axe';
import { CELLAR, joinAsGuest, keptForOffline } from './support';

const LANGUAGES = ['en', 'es', 'fr'];
const WIDTHS = [320, 390, 768];
const MODES = ['paper', 'cellar'];

/** An open session of the method with that many samples, planned through the form. @returns its join path */
async function openSessionOf(method: string, samples: number, lines: number): Promise<string> {
  const leader = new Client(test.info().project.use.baseURL!);
  const { email, password } = signInOf(readDemo(e2eFolder()), 'leader');
  await leader.signIn(email, password);
  const form = await leader.get(`${CELLAR}/sessions/new?method=${method}`);
  const values = (name: string) => [...form.document.querySelectorAll<HTMLInputElement>(`input[name="${name}"]`)].map((box) => box.value);
  const pourer = [...form.document.querySelectorAll<HTMLInputElement>('input[name="pourers"]')].find((box) => /bram/i.test(box.closest('label')!.textContent))!.value;
  const draft = await leader.submitForm(form, 'Save the draft', {
    method, title: `Tasting of ${method.replaceAll('_', ' ')}`, instruction: 'Taste and spit.', privateQuestion: 'Which?', pulls: values('pulls').slice(0, samples), ...(lines > 0 && { lines: values('lines').slice(0, lines) }),
    seatsPlanned: 4, reservesPlanned: 0, replicates: 1, alpha: 0.05, servingVolumeMl: 30, restS: 0, allergens: ['sulfites'], pourers: [pourer],
  });
  const sealed = await leader.submitForm(draft, 'Seal the plan (hold two seconds)');
  const open = await leader.submitForm(sealed, 'Open the session');
  return `/j/${/\/j\/([a-z2-7]{16})/.exec(open.html)![1]!}`;
}

/** axe in three languages, three widths and both lights, and text at 200 %. */
async function inAllLights(phone: Page, ready: string): Promise<string[]> {
  const found: string[] = [];
  for (const language of LANGUAGES) {
    for (const width of WIDTHS) {
      for (const mode of MODES) {
        const url = new URL(phone.url()).origin;
        await phone.setViewportSize({ width, height: 740 });
        await phone.context().addCookies([{ name: 'tercet-mode', value: mode, url }, { name: 'tercet-language', value: language, url }]);
        await phone.reload();
        await expect(phone.locator(ready).first()).toBeVisible();
        await expect(phone.locator('html')).toHaveAttribute('lang', language);
        found.push(...(await check(phone, `${await phone.title()} at ${width} in ${mode}, ${language}`)));
      }
    }
    await phone.setViewportSize({ width: 320, height: 740 });
    await phone.evaluate(() => (document.documentElement.style.fontSize = '200%'));
    found.push(...(await check(phone, `text at 200 % in ${language}`)));
  }
  return found;
}

/** Every control that a finger meets is at least 48 px high or wide, but links in a line of text. */
const smallTargets = (phone: Page) =>
  phone.locator('main button:visible:not(.link), main .tick-row:visible, main .tick:visible').evaluateAll((all) => all.filter((one) => one.getBoundingClientRect().height < 47.5).map((one) => `${one.textContent.trim()} ${Math.round(one.getBoundingClientRect().height)}`));

const joined = async (browser: Browser, method: string, samples: number, lines: number): Promise<Page> => {
  const phone = await joinAsGuest(browser, await openSessionOf(method, samples, lines), 'Wren');
  await expect(phone.locator('main[aria-busy=false]')).toBeVisible();
  return phone;
};

test.describe.configure({ timeout: 240_000 });

test('two glasses of four, by keyboard alone, in every light and language', async ({ browser }) => {
  const phone = await joined(browser, 'tetrad', 2, 0);
  expect(await smallTargets(phone)).toEqual([]);
  expect(await inAllLights(phone, 'button.tag')).toEqual([]);
  await phone.context().addCookies([{ name: 'tercet-language', value: 'en', url: new URL(phone.url()).origin }]);
  await phone.setViewportSize({ width: 360, height: 740 });
  await phone.reload();
  const glasses = phone.locator('button.tag');
  await expect(glasses).toHaveCount(4);
  for (const n of [1, 3]) {
    await glasses.nth(n).focus();
    await phone.keyboard.press('Space');
    await expect(glasses.nth(n)).toHaveAttribute('aria-pressed', 'true');
  }
  // A third takes the place of the last but one.
  await glasses.nth(0).focus();
  await phone.keyboard.press('Enter');
  await expect(phone.locator('button.tag[aria-pressed=true]')).toHaveCount(2);
  await phone.getByRole('button', { name: 'Lock set 1' }).focus();
  await phone.keyboard.press('Enter');
  await expect(phone.getByRole('heading', { name: 'Hand in your sheet' })).toBeVisible();
  await phone.context().close();
});

test('an order, by keyboard alone, kept tap by tap, in every light and language', async ({ browser }) => {
  const phone = await joined(browser, 'ranking', 3, 1);
  const glasses = phone.locator('button.tag');
  await expect(glasses).toHaveCount(3);
  for (const n of [2, 0]) {
    await glasses.nth(n).focus();
    await phone.keyboard.press('Enter');
  }
  // Half an order is kept too.
  await expect(phone.locator('.label .fields')).toContainText('all received', { timeout: 15_000 });
  await phone.reload();
  await expect(phone.locator('button.tag[aria-pressed=true]')).toHaveCount(2);
  await expect(phone.getByRole('button', { name: 'Go on' })).toBeDisabled();
  await glasses.nth(1).click();
  const codes = () => phone.locator('ol .code').evaluateAll((all) => all.map((one) => one.getAttribute('aria-label')));
  const before = await codes();
  await phone.locator('ol li').first().getByRole('button').nth(1).focus();
  await phone.keyboard.press('Enter');
  await expect.poll(codes).toEqual([before[1], before[0], before[2]]);
  expect(await smallTargets(phone)).toEqual([]);
  expect(await inAllLights(phone, 'button.tag')).toEqual([]);
  await phone.context().close();
});

test('a free note: words are found, denied ones are not offered, in every light and language', async ({ browser }) => {
  const phone = await joined(browser, 'free_note', 2, 0);
  await phone.locator('#note').fill('Lemon and dark plums, but no vanilla.');
  await expect(phone.locator('fieldset.points')).toHaveCount(2);
  await expect(phone.getByText('Written as not there: vanilla.')).toBeVisible();
  await phone.getByRole('group', { name: 'Dark plum' }).getByLabel('clear').check();
  await expect(phone.locator('.label .foot')).toContainText('all received', { timeout: 15_000 });
  await phone.reload();
  await expect(phone.locator('#note')).toHaveValue('Lemon and dark plums, but no vanilla.');
  await expect(phone.getByRole('group', { name: 'Dark plum' }).getByLabel('clear')).toBeChecked();
  expect(await smallTargets(phone)).toEqual([]);
  expect(await inAllLights(phone, '#note')).toEqual([]);
  await phone.context().close();
});

test('ticks and points: none is chosen beforehand, one can be cleared, in every light and language', async ({ browser }) => {
  const phone = await joined(browser, 'just_right', 2, 1);
  await expect(phone.locator('input[type=radio]:checked')).toHaveCount(0);
  const first = phone.locator('input[type=radio]').first();
  await first.focus();
  await phone.keyboard.press('Space');
  await phone.keyboard.press('ArrowDown');
  await expect(phone.getByLabel('a little too little')).toBeChecked();
  await phone.getByRole('button', { name: /^Clear/ }).click();
  await expect(phone.locator('input[type=radio]:checked')).toHaveCount(0);
  expect(await smallTargets(phone)).toEqual([]);
  expect(await inAllLights(phone, 'fieldset.points')).toEqual([]);
  await phone.context().close();
  const ticks = await joined(browser, 'check_all', 2, 6);
  await ticks.locator('main input[type=checkbox]').first().check();
  await expect(ticks.locator('.label .foot')).toContainText('all received', { timeout: 15_000 });
  await ticks.reload();
  await expect(ticks.locator('main input[type=checkbox]').first()).toBeChecked();
  expect(await smallTargets(ticks)).toEqual([]);
  await ticks.context().close();
});

test('every kind of ballot opens again with no network, and keeps what is answered there', async ({ browser }) => {
  const kinds = [
    { method: 'duo_trio', samples: 2, lines: 0, answer: (phone: Page) => phone.locator('button.tag').first().click(), is: (phone: Page) => expect(phone.locator('button.tag').first()).toHaveAttribute('aria-checked', 'true') },
    { method: 'ranking', samples: 3, lines: 1, answer: (phone: Page) => phone.locator('button.tag').first().click(), is: (phone: Page) => expect(phone.locator('button.tag').first()).toHaveAttribute('aria-pressed', 'true') },
    { method: 'free_note', samples: 2, lines: 0, answer: (phone: Page) => phone.locator('#note').fill('Lemon'), is: (phone: Page) => expect(phone.getByRole('group', { name: 'Lemon' })).toBeVisible() },
    { method: 'rate_all', samples: 2, lines: 2, answer: (phone: Page) => phone.getByLabel('strong').first().check(), is: (phone: Page) => expect(phone.getByLabel('strong').first()).toBeChecked() },
  ];
  for (const { method, samples, lines, answer, is } of kinds) {
    const phone = await joined(browser, method, samples, lines);
    const path = new URL(phone.url()).pathname;
    await keptForOffline(phone);
    await phone.context().setOffline(true);
    await phone.goto('about:blank');
    await phone.goto(path);
    await expect(phone.locator('main[aria-busy=false]')).toBeVisible();
    await answer(phone);
    await is(phone);
    if (method !== 'duo_trio') {
      // A pick is kept when it is locked; the others are kept as they come.
      await expect(phone.getByText(/\d on this phone/).first()).toBeVisible();
      await phone.goto('about:blank');
      await phone.goto(path);
      await is(phone);
    }
    await phone.context().close();
  }
});
