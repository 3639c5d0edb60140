import { expect, type Browser, type Locator, type Page } from '@playwright/test';
import decodeQR from 'qr/decode.js';
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

/** Joins by a link as a guest without an account, on a phone of 360 × 740 in some language. */
export async function joinAsGuest(browser: Browser, path: string, name: string, locale = 'en'): Promise<Page> {
  const context = await browser.newContext({ viewport: { width: 360, height: 740 }, hasTouch: true, isMobile: true, locale });
  const page = await context.newPage();
  await page.goto(path);
  await page.locator('input[name=displayName]').fill(name);
  for (const tick of await page.getByRole('checkbox').all()) await tick.check();
  await page.locator('form .btn-main').click();
  await page.waitForURL('**/t/**');
  return page;
}

/** Waits until the service worker runs this page and holds what a cold start needs. */
export async function keptForOffline(page: Page): Promise<void> {
  await page.waitForFunction(async () => navigator.serviceWorker.controller !== null && (await Promise.all(['tercet-sheets', 'tercet-cellar'].map(async (name) => (await (await caches.open(name)).keys()).length))).some((n) => n > 0), undefined, { timeout: 20_000 });
  // What loads late (the codes for a handover) is kept a few seconds after the start.
  await page.waitForTimeout(7_000);
}

/** The text of the QR code in a picture on the page, as a camera would read it. */
export async function readQr(picture: Locator): Promise<string> {
  const size = 680;
  const data = await picture.evaluate(async (image: HTMLImageElement, side) => {
    const canvas = document.createElement('canvas');
    canvas.width = canvas.height = side;
    const context = canvas.getContext('2d')!;
    const copy = new Image();
    copy.src = image.src;
    await copy.decode();
    context.fillStyle = 'white';
    context.fillRect(0, 0, side, side);
    context.drawImage(copy, 0, 0, side, side);
    return [...context.getImageData(0, 0, side, side).data];
  }, size);
  return decodeQR({ width: size, height: size, data: Uint8ClampedArray.from(data) });
}
