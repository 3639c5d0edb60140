import { expect, test } from '@playwright/test';
import { CELLAR, signedIn } from './support';

test('anybody can hold the plan file of an unsealed session against its commitment', async ({ browser, page }) => {
  const leader = await signedIn(browser, 'leader');
  await leader.goto(`${CELLAR}/sessions`);
  await leader.getByRole('link', { name: 'Wednesday tasting' }).first().click();
  const path = (await leader.getByRole('link', { name: 'Check it' }).getAttribute('href'))!;
  // Without a sign-in, in a browser of its own.
  await page.goto(path);
  const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('link', { name: 'Get the plan file' }).click()]);
  const file = (await download.path())!;
  await page.getByLabel('Plan file').setInputFiles(file);
  await expect(page.getByText('It fits: the plan was not changed.')).toBeVisible();
  await page.getByLabel('Commitment, 64 digits').fill('0'.repeat(64));
  await expect(page.getByText('It does not fit.')).toBeVisible();

  // An open session's file is not to be had.
  await leader.goto(`${CELLAR}/sessions`);
  await leader.getByRole('link', { name: 'Open tasting' }).first().click();
  await page.goto((await leader.getByRole('link', { name: 'Check it' }).getAttribute('href'))!);
  await expect(page.getByText('The plan file is published when the key is opened')).toBeVisible();
});
