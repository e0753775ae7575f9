import { expect, test, type Page } from 'playwright/test';
import { beginJob, savedHome, type Home } from './a-job';
import { faultsOf } from './axe';
import { signInAs } from './sign-in';

const tree = (page: Page) => page.getByRole('tree', { name: /^Outline of/ });
const inHand = (page: Page) => page.locator('[role=treeitem][tabindex="0"]');
const saved = (page: Page) => expect(page.getByText(/^Saved \d\d:\d\d$/)).toBeVisible({ timeout: 40_000 });

async function open(page: Page, job: string, face = 'overview') {
  await page.goto(`/jobs/${job}/${face}`);
  await expect(page.locator('[role=application][aria-busy=false]')).toBeVisible({ timeout: 30_000 });
}

/** The first stop of the keyboard leads into the outline. */
async function byTheSkipLink(page: Page) {
  await page.keyboard.press('Tab');
  await expect(page.getByRole('button', { name: /^To the outline/ })).toBeFocused();
  await page.keyboard.press('Enter');
  await expect(inHand(page)).toBeFocused();
}

/** Does a command of the line in hand by its words. */
async function command(page: Page, words: string) {
  await expect(inHand(page)).toBeFocused();
  await page.keyboard.press('Enter');
  await expect(page.getByRole('combobox', { name: /^What can be done/ })).toBeFocused();
  await page.keyboard.type(words);
  await page.keyboard.press('Enter');
}

/** Places what comes next at the line in hand. */
async function extend(page: Page, typed: string) {
  await command(page, 'extend');
  await expect(page.getByRole('combobox', { name: /^What comes next/ })).toBeFocused();
  await page.keyboard.type(typed);
  await expect(page.getByRole('option').first()).toBeVisible();
  await page.keyboard.press('Enter');
  await expect(inHand(page)).toBeFocused();
}

/** Goes down, unfolding nothing, until the line in hand says so. */
async function down(page: Page, words: RegExp) {
  for (let n = 0; n < 80; n++) {
    if (words.test((await inHand(page).textContent()) ?? '')) return;
    await page.keyboard.press('ArrowDown');
  }
  throw new Error(`no line below says ${words}; the last one says ${await inHand(page).textContent()}`);
}

test('a room is drawn, wired, examined and repaired in the outline, with no pointer', async ({ page }) => {
  test.setTimeout(180_000);
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Weir Mill 4');
  await open(page, job);
  await byTheSkipLink(page);
  await expect(inHand(page)).toHaveText(/nothing drawn yet/);

  // drawn
  await command(page, 'place the supply');
  await expect(inHand(page)).toHaveText(/line bar/);
  await extend(page, 'study lamps');
  await saved(page);
  let home = await savedHome(page, job);
  const lamp = home.parts.find((part) => part.kind === 'lamp')!;
  const room = home.places.find((place) => place.name === 'Study')!;

  // examined: no danger; then the lamp loses its earth, and that is announced
  await expect(page.getByRole('log', { name: 'Findings' })).toHaveText(/finding/i, { timeout: 20_000 });
  await page.keyboard.press('Home');
  await page.keyboard.press('*');
  await down(page, /^Board/);
  await page.keyboard.press('ArrowRight');
  await page.keyboard.type('way 1');
  await expect(inHand(page)).toHaveText(/^Way 1, .*Study lamps: Study: switch, lamp 9 W/);
  await page.keyboard.press('ArrowRight');
  await down(page, /^Study/);
  await page.keyboard.press('ArrowRight');
  await down(page, new RegExp(`^${lamp.ref},? lamp`));
  await page.keyboard.press('ArrowRight');
  await down(page, /^Terminal E/);
  await page.keyboard.press('ArrowRight');
  await page.keyboard.press('ArrowDown');
  await expect(inHand(page)).toHaveText(/^Wire to .*: earth, green and yellow/);
  await page.keyboard.press('Delete');
  await expect(page.getByRole('log', { name: 'Findings' })).toHaveText(/New danger: .*earth/, { timeout: 20_000 });
  await expect(inHand(page)).toHaveText(/^Terminal E, earth: free/);

  // wired: from the free terminal to the earths of the same room, by name
  await command(page, 'draw wire');
  await expect(page.getByRole('combobox', { name: /to which terminal/ })).toBeFocused();
  await page.keyboard.type('joint study');
  await page.keyboard.press('Enter');
  await expect(page.getByRole('log', { name: 'Findings' })).toHaveText(/1 gone/, { timeout: 20_000 });
  await saved(page);
  home = await savedHome(page, job);
  expect(home.wires.some((wire) => wire.role === 'earth' && wire.to[0] === lamp.id)).toBe(true);

  // repaired: the finding stands in the tree below its part, and offers its remedy there
  await page.keyboard.press('Control+z');
  await expect(page.getByRole('log', { name: 'Findings' })).toHaveText(/New danger/, { timeout: 20_000 });
  await page.keyboard.type(lamp.ref!);
  await expect(inHand(page)).toHaveText(new RegExp(`^${lamp.ref},? lamp`));
  await expect(inHand(page)).toHaveAttribute('aria-expanded', 'true');
  await page.keyboard.press('ArrowDown');
  await expect(inHand(page)).toHaveText(/^danger: /);
  await page.keyboard.press('Enter');
  const remedy = page.getByRole('option', { name: /^Put it right/ }).first();
  await expect(remedy).toBeVisible({ timeout: 20_000 });
  await page.keyboard.type('put it right');
  await page.keyboard.press('Enter');
  await expect(page.getByRole('log', { name: 'Findings' })).toHaveText(/1 gone/, { timeout: 20_000 });
  await saved(page);
  home = await savedHome(page, job);
  const earths = home.wires.filter(({ from, to, role }) => role === 'earth' && [from[0], to[0]].includes(lamp.id));
  expect(earths).toHaveLength(1);
  expect(home.parts.filter((part) => part.place === room.id).length).toBeGreaterThan(2);
});

