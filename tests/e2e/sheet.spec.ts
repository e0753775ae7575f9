import { readFile, writeFile } from 'node:fs/promises';
import { expect, test, type BrowserContext, type Page } from 'playwright/test';
import { beginJob, savedHome, type Home } from './a-job';
import { faultsOf } from './axe';
import { signInAs } from './sign-in';

const sheet = (page: Page) => page.getByRole('application');
const saved = (page: Page) => expect(page.getByText(/^Saved \d\d:\d\d$/)).toBeVisible({ timeout: 20_000 });
const heading = (page: Page, words: string | RegExp) => page.getByRole('heading', { name: words });

/** The margin has examined the drawing as it stands and has no danger in it. */
async function noDanger(page: Page) {
  await expect(page.locator('[aria-busy=true]')).toHaveCount(0, { timeout: 20_000 });
  await expect(page.locator('[data-note]').filter({ hasText: 'danger' })).toHaveCount(0, { timeout: 20_000 });
}

const count = (home: Home, kind: string): number => home.parts.filter((part) => part.kind === kind).length;

/** Extends from the terminal in hand, by keys alone. */
async function extend(page: Page, typed: string, place: 'Enter' | 'Shift+Enter' = 'Enter') {
  await page.keyboard.press('e');
  await expect(page.getByRole('listbox', { name: 'What comes next' })).toBeVisible();
  await page.keyboard.type(typed);
  await expect(page.getByRole('option').first()).toBeVisible();
  await page.keyboard.press(place);
  await expect(page.getByRole('listbox')).toHaveCount(0);
}

/** Does a command by its words. */
async function command(page: Page, words: string) {
  await page.keyboard.press('Control+k');
  await page.keyboard.type(words);
  await page.keyboard.press('Enter');
}

/** The sheet hears keys, and what was left unsent on this device has been found. */
async function ready(page: Page) {
  await expect(page.locator('[role=application][aria-busy=false]')).toBeVisible({ timeout: 30_000 });
  await sheet(page).focus();
}

async function open(page: Page, job: string, face = 'overview') {
  await page.goto(`/jobs/${job}/${face}`);
  await ready(page);
}

test('a home is drawn, examined, repaired, taken back, reloaded and exported by keyboard alone', async ({ page }) => {
  test.setTimeout(180_000);
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Weir Mill');
  await open(page, job);
  await expect(page.getByRole('button', { name: 'Place the supply' })).toBeVisible();

  await command(page, 'place the supply');
  await extend(page, 'study lamps');
  await extend(page, 'kitchen outlets');
  await extend(page, 'backup source');
  await extend(page, 'bedroom whole');
  await saved(page);
  let home = await savedHome(page, job);
  expect([count(home, 'inverter'), count(home, 'fan'), count(home, 'lamp'), count(home, 'socket')]).toEqual([
    1, 1, 3, 4,
  ]);
  await noDanger(page);

  // a rating is edited where it is written
  await page.keyboard.press('/');
  await page.keyboard.type('kitchen outlets');
  await page.keyboard.press('Enter');
  await page.keyboard.press('Enter');
  await page.keyboard.type('B63');
  await page.keyboard.press('Enter');
  await expect(heading(page, /thinner|cable/i).first()).toBeVisible({ timeout: 20_000 });
  await saved(page);
  home = await savedHome(page, job);
  expect(home.parts.find((part) => part.label === 'Kitchen outlets')?.rating).toBe(63);

  // the finding is gone to, and put right by one of its remedies or by taking the step back
  await sheet(page).focus();
  await page.keyboard.press('n');
  await expect(page.locator('[data-in-hand]')).toBeVisible();
  await page.keyboard.press('Control+z');
  await noDanger(page);
  await saved(page);

  // undo survives a reload
  await page.reload();
  await ready(page);
  const before = count(await savedHome(page, job), 'lamp');
  await page.keyboard.press('Control+z');
  await expect(page.getByRole('status').filter({ hasText: 'Taken back: Draw the bedroom whole' })).toBeVisible();
  await saved(page);
  expect(count(await savedHome(page, job), 'lamp')).toBeLessThan(before);
  await page.keyboard.press('Control+Shift+z');
  await saved(page);
  expect(count(await savedHome(page, job), 'lamp')).toBe(before);

  // the other face, with the same part in hand
  await page.keyboard.press('g');
  await expect(page).toHaveURL(/\/connections/);
  await expect(page.getByRole('heading', { name: /^Terminals of/ })).toBeVisible();
});

