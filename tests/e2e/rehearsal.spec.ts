import { expect, test, type Page } from 'playwright/test';
import { faultsOf } from './axe';
import { signInAs } from './sign-in';

interface Demo {
  job: string;
  drawing: string;
  /** ids by designation */
  idOf: Map<string, string>;
}

/** The demo's home with a backup source. A rehearsal changes nothing in it, so that no job of its own is needed. */
async function demoHome(page: Page): Promise<Demo> {
  const { rows } = (await (await page.request.get('/api/jobs')).json()) as { rows: { id: string; title: string }[] };
  const job = rows.find(({ title }) => title === '3 Quarry Steps')!.id;
  const { drawingId } = (await (await page.request.get(`/api/jobs/${job}`)).json()) as { drawingId: string };
  const home = (await (await page.request.get(`/api/drawings/${drawingId}/json`)).json()) as {
    parts: { id: string; ref?: string }[];
  };
  return { job, drawing: drawingId, idOf: new Map(home.parts.flatMap(({ id, ref }) => (ref ? [[ref, id]] : []))) };
}

const sheet = (page: Page) => page.getByRole('application');
const margin = (page: Page) => page.getByRole('complementary');
const ready = (page: Page) =>
  expect(page.locator('[role=application][aria-busy=false]')).toBeVisible({ timeout: 60_000 });
const stored = async (page: Page, { drawing }: Demo) =>
  (await page.request.get(`/api/drawings/${drawing}/json`)).text();

test('the mains are taken away, a switch is turned, a fault is put in and walked; the drawing stays as it was', async ({
  page,
}) => {
  test.setTimeout(180_000);
  await signInAs(page, 'electrician');
  const demo = await demoHome(page);
  const before = await stored(page, demo);
  const part = (ref: string) => page.locator(`svg[data-part="${demo.idOf.get(ref)}"]`);

  await page.goto(`/jobs/${demo.job}/rehearsal`);
  await ready(page);
  await expect(page.getByRole('link', { name: '5 Rehearsal' })).toHaveAttribute('aria-current', 'page');
  await expect(part('E1')).toHaveAttribute('data-state', 'live');

  await margin(page).getByText('outage', { exact: true }).click();
  await expect(page).toHaveURL(/\?supply=dead$/);
  await expect(part('E1')).toHaveAttribute('data-state', 'dead');
  await expect(part('E13')).toHaveAttribute('data-state', 'live');
  await expect(page.getByRole('status').filter({ hasText: 'Outage. Dark:' }).first()).toBeAttached();

  await part('S12').click();
  await expect(part('E13')).toHaveAttribute('data-state', 'dead');
  await expect(page.locator(`[data-word="${demo.idOf.get('S12')}"]`)).toHaveText('off');
  await page.keyboard.press('Enter');
  await expect(part('E13')).toHaveAttribute('data-state', 'live');

  await part('M1').click();
  await expect(margin(page).getByRole('heading', { name: 'What is live in M1?' })).toBeVisible();
  await page.keyboard.press('f');
  await expect(margin(page).getByRole('button', { name: 'line to case' })).toBeFocused();
  await page.keyboard.press('Enter');
  await expect(margin(page).getByRole('heading', { name: 'Fault walk: line to case at M1' })).toBeVisible();
  await expect(margin(page).getByText('step 2 of 4')).toBeVisible();
  await expect(page.locator('[data-callout]')).toContainText('M1 case to earth');

  await sheet(page).focus();
  await page.keyboard.press('ArrowRight');
  await expect(margin(page).getByText('step 3 of 4')).toBeVisible();
  await expect(page.locator('[data-word]').filter({ hasText: 'tripped' })).toHaveCount(1);
  await expect(part('M1')).toHaveAttribute('data-state', 'dead');
  for (const scheme of ['light', 'dark'] as const) {
    await page.emulateMedia({ colorScheme: scheme });
    expect(await faultsOf(page, scheme)).toEqual([]);
  }

  // A reload keeps what is rehearsed; nothing of it has gone into the drawing.
  await page.reload();
  await ready(page);
  await expect(margin(page).getByText('step 3 of 4')).toBeVisible();
  await page.getByRole('group', { name: 'Stations in time' }).getByRole('button').last().click();
  await expect(margin(page).getByText('step 4 of 4')).toBeVisible();
  await sheet(page).focus();
  await page.keyboard.press('Escape');
  await expect(margin(page).getByRole('heading', { name: /Fault walk/ })).toBeHidden();
  await expect(page).toHaveURL(/\?supply=dead&hand=/);
  expect(await stored(page, demo)).toBe(before);
});

test('by touch alone: a narrow screen has the conditions on the sheet and the steps in a line', async ({
  browser,
  baseURL,
}) => {
  test.setTimeout(120_000);
  const context = await browser.newContext({
    baseURL,
    viewport: { width: 390, height: 844 },
    hasTouch: true,
    isMobile: true,
    reducedMotion: 'reduce',
  });
  const page = await context.newPage();
  await signInAs(page, 'electrician');
  const demo = await demoHome(page);
  const at = demo.idOf.get('X21')!;
  await page.goto(`/jobs/${demo.job}/rehearsal?fault=line-to-case~${at}`);
  await ready(page);
  await sheet(page).getByText('main off', { exact: true }).tap();
  await expect(page).toHaveURL(/set=/);
  await sheet(page).getByText('mains', { exact: true }).tap();
  await expect(page).not.toHaveURL(/set=/);
  const stations = page.getByRole('group', { name: 'Stations in time' }).getByRole('button');
  await expect(stations).toHaveCount(4);
  for (const station of await stations.all()) {
    const box = (await station.boundingBox())!;
    expect(Math.min(box.width, box.height)).toBeGreaterThanOrEqual(44);
  }
  await page.getByRole('button', { name: 'Step on' }).first().tap();
  await expect(page).toHaveURL(/step=3/);
  expect(await faultsOf(page, 'narrow')).toEqual([]);
  await context.close();
});
