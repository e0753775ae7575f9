import { expect, test, type Page } from 'playwright/test';
import { beginJob, command, drawingOf, extend, openFace, saved, savedHome } from './a-job';
import { faultsOf } from './axe';
import { signInAs } from './sign-in';

/** A picture as a camera or scanner would give it, drawn by the browser itself. */
async function draw(page: Page, type: string, width: number, height: number): Promise<Buffer> {
  const data = await page.evaluate(
    async ([mime, w, h]) => {
      const canvas = new OffscreenCanvas(w, h);
      const pen = canvas.getContext('2d')!;
      pen.fillStyle = '#fbfaf5';
      pen.fillRect(0, 0, w, h);
      pen.lineWidth = 10;
      pen.strokeRect(60, 60, w - 120, h - 120);
      pen.strokeRect(60, 60, w / 2, h / 2);
      const blob = await canvas.convertToBlob({ type: mime });
      return [...new Uint8Array(await blob.arrayBuffer())];
    },
    [type, width, height] as const,
  );
  return Buffer.from(data);
}

const choose = (page: Page) => page.getByLabel('Choose photographs');
const prints = (page: Page) => page.locator('[data-picture]');
const parts = (page: Page) => page.getByRole('application').locator('[data-part]');

async function openPhotographs(page: Page, job: string) {
  await page.goto(`/jobs/${job}/photographs`);
  await expect(page.getByRole('heading', { name: 'Photographs', exact: true, level: 1 })).toBeVisible();
  await page.waitForLoadState('networkidle');
}

test('photographs are added, refused in words, captioned, opened large, removed and brought back', async ({ page }) => {
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Weir Mill');
  await openPhotographs(page, job);
  await expect(page.getByText('No photograph yet.')).toBeVisible();
  await page.getByLabel('They show').selectOption({ label: 'Meter' });
  await choose(page).setInputFiles([
    { name: 'meter.jpg', mimeType: 'image/jpeg', buffer: await draw(page, 'image/jpeg', 1600, 1200) },
    { name: 'IMG_4711.HEIC', mimeType: '', buffer: Buffer.from('\0\0\0\x18ftypheic\0\0\0\0mif1heic', 'latin1') },
    { name: 'board.png', mimeType: 'image/png', buffer: await draw(page, 'image/png', 900, 1200) },
  ]);
  await expect(prints(page)).toHaveCount(2, { timeout: 60_000 });
  const refused = page.getByRole('alert').filter({ hasText: 'HEIC' });
  await expect(refused).toContainText('Send it as JPEG');
  await page.getByRole('button', { name: 'Leave it out' }).click();
  await expect(refused).toHaveCount(0);

  await prints(page).nth(1).click();
  const dialog = page.getByRole('dialog');
  const shown = dialog.getByRole('img');
  await expect.poll(() => shown.evaluate((img: HTMLImageElement) => img.naturalWidth)).toBe(900);
  await dialog.getByLabel('Caption').fill('The board with its cover off');
  await dialog.getByLabel('Caption').press('Tab');
  await dialog.getByLabel('It shows').selectOption({ label: 'Board' });
  await expect(dialog.getByRole('heading', { name: 'The board with its cover off' })).toBeVisible();
  await dialog.getByRole('button', { name: 'Next' }).press('ArrowRight');
  await expect(dialog.getByText('1 of 2')).toBeVisible();
  await page.keyboard.press('Escape');
  await expect(dialog).toHaveCount(0);

  await prints(page).first().click();
  await dialog.getByRole('button', { name: 'Remove' }).click();
  await expect(prints(page)).toHaveCount(1);
  await page.getByRole('button', { name: 'Bring it back' }).click();
  await expect(prints(page)).toHaveCount(2);
  await page.reload();
  await expect(prints(page)).toHaveCount(2);
  await expect(page.getByText('The board with its cover off').first()).toBeVisible();

  // opened by its own address, a picture is a picture and can do nothing
  const address = (await prints(page).first().locator('img').getAttribute('src'))!;
  const answer = await page.request.get(address);
  expect(answer.headers()).toMatchObject({ 'content-type': 'image/webp', 'x-content-type-options': 'nosniff' });
  expect(answer.headers()['content-security-policy']).toContain('sandbox');
});

