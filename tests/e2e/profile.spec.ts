import { expect, test } from '@playwright/test';
import { e2eFolder, readDemo } from '../support/demo';
import { CELLAR, joinAsGuest, signedIn } from './support';

const stateOf = (phone: import('@playwright/test').Page, name: string) => phone.locator('.item', { has: phone.getByText(name, { exact: true }) }).locator('.state');

test('a sheet by touch: tap, drag, scroll, no signal, reload, and on', async ({ browser }) => {
  const { joinPath } = readDemo(e2eFolder());
  const phone = await joinAsGuest(browser, joinPath, 'Touch');
  const lines = phone.getByRole('slider');
  await expect(lines.first()).toHaveAttribute('aria-valuetext', 'not set');

  const box = (await lines.first().boundingBox())!;
  await phone.touchscreen.tap(box.x + box.width * 0.64, box.y + box.height / 2);
  await expect(stateOf(phone, 'Ripe apple')).toContainText('received');
  await expect(stateOf(phone, 'Ripe apple')).toContainText(/6[345]/);

  // A finger that comes down on a line and scrolls the page sets nothing.
  const second = (await lines.nth(1).boundingBox())!;
  const client = await phone.context().newCDPSession(phone);
  const touch = (type: 'touchStart' | 'touchMove' | 'touchEnd', x: number, y: number) => client.send('Input.dispatchTouchEvent', { type, touchPoints: type === 'touchEnd' ? [] : [{ x, y }] });
  await phone.setViewportSize({ width: 360, height: 420 });
  const moved = (await lines.nth(1).boundingBox())!;
  await touch('touchStart', moved.x + 100, moved.y + 20);
  for (let y = 10; y <= 120; y += 10) await touch('touchMove', moved.x + 100, moved.y + 20 - y);
  await touch('touchEnd', 0, 0);
  await expect(lines.nth(1)).toHaveAttribute('aria-valuetext', 'not set');
  await phone.setViewportSize({ width: 360, height: 740 });
  expect(second.height).toBeGreaterThanOrEqual(48);

  await phone.context().setOffline(true);
  const now = (await lines.nth(1).boundingBox())!;
  await phone.touchscreen.tap(now.x + now.width * 0.2, now.y + now.height / 2);
  await expect(stateOf(phone, 'Pear')).toContainText('on this phone');
  await expect(phone.locator('.label .foot')).toContainText('1 on this phone');
  await phone.context().setOffline(false);
  await expect(stateOf(phone, 'Pear')).toContainText('received', { timeout: 20_000 });

  await phone.getByRole('button', { name: 'Next: palate' }).click();
  await expect(phone.getByRole('heading', { name: 'Palate' })).toBeVisible();
  await phone.reload();
  await expect(phone.getByRole('heading', { name: 'Palate' })).toBeVisible();
  await phone.getByRole('button', { name: 'Nose' }).click();
  await expect(stateOf(phone, 'Ripe apple')).toContainText('received');
});

test('a whole sheet by keyboard alone', async ({ browser }) => {
  test.setTimeout(180_000);
  const { joinPath } = readDemo(e2eFolder());
  const phone = await joinAsGuest(browser, joinPath, 'Keys');
  const glasses = await phone.locator('.glasses svg').count();
  expect(glasses).toBe(4);
  const first = phone.getByRole('slider').first();
  await first.focus();
  await phone.keyboard.press('ArrowRight');
  await expect(first).toHaveAttribute('aria-valuenow', '50');
  await phone.keyboard.press('PageUp');
  await phone.keyboard.press('ArrowLeft');
  await expect(first).toHaveAttribute('aria-valuenow', '59');
  await phone.keyboard.press('Delete');
  await expect(first).toHaveAttribute('aria-valuetext', 'not set');
  await phone.keyboard.press('End');
  await expect(first).toHaveAttribute('aria-valuenow', '100');
  // Without tasting on: what is missing stands in the look-over after the last glass. The rest of a
  // glass can't be skipped, so this walks to the first rest only.
  for (const name of [/Next: palate/, /Next: mouthfeel/, /Next: after/, /Glass done/]) {
    await phone.getByRole('button', { name }).focus();
    await phone.keyboard.press('Enter');
  }
  await expect(phone.getByRole('heading', { name: 'Spit, rinse, wait' })).toBeVisible();
  await expect(phone.getByRole('button', { name: /Opens in \d+ s/ })).toBeDisabled();
});

test('a guarded step by keyboard alone: lift, press, press again', async ({ browser }) => {
  const leader = await signedIn(browser, 'leader');
  await leader.goto(`${CELLAR}/sessions`);
  await leader.getByRole('link', { name: 'Next tasting' }).first().click();
  await leader.waitForURL(/sessions\/[0-9a-f-]{36}$/);
  const guard = leader.locator('details.guarded').filter({ has: leader.locator('button.hold', { hasText: 'Seal the plan' }) });
  await guard.locator('summary').focus();
  await leader.keyboard.press('Enter');
  await guard.locator('button.hold').focus();
  await leader.keyboard.press('Enter');
  // One press, or two in one slip, seal nothing.
  await leader.keyboard.press('Enter');
  await expect(guard.getByRole('button', { name: 'Press again: seal the plan' })).toBeVisible();
  await expect(leader.getByRole('listitem').filter({ hasText: 'draft' })).toHaveAttribute('aria-current', 'step');
  await leader.waitForTimeout(900);
  await leader.keyboard.press('Enter');
  await expect(leader.getByRole('listitem').filter({ hasText: 'sealed' }).first()).toHaveAttribute('aria-current', 'step');
});
