import AxeBuilder from '@axe-core/playwright';
import { readFile } from 'node:fs/promises';
import { expect, test, type Page } from 'playwright/test';
import { readCsv } from '../diagram/schedules/read-csv';
import { openPage } from './open-page';
import { signInAs } from './sign-in';

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];

/** Begins a job with two rooms, drafts it, and opens its schedules. */
async function draftedJob(page: Page, place: string): Promise<string> {
  await openPage(page, '/jobs/new');
  await page.getByLabel('Client', { exact: true }).fill('M. Orrin');
  await page.getByLabel('Place', { exact: true }).fill(place);
  await page.getByLabel('Hours of backup wanted').fill('3');
  await page.getByRole('button', { name: 'Begin the job' }).click();
  await expect(page).toHaveURL(/\/survey$/);
  await page.waitForLoadState('networkidle');
  const text = 'Name\tLamps\tFans\tOutlets\tHeavy\tLamps kept\tFans kept\tHours\nKitchen\t2x12\t\t3\toven 3000\t1\t\t3\nStudy\t2x9\t1x55\t2\t\t1\t1\t3';
  await page.getByRole('textbox', { name: 'New room, name' }).first().focus();
  await page.evaluate((rows) => {
    const clipboardData = new DataTransfer();
    clipboardData.setData('text/plain', rows);
    document.activeElement!.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true }));
  }, text);
  await page.getByRole('button', { name: 'Draft 2 rooms' }).click();
  await expect(page).toHaveURL(/\/overview$/);
  await page.getByRole('link', { name: '4 Schedules' }).click();
  await expect(page).toHaveURL(/\/schedules$/);
  await expect(ways(page)).toBeVisible();
  return page.url();
}

const ways = (page: Page) => page.getByRole('table', { name: 'Schedule of ways' });
const rowOf = (page: Page, name: string) => ways(page).getByRole('row').filter({ has: page.locator(`input[value="${name}"]`) });

test('a size typed into the schedule is drawn, found, put right and taken back', async ({ page }) => {
  await signInAs(page, 'electrician');
  const address = await draftedJob(page, 'Sluice End 4');
  const oven = rowOf(page, 'Kitchen oven');
  const size = oven.getByRole('textbox', { name: /, cable, mm²$/ });
  await size.focus();
  await page.keyboard.type('1.5');
  await page.keyboard.press('Enter');
  await expect(oven).toContainText('< In');
  await expect(oven).toContainText('danger');
  await size.focus();
  const margin = page.getByRole('complementary');
  const note = margin.getByRole('heading', { name: /does not protect its cable/ });
  await expect(note).toBeVisible();
  await expect(page.getByText(/^The trouble is overload: from 12\.3 A/)).toBeVisible();
  await expect(margin.getByRole('row', { name: /^as drawn/ })).toContainText('12.3');

  await margin.getByRole('button', { name: 'Pull 2.5 mm2' }).click();
  await expect(note).toBeHidden();
  await expect(size).toHaveValue('2.5');
  await page.keyboard.press('Control+z');
  await expect(note).toBeVisible();
  await page.keyboard.press('Control+z');
  await expect(note).toBeHidden();
  await expect(size).toHaveValue('2.5');

  // What is typed here is saved, and the other sheets have it.
  await oven.getByRole('textbox', { name: /, run, metres$/ }).fill('23');
  await page.keyboard.press('Enter');
  await expect(page.getByText(/^Saved \d/)).toBeVisible();
  await openPage(page, address);
  await expect(rowOf(page, 'Kitchen oven').getByRole('textbox', { name: /, run, metres$/ })).toHaveValue('23');
});

test('several rows are typed at once, a text that cannot be read stays in its cell', async ({ page }) => {
  await signInAs(page, 'electrician');
  await draftedJob(page, 'Sluice End 5');
  const rows = ways(page).getByRole('textbox', { name: /^Way \d+, how it is laid/ });
  await rows.nth(0).focus();
  await page.keyboard.press('Shift+ArrowDown');
  await page.keyboard.press('Shift+ArrowDown');
  await page.keyboard.type('C, 2');
  await page.keyboard.press('Enter');
  for (const i of [0, 1, 2]) await expect(rows.nth(i)).toHaveValue('C, 2');
  await expect(rows.nth(3)).not.toHaveValue('C, 2');
  await page.keyboard.press('Control+z');
  for (const i of [0, 1, 2]) await expect(rows.nth(i)).not.toHaveValue('C, 2');

  const run = ways(page).getByRole('textbox', { name: 'Way 1, run, metres' });
  await run.fill('900');
  await page.keyboard.press('Tab');
  await expect(run).toHaveValue('900');
  await expect(page.getByRole('heading', { name: 'Metres, 1 to 500' })).toBeVisible();
  await run.focus();
  await page.keyboard.press('Escape');
  await expect(page.getByRole('heading', { name: 'Metres, 1 to 500' })).toBeHidden();

  // From the row the way is gone to on sheet 2, and back by its key.
  await page.keyboard.press('Escape');
  await page.keyboard.press('g');
  await expect(page).toHaveURL(/\/overview$/);
  await page.waitForLoadState('networkidle');
  await page.locator('[role=application], [tabindex="0"]').first().focus();
  await page.keyboard.press('s');
  await expect(page).toHaveURL(/\/schedules\?way=/);
  await expect(page.getByRole('heading', { name: /^Way 1: time against current/ })).toBeVisible();
});

