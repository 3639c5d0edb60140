import { expect, test } from '@playwright/test';
import { e2eFolder, readDemo } from '../support/demo';
import { joinAsGuest, keptForOffline, readQr, signedIn } from './support';

test('a sheet opens again with no network, and hands over by code without counting twice', async ({ browser }) => {
  const { joinPath } = readDemo(e2eFolder());
  const phone = await joinAsGuest(browser, joinPath, 'Offline', 'es');
  await expect(phone.locator('html')).toHaveAttribute('lang', 'es');
  await keptForOffline(phone);
  const path = new URL(phone.url()).pathname;
  const line = phone.getByRole('slider').first();
  const tap = async (share: number) => {
    const box = (await line.boundingBox())!;
    await phone.touchscreen.tap(box.x + box.width * share, box.y + box.height / 2);
  };
  await phone.context().setOffline(true);
  await tap(0.62);
  await expect(phone.locator('.item').first().locator('.state')).toContainText('en este teléfono');

  // The browser is closed and opened again with no signal: the sheet and the answer are there.
  const began = Date.now();
  await phone.goto('about:blank');
  await phone.goto(path);
  await expect(phone.locator('.val').first()).toHaveText(/6[123]/);
  expect(Date.now() - began).toBeLessThan(4_000);
  await phone.goto('/check').catch(() => undefined);
  await expect(phone.getByRole('heading', { name: 'Sin señal' })).toBeVisible();
  await phone.goto(path);

  await phone.getByRole('button', { name: 'Entregar con código' }).click();
  await expect(phone.locator('.handover-code')).toBeVisible();
  const text = await readQr(phone.locator('.handover-code'));

  const leader = await signedIn(browser, 'leader');
  await leader.getByRole('link', { name: 'Open tasting' }).first().click();
  await leader.getByRole('link', { name: 'Scan its codes' }).click();
  await leader.getByText('Paste a code’s text').click();
  await leader.getByLabel('Text of one code or of several').fill(text);
  await leader.getByRole('button', { name: 'Take it' }).click();
  await expect(leader.getByText(/1 received/)).toBeVisible();

  // Back in signal the phone sends the same answer: it gets the same receipt.
  await phone.context().setOffline(false);
  await phone.getByRole('button', { name: 'Volver a la ficha' }).click();
  await expect(phone.locator('.item').first().locator('.state')).toContainText('recibido', { timeout: 20_000 });
  await leader.getByLabel('Text of one code or of several').fill(text);
  await phone.context().close();
  await leader.context().close();
});

test('undo, clear, the other hand and another language, by touch', async ({ browser }) => {
  const { joinPath } = readDemo(e2eFolder());
  const phone = await joinAsGuest(browser, joinPath, 'Undo');
  const line = phone.getByRole('slider').first();
  const tap = async (share: number) => {
    const box = (await line.boundingBox())!;
    await phone.touchscreen.tap(box.x + box.width * share, box.y + box.height / 2);
    await phone.waitForTimeout(400);
  };
  await tap(0.2);
  await expect(line).toHaveAttribute('aria-valuenow', /2\d|19/);
  const first = await line.getAttribute('aria-valuenow');
  await tap(0.8);
  await phone.getByRole('button', { name: 'Undo' }).click();
  await expect(line).toHaveAttribute('aria-valuenow', first!);
  await phone.getByRole('button', { name: /^Clear / }).click();
  await expect(line).toHaveAttribute('aria-valuetext', 'not set');
  await phone.getByRole('button', { name: 'Undo' }).click();
  await expect(line).toHaveAttribute('aria-valuenow', first!);

  await phone.getByText('View', { exact: true }).click();
  await phone.getByRole('button', { name: 'the left hand' }).click();
  await expect(phone.locator('html')).toHaveAttribute('data-hand', 'left');
  await phone.getByRole('button', { name: 'Français' }).click();
  await expect(phone.locator('html')).toHaveAttribute('lang', 'fr');
  await phone.getByRole('button', { name: 'Fermer' }).click();
  await expect(phone.getByRole('heading', { name: 'Nez' })).toBeVisible();
  await expect(phone.locator('html')).toHaveAttribute('lang', 'fr');
  // Words of the built-in lexicon come along; what was scored stays.
  await expect(line).toHaveAttribute('aria-valuenow', first!);
  await phone.context().close();
});

test('nothing moves under the finger when the signal goes and comes', async ({ browser }) => {
  const phone = await joinAsGuest(browser, readDemo(e2eFolder()).joinPath, 'Still', 'fr');
  await expect(phone.locator('main[aria-busy=false]')).toBeVisible();
  const places = () => phone.getByRole('slider').evaluateAll((lines) => lines.map((line) => Math.round(line.getBoundingClientRect().top + scrollY)));
  const first = await places();
  const tap = async (n: number) => {
    const box = (await phone.getByRole('slider').nth(n).boundingBox())!;
    await phone.touchscreen.tap(box.x + box.width * 0.4, box.y + box.height / 2);
  };
  const stateOf = (n: number) => phone.locator('.item').nth(n).locator('.state');
  await phone.context().setOffline(true);
  await tap(0);
  await expect(stateOf(0)).toContainText('sur ce téléphone');
  expect(await places()).toEqual(first);
  // The trouble is told where it pushes nothing away.
  await expect(phone.locator('.foot-bar .caution')).toBeVisible({ timeout: 20_000 });
  expect(await places()).toEqual(first);
  await phone.context().setOffline(false);
  await expect(stateOf(0)).toContainText('reçu', { timeout: 20_000 });
  await expect(phone.locator('.foot-bar .caution')).toHaveCount(0);
  expect(await places()).toEqual(first);
  await phone.context().close();
});
