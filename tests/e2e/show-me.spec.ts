import { expect, test, type Page } from 'playwright/test';
import { beginJob, command, drawingOf, openFace, saved, savedHome, sheet } from './a-job';
import { faultsOf } from './axe';
import { signInAs } from './sign-in';

const walked = (page: Page) => page.locator('[data-walked][data-state]');
const states = (page: Page) => walked(page).evaluateAll((parts) => parts.map((part) => part.getAttribute('data-state')).join());

test('a finding plays its fault on the sheet: by key, step by step, and nothing of it is saved', async ({ page }) => {
  await signInAs(page, 'electrician');
  await page.emulateMedia({ reducedMotion: 'reduce' });
  const { rows } = (await (await page.request.get('/api/jobs')).json()) as { rows: { id: string; title: string }[] };
  const job = rows.find(({ title }) => title === '3 Quarry Steps, for review')!.id;
  const drawing = await drawingOf(page, job);
  const stored = async () => (await page.request.get(`/api/drawings/${drawing}/json`)).text();
  const before = await stored();
  await openFace(page, job);
  await expect(page.getByRole('heading', { name: /findings/ })).toBeVisible();
  await page.keyboard.press('n');
  await page.keyboard.press('p');

  const stations = page.getByRole('group', { name: 'Stations in time' });
  await expect(stations).toBeVisible({ timeout: 30_000 });
  // with less motion asked for it stands at the fault until somebody steps
  await expect(stations.locator('[aria-current=step]')).toHaveAccessibleName(/^2: t = 0/);
  const atFault = await states(page);
  expect(atFault).toContain('dead');
  expect(await page.locator('[data-layer=pencil] path').count()).toBeGreaterThan(0);
  await expect(page.locator('.react-flow__nodes')).toHaveCSS('opacity', '0');
  expect(await faultsOf(page, 'a fault is shown')).toEqual([]);

  await sheet(page).focus();
  await page.keyboard.press('ArrowRight');
  await expect(stations.locator('[aria-current=step]')).toHaveAccessibleName(/^3: .*opens/);
  await expect(page.locator('[data-word]').filter({ hasText: 'tripped' })).toHaveCount(1);
  expect(await states(page)).not.toBe(atFault);
  await expect(page.getByRole('complementary').getByText('Taken for granted, as no drawing tells it:')).toBeVisible();
  await page.keyboard.press('Space');
  await expect(page.getByText(/your system asks for less motion/)).toBeAttached();

  await page.keyboard.press('Escape');
  await expect(walked(page)).toHaveCount(0);
  await expect(page.locator('.react-flow__nodes')).toHaveCSS('opacity', '1');
  expect(await stored()).toBe(before);
});

test('a part that is dragged shows where it will stand and what with in line; locked, it stays', async ({ page }) => {
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Guide Row');
  await openFace(page, job);
  await command(page, 'place the supply with meter');
  await saved(page);
  const meter = (await savedHome(page, job)).parts.find(({ kind }) => kind === 'meter')!.id;
  const node = page.locator(`.react-flow__node[data-id="${meter}"]`);
  const at = async () => (await savedHome(page, job)).sheet?.overview?.[meter];
  const start = (await at())!;
  const box = (await node.boundingBox())!;
  const middle = { x: box.x + box.width / 2, y: box.y + box.height / 2 };
  await page.mouse.move(middle.x, middle.y);
  await page.mouse.down();
  // a little off the column of the supply: it is drawn back into it
  await page.mouse.move(middle.x + 30, middle.y + 30, { steps: 4 });
  await page.mouse.move(middle.x + 5, middle.y + 36, { steps: 4 });
  await expect(page.locator(`[data-lands="${meter}"]`)).toBeVisible();
  expect(await page.locator('[data-guide=line]').count()).toBeGreaterThan(0);
  await page.keyboard.down('Alt');
  await expect(page.locator('[data-guide]')).toHaveCount(0);
  await page.keyboard.up('Alt');
  await expect(page.locator('[data-guide=line]').first()).toBeAttached();
  await page.mouse.up();
  await expect(page.locator('[data-layer=guides]')).toHaveCount(0);
  await expect.poll(async () => (await at())!.y).toBeGreaterThan(start.y);
  expect((await at())!.x).toBe(start.x);

  await sheet(page).focus();
  await page.keyboard.press('Shift+L');
  await expect(page.locator(`[data-lock="${meter}"]`)).toBeAttached();
  await expect.poll(at).toMatchObject({ locked: true });
  const held = await at();
  const now = (await node.boundingBox())!;
  await page.mouse.move(now.x + now.width / 2, now.y + now.height / 2);
  await page.mouse.down();
  await page.mouse.move(now.x + 90, now.y + 60, { steps: 6 });
  await page.mouse.up();
  await expect(page.getByText(/is locked in place\. Unlock with Shift L/)).toBeVisible();
  expect(await at()).toEqual(held);
});