test('each table is a file with its head, and its figures are those on the sheet', async ({ page }) => {
  await signInAs(page, 'electrician');
  await draftedJob(page, 'Sluice End 6');
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Ways as CSV' }).click();
  const file = await download;
  expect(file.suggestedFilename()).toMatch(/^OH-\d+ Sluice End 6 ways\.csv$/);
  const records = readCsv(await readFile(await file.path(), 'utf8'));
  expect(records.slice(0, 7).map(([name]) => name)).toEqual(['Schedule', 'Drawing', 'Revision', 'Date', 'Drawn by', 'State', 'Practice']);
  expect(records.filter(([name]) => name === 'Caution')).toHaveLength(2);
  const heads = records.find(([first]) => first === 'Number, fed by')!;
  const oven = records.find((record) => record[1] === 'Kitchen oven')!;
  const figure = Number(oven[heads.indexOf('Capacity Iz, A')]);
  await expect(rowOf(page, 'Kitchen oven')).toContainText(figure.toFixed(1));
  for (const table of ['cables', 'loads', 'backup', 'sources', 'batteries', 'designations']) {
    const { drawingId } = await page.evaluate(() => ({ drawingId: document.querySelector('a[href*="/csv?table="]')!.getAttribute('href')!.split('/')[3]! }));
    const answer = await page.request.get(`/api/drawings/${drawingId}/csv?table=${table}`);
    expect([table, answer.status(), readCsv(await answer.text()).length > 10]).toEqual([table, 200, true]);
  }
});

test('a load is asked for, then taken off the backup', async ({ page }) => {
  await signInAs(page, 'electrician');
  await draftedJob(page, 'Sluice End 7');
  await page.getByText('backup', { exact: true }).click();
  await expect(page.getByText(/^All that stays on, 76 W, lasts/)).toBeVisible();
  await page.getByRole('checkbox', { name: /^M1 / }).check();
  await expect(page.getByText(/^Without M1: 21 W/)).toBeVisible();
  await expect(page.locator('.recharts-surface').first()).toBeVisible();
  await page.getByRole('button', { name: 'Take it off the backup' }).click();
  await expect(page.getByText(/^All that stays on, 21 W, lasts/)).toBeVisible();
  await page.keyboard.press('Control+z');
  await expect(page.getByText(/^All that stays on, 76 W, lasts/)).toBeVisible();
});

test('axe finds nothing on any schedule, light and dark, wide and narrow', async ({ browser, baseURL }) => {
  test.setTimeout(240_000);
  const faults: string[] = [];
  for (const [colorScheme, width] of [
    ['light', 1440],
    ['dark', 1440],
    ['light', 390],
    ['dark', 390],
  ] as const) {
    const context = await browser.newContext({ baseURL, colorScheme, viewport: { width, height: 844 }, reducedMotion: 'reduce' });
    const page = await context.newPage();
    await signInAs(page, 'electrician');
    const { rows } = (await (await page.request.get('/api/jobs?search=Quarry')).json()) as { rows: { id: string }[] };
    for (const table of ['ways', 'cables', 'loads', 'backup', 'designations']) {
      await openPage(page, `/jobs/${rows[0]!.id}/schedules?table=${table}`);
      await page.getByRole('table').first().waitFor();
      await page.getByText('The same as figures').first().click({ timeout: 2_000 }).catch(() => undefined);
      const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
      faults.push(...violations.map(({ id, nodes }) => `${colorScheme} ${width} ${table}: ${id} at ${nodes.map(({ target }) => target.join(' ')).slice(0, 4).join('; ')}`));
    }
    await context.close();
  }
  expect(faults).toEqual([]);
});
