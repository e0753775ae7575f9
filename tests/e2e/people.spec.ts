import { expect, test } from 'playwright/test';
import { openPage } from './open-page';
import { signInAs } from './sign-in';

test('an admin invites, the person accepts once, gets another role and is switched off', async ({ page, browser, baseURL }) => {
  const stamp = Date.now().toString(36);
  const name = `Ruth Ferrow ${stamp}`;
  const email = `ruth.${stamp}@tillmere.example`;
  const password = 'three wires in a box';
  await signInAs(page, 'admin');
  await openPage(page, '/people');
  await page.keyboard.press('n');
  await page.getByRole('button', { name: 'Invite and show the link' }).click();
  await expect(page.getByText('Name the person.')).toBeVisible();
  await page.getByLabel('Name').fill(name);
  await page.getByLabel('E-mail').fill(email);
  await page.getByRole('button', { name: 'Invite and show the link' }).click();
  const link = await page.getByLabel(`One-time link for ${name}`).inputValue();
  await expect(page.getByRole('row', { name: new RegExp(name) })).toContainText('invited');

  // The link names the configured address; the browser of the test stands at its own.
  const path = `/invitation${new URL(link).hash}`;
  const guest = await browser.newContext({ baseURL });
  const theirs = await guest.newPage();
  await openPage(theirs, path);
  await theirs.getByLabel('Password', { exact: true }).fill('short');
  await theirs.getByLabel('The same again').fill('short');
  await theirs.getByRole('button', { name: 'Set it and open my sheets' }).click();
  await expect(theirs.getByText('Take at least 10 characters')).toBeVisible();
  await theirs.getByLabel('Password', { exact: true }).fill(password);
  await theirs.getByLabel('The same again').fill(password);
  await theirs.getByRole('button', { name: 'Set it and open my sheets' }).click();
  await expect(theirs).toHaveURL(/\/jobs$/);

  const second = await browser.newContext({ baseURL });
  const again = await second.newPage();
  await openPage(again, path);
  await again.getByLabel('Password', { exact: true }).fill(password);
  await again.getByLabel('The same again').fill(password);
  await again.getByRole('button', { name: 'Set it and open my sheets' }).click();
  await expect(again.getByRole('alert').filter({ hasText: 'has been used or has run out' })).toBeVisible();
  await second.close();

  await page.reload();
  await page.getByRole('button', { name: `Change ${name}` }).click();
  await page.getByLabel('electrician').check();
  await page.getByRole('button', { name: 'Save the roles' }).click();
  await expect(page.getByRole('row', { name: new RegExp(name) })).toContainText('apprentice, electrician');
  await openPage(theirs, '/jobs');
  await expect(theirs.getByRole('link', { name: '+ New job' })).toBeVisible();

  await page.getByRole('button', { name: `Change ${name}` }).click();
  await page.getByRole('button', { name: 'Switch off', exact: true }).click();
  await expect(page.getByRole('alertdialog')).toContainText('signed out at once');
  await page.getByRole('alertdialog').getByRole('button', { name: 'Switch off' }).click();
  await expect(page.getByRole('row', { name: new RegExp(name) }).first()).toContainText('off');
  expect((await guest.request.get('/api/jobs')).status()).toBe(401);
  await guest.close();
});

test('people who are no admin see no way to change anybody', async ({ page }) => {
  await signInAs(page, 'electrician');
  await openPage(page, '/people');
  await expect(page.getByRole('table', { name: 'People of the team' })).toBeVisible();
  await expect(page.getByRole('button', { name: /^Change/ })).toHaveCount(0);
  await expect(page.getByRole('button', { name: /Invite/ })).toHaveCount(0);
});

test('the last admin cannot give the role away', async ({ page }) => {
  await signInAs(page, 'admin');
  await openPage(page, '/people');
  await page.getByRole('row', { name: /\(you\)/ }).getByRole('button').click();
  await page.getByLabel('trainer').check();
  await page.getByLabel('admin').uncheck();
  await page.getByRole('button', { name: 'Save the roles' }).click();
  await expect(page.getByRole('alert').filter({ hasText: 'no admin left' })).toBeVisible();
});