test('an earth that is missing is wired by the w key, and the finding goes', async ({ page }) => {
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Fuller Row 2');
  await open(page, job);
  await command(page, 'place the supply');
  await extend(page, 'hall outlets');
  await saved(page);
  const home = await savedHome(page, job);
  const socket = home.parts.find((part) => part.kind === 'socket')!;

  await page.keyboard.press('/');
  await page.keyboard.type(socket.ref!);
  await page.keyboard.press('Enter');
  await page.keyboard.press('g');
  await expect(page).toHaveURL(/\/connections/);
  await ready(page);
  await page.getByRole('button', { name: `${socket.ref}.E` }).click();
  await sheet(page).focus();
  await page.keyboard.press('Delete');
  await expect(heading(page, new RegExp(socket.ref!)).first()).toBeVisible({ timeout: 20_000 });

  await page.keyboard.press('/');
  await page.keyboard.type(socket.ref!);
  await page.keyboard.press('Enter');
  await page.keyboard.press('Tab');
  await page.keyboard.press('Tab');
  await expect(page.getByText(/terminal E, free/).first()).toBeAttached();
  await extend(page, 'wire');
  await saved(page);
  const mended = await savedHome(page, job);
  expect(mended.wires.some((wire) => wire.role === 'earth' && wire.to[0] === socket.id)).toBe(true);
  await noDanger(page);
});

test('what is drawn while the server is gone is kept on the device, and sent when it is back', async ({
  page,
  context,
}) => {
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Kiln Row 3');
  await open(page, job);
  await command(page, 'place the supply');
  await saved(page);

  await context.route('**/api/drawings/**', (route) => route.abort());
  await extend(page, 'study lamps');
  await extend(page, 'kitchen outlets');
  await expect(page.getByText('Not saved: kept on this device, 2 changes')).toBeVisible({ timeout: 20_000 });
  await page.close();
  expect(count(await savedHome(await context.newPage(), job), 'lamp')).toBe(0);

  await context.unroute('**/api/drawings/**');
  const again = await context.newPage();
  await open(again, job);
  await saved(again);
  const home = await savedHome(again, job);
  expect([count(home, 'lamp'), count(home, 'socket')]).toEqual([1, 1]);
});

test('an answer that is lost on its way back does not draw twice', async ({ page, context }) => {
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Kiln Row 5');
  await open(page, job);
  await command(page, 'place the supply');
  await saved(page);
  let lost = 0;
  await context.route('**/api/drawings/*/changes', async (route) => {
    if (route.request().method() !== 'POST' || lost > 0) return route.continue();
    lost++;
    await route.fetch();
    await route.abort();
  });
  await extend(page, 'study lamps');
  await saved(page);
  expect(lost).toBe(1);
  expect(count(await savedHome(page, job), 'lamp')).toBe(1);
});

test('two windows draw on one sheet: other parts merge, the same part asks', async ({ page, browser, baseURL }) => {
  test.setTimeout(120_000);
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Salt Quay 3');
  await open(page, job);
  await command(page, 'place the supply');
  await extend(page, 'study lamps');
  await saved(page);

  const context: BrowserContext = await browser.newContext({ baseURL, viewport: { width: 1440, height: 900 } });
  const other = await context.newPage();
  await signInAs(other, 'electrician');
  await open(other, job);

  const edit = async (who: Page, find: string, text: string) => {
    await sheet(who).focus();
    await who.keyboard.press('/');
    await who.keyboard.type(find);
    await who.keyboard.press('Enter');
    await who.keyboard.press('Enter');
    await who.keyboard.type(text);
    await who.keyboard.press('Enter');
  };
  await edit(other, 'Study lamps', 'B16');
  await saved(other);
  await edit(page, 'E1', '12 W');
  await saved(page);
  let home = await savedHome(page, job);
  expect(home.parts.find((part) => part.label === 'Study lamps')?.rating).toBe(16);
  expect(home.parts.find((part) => part.kind === 'lamp')).toMatchObject({ watts: 12 });

  await page.context().route('**/api/drawings/*/changes?since=*', (route) => route.abort());
  // The other window has seen the 12 W before it writes over them; this one does not hear of it.
  await open(other, job);
  await edit(other, 'E1', '20 W');
  await expect
    .poll(async () => (await savedHome(other, job)).parts.find((part) => part.kind === 'lamp'))
    .toMatchObject({ watts: 20 });
  await edit(page, 'E1', '7 W');
  await expect(page.getByRole('heading', { name: /changed the same/i })).toBeVisible({ timeout: 20_000 });
  await page.getByRole('button', { name: 'All mine' }).click();
  await saved(page);
  home = await savedHome(page, job);
  expect(home.parts.find((part) => part.kind === 'lamp')).toMatchObject({ watts: 7 });
  await context.close();
});

