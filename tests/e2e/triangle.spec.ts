import { expect, test, type Page } from '@playwright/test';
import { CELLAR, joinAsGuest, liftAndHold, signedIn } from './support';

/** Which code is which barrel, as the pourer reads it from the pour sheet. */
async function readPourSheet(pourer: Page): Promise<Map<string, string>> {
  const key = new Map<string, string>();
  for (const section of await pourer.locator('.sheet section').all()) {
    const label = (await section.locator('h3').innerText()).split(':')[0]!;
    for (const code of await section.locator('.code').all()) key.set(((await code.getAttribute('aria-label')) ?? '').replaceAll(/\D/g, ''), label);
  }
  return key;
}

const codesOn = async (phone: Page): Promise<string[]> =>
  Promise.all((await phone.getByRole('radio').all()).map(async (radio) => ((await radio.locator('.code').getAttribute('aria-label')) ?? '').replaceAll(/\D/g, '')));

test('a triangle by six phones, from join link to verdict and call', async ({ browser }) => {
  test.setTimeout(240_000);
  const leader = await signedIn(browser, 'leader');

  await leader.goto(`${CELLAR}/sessions/new`);
  await leader.getByLabel('What does the cellar want to know?').fill('Did the racking change the white?');
  await leader.getByLabel('Method').selectOption('triangle');
  await leader.getByLabel('Title').fill('Six at the table');
  await leader.getByLabel('Instruction').fill('Taste from the top and say which one differs.');
  await leader.getByRole('checkbox', { name: /barrel 18,/ }).first().check();
  await leader.getByRole('checkbox', { name: /barrel 19,/ }).first().check();
  await leader.getByLabel('Seats', { exact: true }).fill('6');
  await leader.getByLabel('Sets for each seat').fill('1');
  await leader.getByLabel('Rest between, s').fill('0');
  await leader.getByRole('checkbox', { name: 'Bram Setterly' }).check();
  await leader.getByRole('button', { name: 'Save the draft' }).click();
  await leader.waitForURL(/sessions\/[0-9a-f-]{36}$/);
  const session = new URL(leader.url()).pathname;

  await liftAndHold(leader, /Seal the plan/);
  await leader.getByRole('button', { name: 'Open the session' }).click();
  const joinPath = new URL(((await leader.getByRole('img', { name: /QR code of http/ }).getAttribute('alt')) ?? '').replace('QR code of ', '')).pathname;

  const pourer = await signedIn(browser, 'cellar hand');
  await pourer.goto(`${session}/pour`);
  const key = await readPourSheet(pourer);
  expect(key.size).toBe(3 * 8);
  await leader.goto(`${session}/pour`);
  await expect(leader.getByText('You are not a pourer here.')).toBeVisible();
  await leader.goto(session);

  for (let seat = 1; seat <= 6; seat += 1) {
    const phone = await joinAsGuest(browser, joinPath, `Guest ${seat}`);
    const codes = await codesOn(phone);
    const labels = codes.map((code) => key.get(code)!);
    const odd = labels.findIndex((label) => labels.filter((other) => other === label).length === 1);
    // Five find the odd glass; the last one doesn't.
    const chosen = seat <= 5 ? odd : (odd + 1) % 3;
    await phone.getByRole('radio').nth(chosen).click();
    if (seat === 6) await phone.getByLabel('It was a guess').check();
    await phone.getByRole('button', { name: 'Lock set 1' }).click();
    await phone.getByRole('button', { name: 'Hand in' }).click();
    await expect(phone.getByRole('heading', { name: /Everything was received/ })).toBeVisible();
    await phone.context().close();
  }

  await expect(leader.locator('.tally b')).toHaveText('6');
  await liftAndHold(leader, /Close session/);
  await liftAndHold(leader, /Open the key/);
  await leader.getByRole('link', { name: 'Results' }).click();
  // ISO 4120: of six answers five must be right at 5 %; P(X ≥ 5) = 13/729 = 0.0178 for X ~ Bin(6, 1/3).
  const answer = leader.locator('main');
  await expect(answer).toContainText(/5 of (the )?6/);
  await expect(answer).toContainText('0.018');

  const winemaker = await signedIn(browser, 'owner');
  await winemaker.goto(`${session}/results`);
  await winemaker.getByRole('link', { name: /Record (the|a) call/ }).first().click();
  await winemaker.waitForURL('**/calls/new**');
  await winemaker.getByLabel('Barrel', { exact: true }).selectOption({ index: 1 });
  await winemaker.getByLabel('What is to be done').selectOption('rack');
  await winemaker.getByLabel('Reasons').fill('Five of six found the racked one; the egg note is gone.');
  await winemaker.getByRole('button', { name: 'Record the call' }).click();
  await winemaker.waitForURL((url) => !url.pathname.endsWith('/new'));
  await expect(winemaker.locator('main')).toContainText('Five of six found the racked one');
});