test('from the outline a rating is written, a load moved, a room copied; one thing is in hand on both', async ({ page }) => {
  test.setTimeout(240_000);
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Weir Mill 5');
  await open(page, job);
  await page.getByRole('application').focus();
  await page.keyboard.press('o');
  await command(page, 'place the supply');
  await extend(page, 'study lamps');
  await extend(page, 'kitchen lamps');
  await saved(page);

  // written
  await page.keyboard.type('way 2');
  await expect(inHand(page)).toHaveText(/^Way 2/);
  await page.keyboard.press('F2');
  await expect(page.getByRole('dialog', { name: /^Edit Q/ })).toBeVisible();
  await page.keyboard.type('B10');
  await page.keyboard.press('Enter');
  await expect(inHand(page)).toBeFocused();
  await expect(inHand(page)).toHaveText(/^Way 2, Q\d+, 10 A type B/);

  // one selection: what the outline has in hand the canvas has, and the other way round
  await page.keyboard.press('Escape');
  await expect(tree(page)).toHaveCount(0);
  await expect(page.getByRole('application')).toBeFocused();
  await page.keyboard.press('ArrowUp');
  await page.keyboard.press('o');
  await expect(inHand(page)).toHaveText(/line bar/);
  await expect(inHand(page)).toHaveAttribute('aria-selected', 'true');

  // moved
  await page.keyboard.type('way 2');
  await page.keyboard.press('ArrowRight');
  await down(page, /^Kitchen/);
  await page.keyboard.press('ArrowRight');
  await down(page, /^E\d+, lamp/);
  await command(page, 'move load');
  await expect(page.getByRole('combobox', { name: /which way/ })).toBeFocused();
  await page.keyboard.type('way 1');
  await page.keyboard.press('Enter');
  await expect(page.getByRole('status').filter({ hasText: /^Move Kitchen lamp to Q\d+$/ })).toBeVisible();
  await expect(inHand(page)).toBeFocused();

  // copied, and taken back as one step; way 1 lies open, for the moved lamp is in hand in it
  await page.keyboard.type('way 1');
  await expect(inHand(page)).toHaveText(/^Way 1/);
  await down(page, /^Study/);
  await command(page, 'copy room');
  await expect(page.getByRole('dialog', { name: 'Copy Study whole' })).toBeVisible();
  await page.keyboard.type('Reading room');
  await page.keyboard.press('Enter');
  await expect(page.getByRole('status').filter({ hasText: 'Copy Study to Reading room' })).toBeVisible();
  await saved(page);
  expect((await savedHome(page, job)).places.map((place) => place.name)).toContain('Reading room');
  await expect(inHand(page)).toBeFocused();
  await page.keyboard.press('Control+z');
  await saved(page);
  expect((await savedHome(page, job)).places.map((place) => place.name)).not.toContain('Reading room');
});

