import { expect, test, type Browser, type BrowserContext, type Page } from 'playwright/test';
import { addRoom, beginJob, command, extend, openFace, openSurvey, rate, rooms, saved, savedChanges, savedHome } from './a-job';
import { ownServer, type OwnServer } from './own-server';
import { signInAs, type DemoRole } from './sign-in';

const SIZE = { width: 1440, height: 900 };
const kept = (page: Page, count: number) =>
  expect(page.getByText(`Not saved: kept on this device, ${count} change${count === 1 ? '' : 's'}`)).toBeVisible({
    timeout: 60_000,
  });

async function somebody(browser: Browser, baseURL: string, role: DemoRole): Promise<[BrowserContext, Page]> {
  const context = await browser.newContext({ baseURL, viewport: SIZE });
  const page = await context.newPage();
  await signInAs(page, role);
  return [context, page];
}

test.describe('a server that dies', () => {
  let server: OwnServer;
  test.beforeAll(async () => {
    test.setTimeout(240_000);
    server = await ownServer();
  });
  test.afterAll(() => server?.close());

  test('takes nothing with it: not what waits, not what is under way, not what a closed tab had drawn', async ({
    browser,
  }) => {
    test.setTimeout(240_000);
    const [context, page] = await somebody(browser, server.url, 'electrician');
    const job = await beginJob(page, 'Kiln Row 3');
    await openFace(page, job);
    await command(page, 'place the supply');
    await extend(page, 'study lamps');
    await saved(page);

    await server.kill();
    await extend(page, 'kitchen outlets');
    await extend(page, 'hall lamps');
    await kept(page, 2);
    await page.close();
    await server.start();
    const again = await context.newPage();
    await openFace(again, job);
    await saved(again);
    let home = await savedHome(again, job);
    expect(home.parts.filter(({ kind }) => kind === 'lamp')).toHaveLength(2);
    expect(home.parts.some(({ kind }) => kind === 'socket')).toBe(true);

    // killed at any moment of a save, again and again: each change is there, and there once
    await openSurvey(again, job);
    const typed: string[] = [];
    for (const delay of [0, 15, 40, 90, 200]) {
      typed.push(`Room ${typed.length + 1}`);
      await addRoom(again, typed.at(-1)!);
      await again.waitForTimeout(delay);
      await server.kill();
      typed.push(`Room ${typed.length + 1}`);
      await addRoom(again, typed.at(-1)!);
      await server.start();
      await saved(again);
    }
    home = await savedHome(again, job);
    expect(rooms(home)).toEqual([...typed].sort());
    const ids = (await savedChanges(again, job)).map(({ saveId }) => saveId);
    expect(new Set(ids).size).toBe(ids.length);
    await context.close();
  });

  test('is left within two seconds of Ctrl-C although drawings are open, and their windows find it again', async ({
    browser,
  }) => {
    const [context, page] = await somebody(browser, server.url, 'electrician');
    const job = await beginJob(page, 'Kiln Row 5');
    await openFace(page, job);
    const [second, other] = await somebody(browser, server.url, 'admin');
    await openFace(other, job);
    await expect(page.getByTitle(/has this drawing open too$/)).toBeVisible({ timeout: 60_000 });
    expect(await server.stop()).toBeLessThan(2000);
    await command(page, 'place the supply');
    await kept(page, 1);
    await server.start();
    await saved(page);
    await expect(page.getByTitle(/has this drawing open too$/)).toBeVisible({ timeout: 60_000 });
    await expect(other.locator('.react-flow__node').first()).toBeVisible({ timeout: 60_000 });
    await Promise.all([context.close(), second.close()]);
  });
});

test('a tab killed in mid-edit, again and again, loses nothing that it acknowledged', async ({ browser, baseURL }) => {
  test.setTimeout(240_000);
  const [context, first] = await somebody(browser, baseURL!, 'electrician');
  const job = await beginJob(first, 'Tern Lane 4');
  const stood: string[] = [];
  const until = Date.now() + 25_000;
  let page = first;
  for (let n = 1; n <= 60 && (Date.now() < until || n <= 8); n++) {
    const away = n % 2 === 0;
    await openSurvey(page, job);
    await expect(page.getByRole('textbox', { name: 'New room, name' })).toBeEditable();
    // Every second time the network is gone: only the device can keep it then.
    if (away) await context.route('**/changes*', (route) => route.abort());
    const name = `Room ${n}`;
    await addRoom(page, name);
    // What was on the screen for a second must stand; a shorter while leaves no promise, only the hope.
    await page.waitForTimeout(away ? 1000 : 300 * (n % 4));
    const words = await page.getByText(/^(Saved \d\d:\d\d|Saving|Not saved: kept on this device)/).first().textContent();
    if (away || !words!.startsWith('Saving')) stood.push(name);
    const killed = page.waitForEvent('crash');
    const session = await context.newCDPSession(page);
    void session.send('Page.crash').catch(() => undefined); // nobody is left to answer
    await killed;
    await page.close();
    await context.unroute('**/changes*');
    page = await context.newPage();
  }
  await openSurvey(page, job);
  await expect(page.getByText(/^Saved( \d\d:\d\d)?$/)).toBeVisible({ timeout: 60_000 });
  const there = rooms(await savedHome(page, job));
  expect(stood.length).toBeGreaterThan(4);
  expect(there).toEqual(expect.arrayContaining(stood));
  expect(new Set(there).size).toBe(there.length);
  await context.close();
});

