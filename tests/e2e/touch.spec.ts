import { devices, expect, test, type CDPSession, type Locator, type Page } from 'playwright/test';
import { beginJob, saved, savedHome as homeNow, type Home } from './a-job';
import { signInAs } from './sign-in';

/**
 * A tablet, emulated, and nothing but fingers: no mouse, no key but those of the keyboard that comes up in a field.
 */
test.use({
  ...{ viewport: { width: 820, height: 1180 }, hasTouch: true, isMobile: true },
  userAgent: devices['Galaxy Tab S4'].userAgent,
});

async function open(page: Page, job: string, path = 'overview') {
  await page.goto(`/jobs/${job}/${path}`);
  await expect(page.locator('[role=application][aria-busy=false]').first()).toBeVisible({ timeout: 30_000 });
}

async function savedHome(page: Page, job: string): Promise<Home> {
  await saved(page);
  return homeNow(page, job);
}

const slip = (page: Page) => page.getByRole('dialog', { name: /^What comes next after/ });

/** From the terminal in hand: what comes next, found by a room's name. */
async function extend(page: Page, typed: string) {
  // The foot may still grow under the finger while the sheet is saved.
  await expect(async () => {
    await page.getByRole('button', { name: 'What comes next' }).tap({ timeout: 2000 });
    await expect(slip(page)).toBeVisible({ timeout: 2000 });
  }).toPass({ timeout: 30_000 });
  await slip(page)
    .getByRole('button', { name: /^\d+ more$|^Type a room$/ })
    .tap();
  await slip(page).getByRole('textbox').fill(typed);
  await expect(slip(page).getByRole('button', { pressed: true })).toBeVisible();
  await slip(page).getByRole('button', { name: 'Place', exact: true }).tap();
  await expect(slip(page)).toHaveCount(0);
}

const touch = (finger: CDPSession, type: 'touchStart' | 'touchMove' | 'touchEnd', ...at: [number, number][]) =>
  finger.send('Input.dispatchTouchEvent', { type, touchPoints: at.map(([x, y], id) => ({ x, y, id })) });

const middleOf = async (of: Locator): Promise<[number, number]> => {
  const box = (await of.boundingBox())!;
  return [box.x + box.width / 2, box.y + box.height / 2];
};

const looksAt = (page: Page): Promise<string> =>
  page.locator('.react-flow__viewport').evaluate((element) => (element as HTMLElement).style.transform);
const zoomOf = async (page: Page): Promise<number> => Number(/scale\(([\d.]+)\)/.exec(await looksAt(page))![1]);

test('a room is drawn with fingers alone; two terminals are joined by a tap on each', async ({ page }) => {
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Osier Bank 4');
  await open(page, job);
  await page.getByRole('button', { name: 'Place the supply' }).tap();
  await extend(page, 'study lamps');
  await extend(page, 'study outlets');
  let home = await savedHome(page, job);
  const count = (kind: string) => home.parts.filter((part) => part.kind === kind).length;
  expect([count('lamp'), count('socket')]).toEqual([1, 1]);

  // An earth is taken away by its row in the list of terminals, and drawn again by two taps.
  const socket = home.parts.find((part) => part.kind === 'socket')!;
  const earth = home.wires.find((wire) => wire.role === 'earth' && [wire.from[0], wire.to[0]].includes(socket.id))!;
  await open(page, job, `connections?place=${socket.place}`);
  await page.getByRole('button', { name: /findings?$/ }).tap();
  await page.getByRole('button', { name: `${socket.ref}.E` }).tap();
  await page.getByRole('button', { name: 'Back to the sheet' }).tap();
  await page.getByRole('button', { name: 'commands' }).tap();
  await page.getByRole('option', { name: /^Delete what is in hand/ }).tap();
  home = await savedHome(page, job);
  expect(home.wires.some(({ id }) => id === earth.id)).toBe(false);

  const terminal = (id: string, mark: string) => page.locator(`[data-end="${id} ${mark}"]`);
  const lamp = home.parts.find((part) => part.kind === 'lamp')!;
  await page.touchscreen.tap(...(await middleOf(terminal(socket.id, 'E'))));
  await expect(slip(page)).toBeVisible();
  await page.touchscreen.tap(...(await middleOf(terminal(lamp.id, 'E'))));
  await expect(slip(page)).toHaveCount(0);
  home = await savedHome(page, job);
  expect(home.wires.some((wire) => wire.role === 'earth' && [wire.from[0], wire.to[0]].includes(socket.id))).toBe(true);
});