for (const scheme of ['light', 'dark'] as const)
  for (const width of [1440, 1024, 390])
    test(`axe finds nothing on the outline, ${scheme}, ${width} px`, async ({ browser, baseURL }) => {
      test.setTimeout(180_000);
      const context = await browser.newContext({
        baseURL,
        colorScheme: scheme,
        hasTouch: width < 1440,
        viewport: { width, height: 900 },
        reducedMotion: 'reduce',
      });
      const page = await context.newPage();
      await signInAs(page, 'electrician');
      const job = await beginJob(page, `Outline ${scheme} ${width}`);
      await open(page, job);
      if (width === 390) await page.getByRole('button', { name: 'Edit' }).click();
      await page.getByRole('button', { name: 'Place the supply' }).click();
      await saved(page);
      // by finger or mouse: the foot's own word opens it, a tap takes a line, the button says what can be done
      await page.getByRole('button', { name: width < 1100 ? 'outline' : 'outline o', exact: true }).click();
      // What is in hand on the sheet is in sight in the outline: its board is unfolded.
      const board = page.getByRole('treeitem', { name: /^Board/ });
      await expect(board).toHaveAttribute('aria-expanded', 'true');
      await board.locator('[data-fold]').click();
      await expect(board).toHaveAttribute('aria-expanded', 'false');
      const faults = await faultsOf(page, 'folded');
      await board.locator('[data-fold]').click();
      await page.getByRole('treeitem', { name: /^Q0/ }).click();
      await expect(page.getByRole('treeitem', { name: /^Q0/ })).toHaveAttribute('aria-selected', 'true');
      faults.push(...(await faultsOf(page, 'unfolded')));
      await page.getByRole('button', { name: 'What can be done' }).click();
      faults.push(...(await faultsOf(page, 'commands of a line')));
      await page.getByRole('option', { name: /^Edit the rating/ }).click();
      await expect(page.getByRole('dialog', { name: 'Edit Q0' })).toBeVisible();
      faults.push(...(await faultsOf(page, 'edited from the outline')));
      await context.close();
      expect(faults).toEqual([]);
    });

test('a piece is copied in one window and pasted in another, through the clipboard of the system', async ({ context, page }) => {
  test.setTimeout(240_000);
  await context.grantPermissions(['clipboard-read', 'clipboard-write']);
  await signInAs(page, 'electrician');
  const [one, two] = [await beginJob(page, 'Weir Mill 6'), await beginJob(page, 'Weir Mill 7')];
  await open(page, one);
  await page.getByRole('application').focus();
  await page.keyboard.press('o');
  await command(page, 'place the supply');
  await extend(page, 'study lamps');
  await saved(page);
  await page.keyboard.press('Escape');
  await expect(page.getByRole('application')).toBeFocused();
  await page.keyboard.press('Control+a');
  await page.keyboard.press('Control+c');
  await expect(page.getByRole('status').filter({ hasText: /^Copied \d+ parts\.$/ })).toBeVisible();
  expect(await page.evaluate(async () => (await navigator.clipboard.read())[0]!.types)).toContain('image/svg+xml');

  const other = await context.newPage();
  await open(other, two);
  await other.getByRole('application').focus();
  await other.keyboard.press('Control+v');
  await expect(other.getByRole('status').filter({ hasText: /^Paste .* more$/ })).toBeVisible({ timeout: 20_000 });
  await saved(other);
  const [from, to] = [await savedHome(page, one), await savedHome(other, two)];
  const lamps = (home: Home) => home.parts.filter((part) => part.kind === 'lamp').length;
  expect(lamps(to)).toBe(lamps(from));
  const ids = new Set(to.parts.map((part) => part.id));
  expect(to.wires.length).toBeGreaterThan(5);
  for (const wire of to.wires) expect(ids.has(wire.from[0]) && ids.has(wire.to[0])).toBe(true);
  expect(to.parts.filter((part) => from.parts.some((old) => old.id === part.id))).toEqual([]);
});