test('two tabs of one person on one sheet lose no edit of either, also when both were away', async ({
  browser,
  baseURL,
}) => {
  test.setTimeout(180_000);
  const [context, one] = await somebody(browser, baseURL!, 'electrician');
  const job = await beginJob(one, 'Tern Lane 6');
  const two = await context.newPage();
  await openSurvey(one, job);
  await openSurvey(two, job);
  await addRoom(one, 'Study');
  await expect(two.getByRole('textbox', { name: 'Study, name', exact: true })).toBeVisible({ timeout: 60_000 });
  await context.route('**/changes*', (route) => route.abort());
  for (const [page, name] of [
    [one, 'Hall'],
    [two, 'Attic'],
    [one, 'Pantry'],
    [two, 'Porch'],
  ] as const)
    await addRoom(page, name);
  await kept(one, 2);
  await kept(two, 2);
  await two.close();
  await context.unroute('**/changes*');
  await one.getByRole('button', { name: 'Try again' }).click();
  await saved(one);
  expect(rooms(await savedHome(one, job))).toEqual(['Hall', 'Pantry', 'Study']);
  // What the closed tab had drawn belongs to nobody who lives: the next window that opens the drawing sends it.
  const later = await context.newPage();
  await openSurvey(later, job);
  await expect
    .poll(async () => rooms(await savedHome(later, job)), { timeout: 60_000 })
    .toEqual(['Attic', 'Hall', 'Pantry', 'Porch', 'Study']);
  await context.close();
});

test('two people draw while both are away: what differs is merged, what clashes is asked, nothing is overwritten', async ({
  browser,
  baseURL,
}) => {
  test.setTimeout(180_000);
  const [mine, me] = await somebody(browser, baseURL!, 'electrician');
  const job = await beginJob(me, 'Salt Quay 7');
  await openFace(me, job);
  await command(me, 'place the supply');
  await extend(me, 'study lamps');
  await saved(me);
  const [theirs, other] = await somebody(browser, baseURL!, 'electrician');
  await openFace(other, job);

  for (const context of [mine, theirs]) await context.route('**/changes*', (route) => route.abort());
  await rate(me, 'E1', '12 W');
  await rate(other, 'E1', '20 W');
  await rate(other, 'Study lamps', 'B16');
  await kept(me, 1);
  await kept(other, 2);

  await mine.unroute('**/changes*');
  await me.getByRole('button', { name: 'Try again' }).click();
  await saved(me);
  await theirs.unroute('**/changes*');
  await other.getByRole('button', { name: 'Try again' }).click();
  await expect(other.getByRole('heading', { name: /changed the same/i })).toBeVisible({ timeout: 60_000 });
  expect((await savedHome(me, job)).parts.find(({ kind }) => kind === 'lamp')?.watts).toBe(12);

  // theirs at the lamp, mine elsewhere; what gave way is kept aside
  const lamp = other.getByRole('group', { name: /^E1/ });
  await lamp.getByRole('radio').nth(1).check();
  await other.getByRole('button', { name: 'Take as chosen' }).click();
  await saved(other);
  const home = await savedHome(me, job);
  expect(home.parts.find(({ kind }) => kind === 'lamp')?.watts).toBe(12);
  expect(home.parts.find(({ label }) => label === 'Study lamps')?.rating).toBe(16);
  await other.getByRole('application').focus();
  await other.keyboard.press('h');
  await expect(other.getByText(/20 W/).first()).toBeVisible();
  await Promise.all([mine.close(), theirs.close()]);
});

test('a device that is full says so aloud and hands the drawing over as a file', async ({ browser, baseURL }) => {
  const [context, page] = await somebody(browser, baseURL!, 'electrician');
  await context.addInitScript(() => {
    IDBObjectStore.prototype.put = () => {
      throw new DOMException('The device is full.', 'QuotaExceededError');
    };
  });
  const job = await beginJob(page, 'Tern Lane 11');
  await openSurvey(page, job);
  await context.route('**/changes*', (route) => route.abort());
  await addRoom(page, 'Study');
  await expect(page.getByRole('alert').filter({ hasText: /its storage is full/ })).toBeVisible();
  await expect(page.getByText('Not saved and not kept: 1 change')).toBeVisible({ timeout: 60_000 });
  const [file] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('button', { name: 'Get the file' }).first().click(),
  ]);
  const { readFile } = await import('node:fs/promises');
  expect(rooms(JSON.parse(await readFile(await file.path(), 'utf8')))).toEqual(['Study']);
  await context.unroute('**/changes*');
  await saved(page);
  expect(rooms(await savedHome(page, job))).toEqual(['Study']);
  await context.close();
});
