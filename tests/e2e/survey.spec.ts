import { expect, test, type Page } from 'playwright/test';
import { openPage } from './open-page';
import { signInAs } from './sign-in';

/** Begins a job and answers the address of its survey. */
async function beginJob(page: Page, place: string): Promise<string> {
  await openPage(page, '/jobs');
  await page.keyboard.press('n');
  await expect(page).toHaveURL(/\/jobs\/new$/);
  await page.getByLabel('Client', { exact: true }).fill('M. Orrin');
  await page.getByLabel('Place', { exact: true }).fill(place);
  await page.getByLabel('Hours of backup wanted').fill('4');
  await page.getByRole('button', { name: 'Begin the job' }).click();
  await expect(page).toHaveURL(/\/survey$/);
  return page.url();
}

const table = (page: Page) => page.getByRole('table', { name: 'Survey, room by room' });

/** Types into whatever has the focus, as hands do: no field is chosen by the test. */
async function type(page: Page, ...keys: string[]) {
  for (const key of keys) {
    if (/^(Tab|Enter|F8|Shift\+|Control\+)/.test(key)) await page.keyboard.press(key);
    else await page.keyboard.type(key);
  }
}

test('a survey is typed by keyboard alone, drafted, and survives a reload', async ({ page }) => {
  await signInAs(page, 'electrician');
  await beginJob(page, 'Weir Mill');
  await table(page).getByRole('textbox', { name: 'New room, name' }).focus();
  await type(page, 'Study', 'Tab', 'Tab', 'Tab', '2x9', 'Tab', '1x55', 'Tab', '2', 'Tab', 'Tab', '1', 'Tab', '1', 'Enter');
  await type(page, 'Shift+Enter', 'Back bedroom', 'Tab', 'Tab', 'Tab', '3 9', 'Tab', 'Tab', '2');
  await type(page, 'Control+Enter');
  await expect(page).toHaveURL(/\/overview$/);

  await page.goBack();
  await page.reload();
  const rows = table(page).getByRole('row');
  await expect(rows.filter({ has: page.getByRole('textbox', { name: 'Study, name', exact: true }) })).toContainText('in step');
  await expect(table(page).getByRole('textbox', { name: 'Back bedroom, kind' })).toHaveValue('sleeping');
  await expect(page.getByRole('heading', { name: 'Sheet 2 is in step' })).toBeVisible();
});

test('rows pasted from a spreadsheet are rooms; the wrong cell is put right from the margin', async ({ page }) => {
  await signInAs(page, 'electrician');
  await beginJob(page, 'Salt Quay 3');
  const text = ['Name\tLamps\tOutlets\tLamps kept\tHours', 'Hall\t2x9\t\t1\t3', 'Kitchen\t2x12\t3\t3\t3', 'Study\t2x9\t3\t1\t4'].join('\n');
  await table(page).getByRole('textbox', { name: 'New room, name' }).focus();
  await page.evaluate((rows) => {
    const clipboardData = new DataTransfer();
    clipboardData.setData('text/plain', rows);
    document.activeElement!.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true }));
  }, text);
  await expect(page.getByRole('heading', { name: 'Kitchen: 3 of 2 lamps stay on' })).toBeVisible();
  await expect(page.getByRole('button', { name: 'Draft 2 rooms' })).toBeVisible();
  await page.getByRole('button', { name: 'Make it 2' }).click();
  await expect(page.getByRole('button', { name: 'Draft 3 rooms' })).toBeVisible();
  await expect(page.getByText(/\d+ new parts/)).toBeVisible();

  await page.keyboard.press('Control+z');
  await expect(page.getByRole('heading', { name: 'Kitchen: 3 of 2 lamps stay on' })).toBeVisible();
  await page.keyboard.press('Control+z');
  await expect(table(page).getByRole('textbox', { name: /, name$/ })).toHaveCount(1);
});

test('what is typed without a network is kept and sent when it is back', async ({ page, context }) => {
  await signInAs(page, 'electrician');
  const address = await beginJob(page, 'Pump Row 2');
  await expect(page.getByText(/^Saved/)).toBeVisible();
  await context.setOffline(true);
  await table(page).getByRole('textbox', { name: 'New room, name' }).focus();
  await type(page, 'Loft', 'Tab');
  await expect(page.getByText('Not saved: kept on this device, 1 change')).toBeVisible({ timeout: 15_000 });
  await context.setOffline(false);
  await expect(page.getByText(/^Saved \d/)).toBeVisible({ timeout: 30_000 });
  await openPage(page, address);
  await expect(table(page).getByRole('textbox', { name: 'Loft, name' })).toBeVisible();
});

test('on a phone a room is a form, stepped with the thumb', async ({ page }) => {
  await signInAs(page, 'electrician');
  await beginJob(page, 'Lock Cottage');
  await page.setViewportSize({ width: 390, height: 844 });
  const form = page.getByRole('region', { name: 'New room' });
  await form.getByRole('textbox', { name: 'New room, name' }).fill('Porch');
  await form.getByRole('textbox', { name: 'New room, name' }).blur();
  const porch = page.getByRole('region', { name: 'Porch' });
  await porch.getByRole('button', { name: 'One more: lamps, number and watts' }).click();
  await porch.getByRole('button', { name: 'One more: lamps, number and watts' }).click();
  await expect(porch.getByRole('textbox', { name: 'Porch, lamps, number and watts' })).toHaveValue('2 × 9');
  await page.getByRole('button', { name: 'Totals and draft' }).click();
  await page.getByRole('button', { name: 'Draft 1 room' }).click();
  await expect(page).toHaveURL(/\/overview$/);
});
