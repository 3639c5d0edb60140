import { expect, test } from '@playwright/test';
import { e2eFolder, readDemo, signInOf } from '../support/demo';
import { Client } from '../support/http';
import { check } from './axe';
import { CELLAR, signedIn } from './support';

test('two people prepare a session in two steps, and both could taste', async ({ browser }) => {
  const leader = new Client(test.info().project.use.baseURL!);
  const { email, password } = signInOf(readDemo(e2eFolder()), 'leader');
  await leader.signIn(email, password);
  const form = await leader.get(`${CELLAR}/sessions/new`);
  const values = (name: string) => [...form.document.querySelectorAll<HTMLInputElement>(`input[name="${name}"]`)].map((box) => box.value);
  const member = (who: RegExp) => [...form.document.querySelectorAll<HTMLInputElement>('input[name="pourers"]')].find((box) => who.test(box.closest('label')!.textContent))!.value;
  const draft = await leader.submitForm(form, 'Save the draft', {
    method: 'profile', title: 'Two steps', instruction: 'Taste and spit.', privateQuestion: 'Which?', pulls: values('pulls').slice(0, 4), lines: values('lines').slice(0, 4),
    seatsPlanned: 6, reservesPlanned: 2, replicates: 2, alpha: 0.05, servingVolumeMl: 30, restS: 60, allergens: ['sulfites'], coding: 'two_step', letteredBy: member(/odo/i), codedBy: member(/bram/i),
  });
  await leader.submitForm(draft, 'Seal the plan (hold two seconds)');
  const path = new URL(draft.url).pathname;

  const first = await signedIn(browser, 'leader');
  await first.goto(path);
  await first.getByRole('link', { name: 'Your half of the coding' }).click();
  await expect(first.getByRole('heading', { name: 'First step: letters' })).toBeVisible();
  await expect(first.locator('.bottle')).toHaveCount(4);
  // Letters and barrels; no code of three digits anywhere.
  await expect(first.locator('main')).toContainText(/barrel/i);
  await expect(first.locator('table.pour')).toHaveCount(0);

  const second = await signedIn(browser, 'cellar hand');
  await second.goto(`${path}/pour`);
  await expect(second.getByRole('heading', { name: 'Second step: codes, flight 1' })).toBeVisible();
  await expect(second.locator('.bottle')).toHaveCount(8);
  await expect(second.locator('.sheet').first()).not.toContainText(/barrel \d/i);
  for (const page of [first, second]) expect(await check(page, page.url())).toEqual([]);
  await first.goto(`${CELLAR}/sessions/new`);
  await first.getByLabel('Who knows the key?').selectOption('two_step');
  await expect(first.getByLabel('Marks letters with codes')).toBeVisible();
  await expect(first.getByText('Who pours?')).toBeHidden();
});
