import { expect, test } from '@playwright/test';
import { e2eFolder, readDemo, signInOf } from '../support/demo';
import { keptForOffline, readQr } from './support';

test('a pull with wet hands and no signal is kept, labelled, and sent when the signal is back', async ({ browser }) => {
  const { email, password } = signInOf(readDemo(e2eFolder()), 'cellar hand');
  const context = await browser.newContext({ viewport: { width: 360, height: 740 }, hasTouch: true, isMobile: true, locale: 'fr' });
  const phone = await context.newPage();
  await phone.goto('/sign-in');
  await phone.getByLabel('E-mail address').fill(email);
  await phone.getByLabel('Password').fill(password);
  await phone.getByRole('button', { name: 'Sign in' }).click();
  await phone.waitForURL('**/c/**');
  await phone.goto('/pull/pellow-rake');
  await keptForOffline(phone);
  await context.setOffline(true);
  await phone.reload();
  await phone.clock.install();

  await phone.getByRole('searchbox').fill('47');
  await phone.getByRole('button', { name: /^47/ }).click();
  await expect(phone.getByRole('heading', { name: 'Désinfecter' })).toBeVisible();
  await expect(phone.getByText(/ni flamme/)).toBeVisible();
  await phone.getByRole('button', { name: 'Fait' }).click();
  // The wait for the alcohol can't be skipped: not before the clock runs, and not before 30 seconds.
  await expect(phone.getByRole('button', { name: 'C’est sec' })).toBeDisabled();
  await phone.getByRole('button', { name: 'Lancer le chrono' }).click();
  await phone.clock.fastForward('00:10');
  await expect(phone.locator('.foot-bar .btn').last()).toBeDisabled();
  await phone.clock.fastForward('00:25');
  await phone.getByRole('button', { name: 'C’est sec' }).click();
  await expect(phone.getByText(/CO₂/)).toBeVisible();
  await phone.getByLabel('Ça a sifflé').check();
  for (let step = 0; step < 3; step += 1) await phone.getByRole('button', { name: 'Fait' }).click();
  await phone.getByLabel('Température du vin, °C').fill('130');
  await phone.getByRole('button', { name: 'Garder ce prélèvement' }).click();
  await expect(phone.getByText('Entre −5 et 40 °C')).toBeVisible();
  await phone.getByLabel('Température du vin, °C').fill('12,5');
  await phone.getByRole('button', { name: 'Garder ce prélèvement' }).click();
  await expect(phone.getByRole('heading', { name: 'Écrivez sur le flacon' })).toBeVisible();
  await expect(phone.locator('.pull-name')).toHaveText('47');
  await expect(phone.getByRole('status').last()).toContainText('sur ce téléphone');

  await context.setOffline(false);
  await phone.clock.fastForward('00:30');
  await expect(phone.getByRole('status').last()).toContainText('reçu', { timeout: 20_000 });
  await phone.goto('/c/pellow-rake/barrels');
  await phone.getByRole('link', { name: '47', exact: true }).first().click();
  await expect(phone.getByText('12.5', { exact: false }).first()).toBeVisible();
  await context.close();
});

test('a tag opens the sheet at its barrel', async ({ browser }) => {
  const { email, password } = signInOf(readDemo(e2eFolder()), 'cellar hand');
  const page = await (await browser.newContext()).newPage();
  await page.goto('/sign-in');
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL('**/c/**');
  await page.goto('/c/pellow-rake/barrels/tags');
  const address = await readQr(page.locator('.barrel-tag').filter({ hasText: '47' }).first().locator('img'));
  await page.goto(address);
  await expect(page.locator('.pull-name')).toHaveText('47');
  await page.context().close();
});

test('signing out forgets the cellar’s pages on this device', async ({ browser }) => {
  const { email, password } = signInOf(readDemo(e2eFolder()), 'cellar hand');
  const context = await browser.newContext({ viewport: { width: 360, height: 740 } });
  const page = await context.newPage();
  await page.goto('/sign-in');
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL('**/c/**');
  await page.goto('/pull/pellow-rake');
  await keptForOffline(page);
  const kept = () => page.evaluate(async () => (await (await caches.open('tercet-cellar')).keys()).map((request) => new URL(request.url).pathname));
  expect(await kept()).toEqual(['/pull/pellow-rake']);
  await page.goto('/account');
  await page.getByRole('button', { name: 'Sign out', exact: true }).click();
  await page.waitForURL('**/sign-in**');
  await expect.poll(kept).toEqual([]);
  await context.setOffline(true);
  await page.goto('/pull/pellow-rake').catch(() => undefined);
  await expect(page.getByRole('heading', { name: 'No signal' })).toBeVisible();
  await expect(page.getByText('Barrel')).toHaveCount(0);
  await context.close();
});