test('the drawing goes out as PDF, SVG, PNG and JSON, and comes back in; a bad file changes nothing', async ({
  page,
}, info) => {
  test.setTimeout(120_000);
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Tern Lane 8');
  await open(page, job);
  await command(page, 'place the supply');
  await extend(page, 'study lamps');
  await saved(page);
  await page.keyboard.press('x');
  const dialog = page.getByRole('dialog', { name: 'Print, export, import, record' });

  const pdf = await page.request.get((await dialog.getByRole('link', { name: 'PDF A3' }).getAttribute('href'))!);
  expect([pdf.status(), (await pdf.body()).subarray(0, 5).toString()]).toEqual([200, '%PDF-']);
  const [svg] = await Promise.all([page.waitForEvent('download'), dialog.getByRole('button', { name: 'SVG' }).click()]);
  expect(await readFile(await svg.path(), 'utf8')).toContain('JetBrains Mono');
  await dialog.getByLabel('dots per inch').selectOption('150');
  const [png] = await Promise.all([page.waitForEvent('download'), dialog.getByRole('button', { name: 'PNG' }).click()]);
  const picture = await readFile(await png.path());
  expect(picture.subarray(1, 4).toString()).toBe('PNG');
  expect(picture.length).toBeGreaterThan(20_000);
  const [json] = await Promise.all([
    page.waitForEvent('download'),
    dialog.getByRole('button', { name: 'JSON', exact: true }).click(),
  ]);
  const text = await readFile(await json.path(), 'utf8');

  const bad = info.outputPath('bad.json');
  await writeFile(bad, JSON.stringify({ ...JSON.parse(text), parts: [{ id: 'Q1', kind: 'mcb', rating: 'ten' }] }));
  await dialog.getByLabel('Read a JSON file').setInputFiles(bad);
  await expect(dialog.getByRole('alert')).toContainText('parts.0.rating');
  expect(count(await savedHome(page, job), 'lamp')).toBe(1);

  const good = info.outputPath('good.json');
  const home = JSON.parse(text) as Home;
  await writeFile(good, JSON.stringify({ ...home, title: 'Tern Lane 8, changed' }));
  await dialog.getByLabel('Read a JSON file').setInputFiles(good);
  await expect(dialog).toHaveCount(0);
  await saved(page);
  expect(await savedHome(page, job)).toMatchObject({ title: 'Tern Lane 8, changed' });
});

test('a part is dragged with the mouse, moved by keys, and both are one step each', async ({ page }) => {
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Tern Lane 9');
  await open(page, job);
  await command(page, 'place the supply');
  await extend(page, 'study lamps');
  await saved(page);
  const mcb = (await savedHome(page, job)).parts.find((part) => part.kind === 'mcb')!;
  const node = page.locator(`.react-flow__node[data-id="${mcb.id}"]`);
  const box = (await node.boundingBox())!;
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
  await page.mouse.down();
  await page.mouse.move(box.x + box.width / 2 + 2, box.y + box.height / 2 + 1);
  await page.mouse.move(box.x + box.width / 2 + 60, box.y + box.height / 2 + 10, { steps: 6 });
  await page.mouse.up();
  await expect(page.getByRole('status').filter({ hasText: /^Move Q/ })).toBeVisible();
  const moved = (await node.boundingBox())!;
  expect(moved.x).toBeGreaterThan(box.x + 30);

  await sheet(page).focus();
  await page.keyboard.press('m');
  for (let n = 0; n < 3; n++) await page.keyboard.press('ArrowLeft');
  await page.keyboard.press('Enter');
  await saved(page);
  await page.keyboard.press('Control+z');
  await page.keyboard.press('Control+z');
  await saved(page);
  await expect.poll(async () => Math.round((await node.boundingBox())!.x)).toBe(Math.round(box.x));
});

for (const scheme of ['light', 'dark'] as const)
  for (const width of [1440, 1024, 390])
    test(`axe finds nothing on the sheets, ${scheme}, ${width} px`, async ({ browser, baseURL }) => {
      test.setTimeout(120_000);
      const context = await browser.newContext({
        baseURL,
        colorScheme: scheme,
        viewport: { width, height: 900 },
        reducedMotion: 'reduce',
      });
      const page = await context.newPage();
      await signInAs(page, 'electrician');
      const job = await beginJob(page, `Axe ${scheme} ${width}`);
      await open(page, job);
      const faults = await faultsOf(page, 'empty');
      if (width === 390) await page.getByRole('button', { name: 'Edit' }).click();
      await page.getByRole('button', { name: 'Place the supply' }).click();
      await saved(page);
      await sheet(page).focus();
      await page.keyboard.press('e');
      const slip = page.getByRole('listbox').or(page.getByRole('group', { name: 'What comes next' }));
      await expect(slip).toBeVisible();
      faults.push(...(await faultsOf(page, 'slip')));
      await page.keyboard.press('Escape');
      for (const [keys, name] of [
        ['Control+k', 'commands'],
        ['h', 'history'],
        ['x', 'export'],
      ] as const) {
        await sheet(page).focus();
        await page.keyboard.press(keys);
        faults.push(...(await faultsOf(page, name)));
        await page.keyboard.press('Escape');
      }
      await open(page, job, 'connections');
      faults.push(...(await faultsOf(page, 'connections')));
      await context.close();
      expect(faults).toEqual([]);
    });
