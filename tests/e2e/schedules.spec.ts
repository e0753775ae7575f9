import { randomUUID } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { expect, test, type Page } from 'playwright/test';
import { applyPatch, diff } from '../../diagram/document/patch';
import type { Installation } from '../../diagram/document/schema';
import { draftPatch } from '../../diagram/survey/draft';
import { parseSurvey } from '../../diagram/survey/parse';
import { readCsv } from '../diagram/schedules/read-csv';
import { beginJob, drawingOf, openFace, saved } from './a-job';
import { faultsOf } from './axe';
import { signInAs } from './sign-in';

const ROOMS = `name;kind;lamps;fans;outlets;heavy;lamps kept;fans kept;hours
Kitchen;room;2x12;;3;oven 3000;1;;3
Study;room;2x9;1x55;2;;1;1;3`;

/** Begins a job of two rooms, drafted as the survey drafts them, and opens its schedules. */
async function draftedJob(page: Page, place: string): Promise<string> {
  const job = await beginJob(page, place);
  const drawing = await drawingOf(page, job);
  const { document } = (await (await page.request.get(`/api/drawings/${drawing}`)).json()) as {
    document: Installation;
  };
  const surveyed = applyPatch(document, { set: { survey: parseSurvey(ROOMS).rooms } });
  const patch = diff(document, applyPatch(surveyed, draftPatch(surveyed, 3)));
  const origin = new URL((await page.request.get('/signin')).url()).origin;
  const answer = await page.request.post(`/api/drawings/${drawing}/changes`, {
    headers: { origin },
    data: { saveId: randomUUID(), base: 0, label: 'Draft 2 rooms', patch },
  });
  expect(answer.status()).toBe(200);
  await openSchedules(page, job);
  return job;
}

async function openSchedules(page: Page, job: string, query = '') {
  await page.goto(`/jobs/${job}/schedules${query}`);
  await expect(page.getByRole('table').first()).toBeVisible({ timeout: 60_000 });
}

const ways = (page: Page) => page.getByRole('table', { name: 'Schedule of ways' });
const rowOf = (page: Page, name: string) =>
  ways(page)
    .getByRole('row')
    .filter({ has: page.locator(`input[value="${name}"]`) });

test('a size typed into the schedule is drawn, found, put right and taken back', async ({ page }) => {
  await signInAs(page, 'electrician');
  const job = await draftedJob(page, 'Sluice End 4');
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
  await saved(page);
  await openSchedules(page, job);
  await expect(rowOf(page, 'Kitchen oven').getByRole('textbox', { name: /, run, metres$/ })).toHaveValue('23');
});

test('several rows are typed at once, a text that cannot be read stays in its cell', async ({ page }) => {
  await signInAs(page, 'electrician');
  const job = await draftedJob(page, 'Sluice End 5');
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

  // From its row the way is gone to on sheet 2, and from there back to its curves.
  await page.keyboard.press('Escape');
  await page.keyboard.press('g');
  await expect(page).toHaveURL(/\/overview$/);
  await openFace(page, job);
  await page.keyboard.press('/');
  await page.keyboard.type('Kitchen oven');
  await page.keyboard.press('Enter');
  await page.keyboard.press('s');
  await expect(page).toHaveURL(/\/schedules\?way=/);
  await expect(page.getByRole('heading', { name: /^Way \d+: time against current/ })).toBeVisible();
  await expect(page.getByText(/% is lost up to E\d/)).toBeVisible();
});

test('each table is a file with its head, and its figures are those on the sheet', async ({ page }) => {
  await signInAs(page, 'electrician');
  const job = await draftedJob(page, 'Sluice End 6');
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Ways as CSV' }).click();
  const file = await download;
  expect(file.suggestedFilename()).toMatch(/^OH-\d+ Sluice End 6 ways\.csv$/);
  const records = readCsv(await readFile(await file.path(), 'utf8'));
  expect(records.slice(0, 7).map(([name]) => name)).toEqual([
    'Schedule',
    'Drawing',
    'Revision',
    'Date',
    'Drawn by',
    'State',
    'Practice',
  ]);
  expect(records.filter(([name]) => name === 'Caution')).toHaveLength(2);
  const heads = records.find(([first]) => first === 'Number, fed by')!;
  const oven = records.find((record) => record[1] === 'Kitchen oven')!;
  const figure = Number(oven[heads.indexOf('Capacity Iz, A')]);
  await expect(rowOf(page, 'Kitchen oven')).toContainText(figure.toFixed(1));
  for (const table of ['cables', 'loads', 'backup', 'sources', 'batteries', 'designations']) {
    const answer = await page.request.get(`/api/drawings/${await drawingOf(page, job)}/csv?table=${table}`);
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

test('axe finds nothing on any schedule, light and dark, wide and narrow', async ({ page }) => {
  test.setTimeout(240_000);
  await signInAs(page, 'electrician');
  await page.emulateMedia({ reducedMotion: 'reduce' });
  // The apprentice's house, with six mistakes in it: there is the most to find fault with.
  const { rows } = (await (await page.request.get('/api/jobs?search=for review')).json()) as { rows: { id: string }[] };
  await openSchedules(page, rows[0]!.id);
  const faults: string[] = [];
  const look = async (what: string) => faults.push(...(await faultsOf(page, what)));
  for (const schedule of ['cables', 'loads', 'designations', 'backup', 'ways']) {
    await page.getByText(schedule, { exact: true }).click();
    await look(schedule);
  }
  await page.getByRole('button', { name: /^Way 11,/ }).focus();
  await page.getByText('The same as figures').first().click();
  // From the top: a row that slides under the headings is no target of the size it has.
  await page.locator('main').evaluate((main) => main.scrollTo(0, 0));
  for (const colorScheme of ['light', 'dark'] as const) {
    await page.emulateMedia({ colorScheme });
    await look(`ways, ${colorScheme}`);
  }
  await page.setViewportSize({ width: 390, height: 844 });
  await look('ways, dark, narrow');
  expect(faults).toEqual([]);
});
