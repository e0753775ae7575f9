import { readFile } from 'node:fs/promises';
import { expect, test } from 'playwright/test';
import { openPage } from './open-page';
import { signInAs } from './sign-in';

test('a job is found, unfolded and opened by keyboard', async ({ page }) => {
  await signInAs(page, 'electrician');
  await openPage(page, '/jobs');
  const place = await page.locator('[data-job]').first().textContent();
  await page.keyboard.press('/');
  await page.keyboard.type(place!);
  await expect(page).toHaveURL(/search=/);
  await expect(page.locator('[data-job]')).toHaveCount(1);
  await page.keyboard.press('ArrowDown');
  await page.keyboard.press('Enter');
  await expect(page.getByRole('link', { name: /1 Survey/ })).toBeVisible();
  await page.keyboard.press('1');
  await expect(page).toHaveURL(/\/survey$/);
  await page.goBack();
  await expect(page).toHaveURL(/search=/);
});

test('a search that finds nothing says so and is cleared', async ({ page }) => {
  await signInAs(page, 'electrician');
  await openPage(page, '/jobs?search=zzzz');
  await expect(page.getByText('Nothing has "zzzz".')).toBeVisible();
  await page.getByRole('button', { name: 'Clear' }).click();
  await expect(page.locator('[data-job]').first()).toBeVisible();
});

test('a job is edited, archived and taken out again; its cells are safe in a spreadsheet', async ({ page }) => {
  const place = `Sluice House ${Date.now().toString(36)}`;
  const found = `/jobs?search=${encodeURIComponent(place)}`;
  await signInAs(page, 'electrician');
  await openPage(page, '/jobs/new');
  await page.getByLabel('Client', { exact: true }).fill('=HYPERLINK("http://elsewhere.example")');
  await page.getByLabel('Place', { exact: true }).fill(place);
  await page.getByRole('button', { name: 'Begin the job' }).click();
  await expect(page).toHaveURL(/\/survey$/);

  await openPage(page, found);
  const download = page.waitForEvent('download');
  await page.getByRole('button', { name: 'Register as CSV' }).click();
  const text = await readFile((await (await download).path())!, 'utf8');
  expect(text).toContain(`"'=HYPERLINK(""http://elsewhere.example"")"`);

  await page.locator('[data-job]').first().press('Enter');
  await page.getByRole('link', { name: 'Edit the job' }).click();
  await page.getByLabel('Address').fill('Sluice Lane');
  await page.getByRole('button', { name: 'Save' }).click();
  await expect(page).toHaveURL(/\/jobs$/);

  await openPage(page, found);
  await page.locator('[data-job]').first().press('Enter');
  await page.getByRole('link', { name: 'Edit the job' }).click();
  await expect(page.getByLabel('Address')).toHaveValue('Sluice Lane');
  await page.getByRole('button', { name: 'Archive it' }).click();
  await page.getByRole('alertdialog').getByRole('button', { name: 'Archive it' }).click();
  await expect(page).toHaveURL(/\/jobs$/);
  await openPage(page, found);
  await expect(page.getByText(`Nothing has "${place}".`)).toBeVisible();
  await openPage(page, `${found}&filter=archived`);
  await page.locator('[data-job]').first().press('Enter');
  await page.getByRole('link', { name: 'Edit the job' }).click();
  await page.getByRole('button', { name: 'Take it out of the archive' }).click();
  await expect(page.locator('[data-job]')).toHaveCount(1);
});

test('an apprentice sees the jobs given to them and begins none', async ({ page }) => {
  await signInAs(page, 'apprentice');
  await openPage(page, '/jobs');
  await expect(page.getByRole('link', { name: /New job/ })).toHaveCount(0);
  await openPage(page, '/jobs/new');
  await expect(page).toHaveURL(/\/jobs$/);
  await openPage(page, '/jobs/not-a-job/survey');
  await expect(page.getByRole('heading', { name: 'There is no such sheet' })).toBeVisible();
});

test('the catalogue of rules is searched and a lesson opened', async ({ page }) => {
  await signInAs(page, 'apprentice');
  await openPage(page, '/rules');
  await page.keyboard.press('/');
  await page.keyboard.type('backfeed');
  await expect(page.getByRole('status').filter({ hasText: 'found' })).toBeVisible();
  await page.getByRole('link', { name: /backfeed/ }).first().click();
  await expect(page).toHaveURL(/\/rules\/backfeed$/);
  await expect(page.getByRole('heading', { name: 'What happens' })).toBeVisible();
  await expect(page.getByText('(from memory)').first()).toBeVisible();
});