test('a picture becomes the plan of a storey: parts are placed on it by mouse and by keys, and keep their other places', async ({
  page,
}) => {
  test.setTimeout(180_000);
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Fuller Row 2');
  await openFace(page, job);
  await command(page, 'place the supply');
  await extend(page, 'study lamps');
  await saved(page);
  const before = await savedHome(page, job);

  await openPhotographs(page, job);
  await page.getByLabel('They show').selectOption({ label: 'Floor plan' });
  await choose(page).setInputFiles({ name: 'plan.png', mimeType: 'image/png', buffer: await draw(page, 'image/png', 1600, 1200) });
  await prints(page).first().click();
  await page.getByRole('button', { name: 'Draw on it as a floor plan' }).click();
  await expect(page).toHaveURL(/\/plan/, { timeout: 60_000 });
  const plan = page.getByRole('application', { name: 'Plan of the Ground floor' });
  await expect(plan).toBeVisible();

  // by mouse: the next of the room follows by itself
  const tray = page.getByRole('region', { name: 'Not placed yet' });
  await tray.getByRole('button', { name: 'E1', exact: true }).click();
  const box = (await plan.boundingBox())!;
  await page.mouse.click(box.x + box.width * 0.4, box.y + box.height * 0.4);
  await expect(parts(page).filter({ hasText: 'E1' })).toBeVisible();
  await page.keyboard.press('Escape');
  await saved(page);
  let home = await savedHome(page, job);
  const lamp = home.parts.find(({ ref }) => ref === 'E1')!;
  const put = home.sheet!.plan![lamp.id]!;
  expect([put.x % 250, put.y % 250, put.on]).toEqual([0, 0, home.plans![0]!.id]);

  // by keys alone: a switch is carried, put down, nudged; a row of presses is one step
  await tray.getByRole('button', { name: 'S1', exact: true }).focus();
  await page.keyboard.press('Enter');
  await expect(plan).toBeFocused();
  await page.keyboard.press('ArrowRight');
  await page.keyboard.press('Enter');
  await expect(parts(page).filter({ hasText: 'S1' })).toBeVisible();
  const at = async (ref: string) => {
    home = await savedHome(page, job);
    return home.sheet?.plan?.[home.parts.find((part) => part.ref === ref)!.id];
  };
  await expect.poll(() => at('S1'), { timeout: 60_000 }).toBeDefined();
  const stood = (await at('S1'))!;
  for (let n = 0; n < 3; n++) await page.keyboard.press('ArrowLeft');
  await expect.poll(async () => (await at('S1'))!.x, { timeout: 60_000 }).toBe(stood.x - 750);
  await page.keyboard.press('Control+z');
  await expect.poll(async () => (await at('S1'))!.x, { timeout: 60_000 }).toBe(stood.x);

  // dragged, and both other arrangements stay as they were
  const node = parts(page).filter({ hasText: 'E1' });
  const from = (await node.boundingBox())!;
  await page.mouse.move(from.x + 8, from.y + 8);
  await page.mouse.down();
  await page.mouse.move(from.x + 90, from.y + 60, { steps: 6 });
  await page.mouse.up();
  await expect.poll(async () => (await at('E1'))!.x, { timeout: 60_000 }).toBeGreaterThan(put.x);
  const { plan: _plan, ...faces } = home.sheet as Record<string, unknown>;
  expect(faces).toEqual((before as { sheet: unknown }).sheet);

  // the picture cannot be removed from behind the plan, and the plan goes and comes back in one step each
  const pictures = await page.request.get(`/api/jobs/${job}/uploads`);
  const { uploads } = (await pictures.json()) as { uploads: { id: string }[] };
  const origin = new URL(page.url()).origin;
  const removal = { headers: { origin }, data: { removed: true } };
  expect((await page.request.patch(`/api/uploads/${uploads[0]!.id}`, removal)).status()).toBe(409);
  await page.getByRole('button', { name: 'take away' }).click();
  await expect(page.getByRole('heading', { name: 'No plan yet' })).toBeVisible();
  await page.getByRole('link', { name: /Overview/ }).first().click();
  await expect(page).toHaveURL(/\/overview/);
  await page.goBack();
  await expect(page.getByRole('heading', { name: 'No plan yet' })).toBeVisible();
  await expect.poll(async () => (await savedHome(page, job)).plans, { timeout: 60_000 }).toBeUndefined();
  expect((await page.request.get(`/api/drawings/${await drawingOf(page, job)}/pdf`)).status()).toBe(200);
});

for (const scheme of ['light', 'dark'] as const)
  test(`axe finds nothing on the plan and the photographs, ${scheme}`, async ({ browser, baseURL }) => {
    test.setTimeout(180_000);
    const context = await browser.newContext({ baseURL, colorScheme: scheme, viewport: { width: 1440, height: 900 } });
    const page = await context.newPage();
    await signInAs(page, 'electrician');
    const job = await beginJob(page, `Axe plan ${scheme}`);
    await openFace(page, job);
    await command(page, 'place the supply');
    await saved(page);
    await openPhotographs(page, job);
    const faults = await faultsOf(page, 'no photograph');
    await choose(page).setInputFiles({ name: 'a.png', mimeType: 'image/png', buffer: await draw(page, 'image/png', 800, 600) });
    await expect(prints(page)).toHaveCount(1, { timeout: 60_000 });
    faults.push(...(await faultsOf(page, 'photographs')));
    await prints(page).first().click();
    faults.push(...(await faultsOf(page, 'large')));
    await page.getByRole('button', { name: 'Draw on it as a floor plan' }).click();
    await expect(page.getByRole('application')).toBeVisible({ timeout: 60_000 });
    await page.getByRole('region', { name: 'Not placed yet' }).getByRole('button').first().click();
    await page.keyboard.press('Enter');
    await page.keyboard.press('Escape');
    faults.push(...(await faultsOf(page, 'plan')));
    await page.setViewportSize({ width: 390, height: 844 });
    faults.push(...(await faultsOf(page, 'plan, narrow')));
    await context.close();
    expect(faults).toEqual([]);
  });
