import { expect, type Browser, type Page } from '@playwright/test';
import { e2eFolder, readDemo, signInOf } from '../support/demo';

export const CELLAR = '/c/pellow-rake';

/** A signed-in page of its own browser context, at the desk. */
export async function signedIn(browser: Browser, role: string): Promise<Page> {
  const { email, password } = signInOf(readDemo(e2eFolder()), role);
  const context = await browser.newContext({ viewport: { width: 1280, height: 900 } });
  const page = await context.newPage();
  await page.goto('/sign-in');
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('navigation', { name: 'Cellar' })).toBeVisible();
  return page;
}

/** Lifts a guard and holds its button for the two seconds that it asks for. */
export async function liftAndHold(page: Page, button: RegExp): Promise<void> {
  const guard = page.locator('details.guarded').filter({ has: page.locator('button.hold', { hasText: button }) });
  await guard.locator('summary').click();
  await guard.locator('button.hold').scrollIntoViewIfNeeded();
  const box = (await guard.locator('button.hold').boundingBox())!;
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
  await page.mouse.down();
  await page.waitForTimeout(2300);
  await page.mouse.up();
}

/** Joins by a link as a guest without an account, on a phone of 360 × 740. */
export async function joinAsGuest(browser: Browser, path: string, name: string): Promise<Page> {
  const context = await browser.newContext({ viewport: { width: 360, height: 740 }, hasTouch: true, isMobile: true });
  const page = await context.newPage();
  await page.goto(path);
  await page.getByLabel('Your name').fill(name);
  await page.getByLabel(/legal drinking age/).check();
  await page.getByLabel(/I have read the list/).check();
  await page.getByRole('button', { name: 'Take a seat' }).click();
  await page.waitForURL('**/t/**');
  return page;
}
