import { expect, test } from 'playwright/test';
import accounts from '../../lib/server/demo/accounts.json' with { type: 'json' };
import { openPage } from './open-page';
import { signInAs } from './sign-in';

const email = accounts.people.find(({ roles }) => roles.includes('trainer'))!.email;

test('a wrong password is told in words that say nothing of the address', async ({ page }) => {
  await openPage(page, '/signin');
  await expect(page.getByText('Isolate both sources, lock off, prove dead.')).toBeVisible();
  await page.getByLabel('E-mail').fill('nobody@elsewhere.example');
  await page.getByLabel('Password', { exact: true }).fill('not the right one');
  await page.getByRole('button', { name: 'Open my sheets' }).click();
  await expect(page.getByRole('alert').filter({ hasText: 'E-mail or password is not right.' })).toBeVisible();
  await expect(page.getByLabel('Password', { exact: true })).toHaveValue('not the right one');
});

test('the password is shown on request', async ({ page }) => {
  await openPage(page, '/signin');
  const password = page.getByLabel('Password', { exact: true });
  await password.fill('a sentence');
  await page.getByRole('button', { name: 'Show password' }).click();
  await expect(password).toHaveAttribute('type', 'text');
  await page.getByRole('button', { name: 'Hide password' }).click();
  await expect(password).toHaveAttribute('type', 'password');
});

test('without a network the sign-in says so and keeps what was typed', async ({ page, context }) => {
  await openPage(page, '/signin');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(accounts.password);
  await context.setOffline(true);
  await expect(page.getByText('No network. Sign in when it is back.')).toBeVisible();
  await page.getByRole('button', { name: 'Open my sheets' }).click();
  await expect(page.getByRole('alert').filter({ hasText: 'No network' })).toBeVisible();
  await context.setOffline(false);
  await page.getByRole('button', { name: 'Open my sheets' }).click();
  await expect(page).toHaveURL(/\/jobs$/);
});

test('signing out ends the session, also for a copied cookie', async ({ page, browser, baseURL }) => {
  await signInAs(page, 'trainer');
  const copied = await page.context().storageState();
  await openPage(page, '/account');
  await page.getByRole('button', { name: 'Sign out', exact: true }).click();
  await expect(page).toHaveURL(/\/signin/);
  await expect(page.getByText('You are signed out.')).toBeVisible();
  const other = await browser.newContext({ storageState: copied, baseURL });
  expect((await other.request.get('/api/jobs')).status()).toBe(401);
  await other.close();
});

test('signing out everywhere ends the other browser too, after a question', async ({ page, browser, baseURL }) => {
  const other = await browser.newContext({ baseURL });
  await signInAs(await other.newPage(), 'trainer');
  await signInAs(page, 'trainer');
  await openPage(page, '/account');
  await page.getByRole('button', { name: 'Sign out everywhere' }).click();
  await page.keyboard.press('Escape');
  expect((await other.request.get('/api/jobs')).status()).toBe(200);
  await page.getByRole('button', { name: 'Sign out everywhere' }).click();
  await page.getByRole('alertdialog').getByRole('button', { name: 'Sign out everywhere' }).click();
  await expect(page).toHaveURL(/\/signin/);
  expect((await other.request.get('/api/jobs')).status()).toBe(401);
  await other.close();
});

test('paper and single keys are kept for the browser', async ({ page }) => {
  await signInAs(page, 'trainer');
  await openPage(page, '/account');
  await page.getByText('Dark paper').click();
  await page.getByLabel('Single keys act as shortcuts').uncheck();
  await page.reload();
  await expect(page.locator('html')).toHaveClass('dark');
  await expect(page.getByLabel('Single keys act as shortcuts')).not.toBeChecked();
  await page.keyboard.press('?');
  await expect(page.getByRole('dialog')).toBeHidden();
  await page.getByLabel('Single keys act as shortcuts').check();
  await page.getByRole('heading', { level: 1 }).click();
  await page.getByLabel('Single keys act as shortcuts').blur();
  await page.keyboard.press('?');
  await expect(page.getByRole('dialog', { name: 'Keys of this sheet' })).toBeVisible();
});