test('a finger moves a part only when it was held; else it pans, and two fingers zoom', async ({ page }) => {
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Osier Bank 5');
  await open(page, job);
  await page.getByRole('button', { name: 'Place the supply' }).tap();
  const placeOf = ({ sheet }: Home) => sheet?.overview?.[id];
  const home = await savedHome(page, job);
  const { id } = home.parts.find((part) => part.kind === 'isolator')!;
  const before = placeOf(home);
  const finger = await page.context().newCDPSession(page);
  const node = page.locator(`.react-flow__node[data-id="${id}"]`);

  // at once: the drawing pans, the part stays
  let view = await looksAt(page);
  let [x, y] = await middleOf(node);
  const swipe = [touch(finger, 'touchStart', [x, y])];
  for (let i = 1; i <= 6; i++) swipe.push(touch(finger, 'touchMove', [x, y - 15 * i]));
  await Promise.all(swipe);
  await touch(finger, 'touchEnd');
  await expect.poll(() => looksAt(page)).not.toBe(view);
  expect(placeOf(await savedHome(page, job))).toEqual(before);

  // held: the part goes along, the drawing stays
  view = await looksAt(page);
  [x, y] = await middleOf(node);
  await touch(finger, 'touchStart', [x, y]);
  await page.waitForTimeout(550);
  for (let i = 1; i <= 6; i++) await touch(finger, 'touchMove', [x + 12 * i, y + 2 * i]);
  await touch(finger, 'touchEnd');
  await expect(page.getByRole('status').filter({ hasText: /^Move Q/ })).toBeVisible();
  expect(await looksAt(page)).toBe(view);
  await expect.poll(async () => placeOf(await savedHome(page, job))).not.toEqual(before);

  // two fingers zoom, also when one of them stands on a part
  const zoom = await zoomOf(page);
  [x, y] = await middleOf(node);
  await touch(finger, 'touchStart', [x, y], [x - 60, y - 60]);
  for (let i = 1; i <= 6; i++) await touch(finger, 'touchMove', [x + 10 * i, y + 10 * i], [x - 60 - 10 * i, y - 60 - 10 * i]);
  await touch(finger, 'touchEnd');
  await expect.poll(() => zoomOf(page)).toBeGreaterThan(zoom * 1.2);
});

test('two terminals that a finger cannot tell apart are both offered; targets are tall', async ({ page }) => {
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Osier Bank 6');
  await open(page, job);
  await page.getByRole('button', { name: 'Place the supply' }).tap();
  await extend(page, 'study lamps');
  const home = await savedHome(page, job);
  const lamp = home.parts.find((part) => part.kind === 'lamp')!;
  await open(page, job, `connections?place=${lamp.place}`);
  const finger = await page.context().newCDPSession(page);
  const end = (mark: string) => page.locator(`[data-end="${lamp.id} ${mark}"]`);
  const apart = async () => {
    const [[ax, ay], [bx, by]] = [await middleOf(end('L')), await middleOf(end('N'))];
    return { distance: Math.hypot(ax - bx, ay - by), middle: [(ax + bx) / 2, (ay + by) / 2] as [number, number] };
  };
  for (let n = 0; n < 8 && (await apart()).distance >= 22; n++) {
    const { middle } = await apart();
    await touch(finger, 'touchStart', [middle[0] - 120, middle[1]], [middle[0] + 120, middle[1]]);
    for (let i = 1; i <= 4; i++) await touch(finger, 'touchMove', [middle[0] - 120 + 12 * i, middle[1]], [middle[0] + 120 - 12 * i, middle[1]]);
    await touch(finger, 'touchEnd');
    await page.waitForTimeout(200);
  }
  const { distance, middle } = await apart();
  expect(distance).toBeLessThan(24);
  await page.touchscreen.tap(...middle);
  const which = page.getByRole('dialog', { name: 'Which terminal' });
  await expect(which.getByRole('button')).toHaveCount(3);
  for (const button of await which.getByRole('button').all()) expect((await button.boundingBox())!.height).toBeGreaterThanOrEqual(44);
  await which.getByRole('button', { name: new RegExp(`${lamp.ref}:N`) }).tap();
  await expect(page.getByText(/terminal N/).first()).toBeAttached();
  await expect(slip(page)).toBeVisible();
  for (const button of await slip(page).getByRole('button').all())
    expect((await button.boundingBox())!.height).toBeGreaterThanOrEqual(44);
});
