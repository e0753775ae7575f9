import { expect, test, type Page } from 'playwright/test';
import { beginJob, command, extend, openFace, saved, savedHome, sheet } from './a-job';
import { signInAs } from './sign-in';

/** Leading a run by hand on the connections sheet, with a real pointer and by keys. */

type Bends = Record<string, ({ x: number } | { y: number })[]>;

const bendsOf = async (page: Page, job: string): Promise<Bends> =>
  ((await savedHome(page, job)) as { sheet?: { bends?: Bends } }).sheet?.bends ?? {};

const wayOf = async (page: Page, run: string): Promise<string> =>
  (await page.locator(`path[data-run="${run}"]`).getAttribute('d'))!;

interface Held {
  run: string;
  x: number;
  y: number;
}

/** A run that bends, and a place of an upright stretch of it on the screen where a pointer meets that run and no other. */
async function bentRun(page: Page): Promise<Held> {
  const find = () =>
    page.evaluate((): Held | null => {
      for (const path of document.querySelectorAll<SVGPathElement>('path[data-run]')) {
        const { run } = path.dataset;
        const corners = path.getAttribute('d')!.match(/-?\d+ -?\d+(?=[ML]|$)/g)!.map((pair) => pair.split(' ').map(Number));
        for (let i = 0; run && corners.length > 2 && i + 1 < corners.length; i++) {
          const [a, b] = [corners[i]!, corners[i + 1]!];
          if (a[0] !== b[0] || Math.abs(a[1]! - b[1]!) < 2500) continue;
          for (const share of [0.5, 0.35, 0.65]) {
            const at = new DOMPoint(a[0], a[1]! + (b[1]! - a[1]!) * share).matrixTransform(path.getScreenCTM()!);
            if (document.elementFromPoint(at.x, at.y) === path) return { run, x: at.x, y: at.y };
          }
        }
      }
      return null;
    });
  await expect.poll(find).not.toBeNull();
  return (await find())!;
}

test('a stretch that is led with the pointer stays: when a part moves, taken back and done again, and after a reload', async ({
  page,
}) => {
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Heron Row 4');
  await openFace(page, job);
  await command(page, 'place the supply');
  await extend(page, 'study lamps');
  await saved(page);
  await openFace(page, job, 'connections');
  const study = (await savedHome(page, job)).places.find(({ name }) => name === 'Study')!;
  await openFace(page, job, `connections?place=${study.id}`);

  const { run, x, y } = await bentRun(page);
  const key = `connections:${run.slice('wire:'.length)}`;
  const first = await wayOf(page, run);
  await page.mouse.click(x, y);
  await expect(page.locator('[data-layer=grips] path[data-stretch]').first()).toBeAttached();
  await page.mouse.move(x, y);
  await page.mouse.down();
  await page.mouse.move(x + 12, y + 3, { steps: 3 });
  await page.mouse.move(x + 34, y + 5, { steps: 5 });
  await page.mouse.up();
  await expect(page.getByRole('status').filter({ hasText: /^Lead / })).toBeVisible();
  await saved(page);
  const led = (await bendsOf(page, job))[key]!;
  expect(led).toHaveLength(1);
  const line = (led[0] as { x: number }).x;
  const keptTo = async () => expect(await wayOf(page, run)).toMatch(new RegExp(`L${line} -?\\d+L${line} -?\\d+`));
  await keptTo();
  expect(await wayOf(page, run)).not.toBe(first);

  // a part at its end moves: the stretch stays on its line
  const home = await savedHome(page, job);
  const { from, to } = home.wires.find(({ id }) => `wire:${id}` === run)!;
  const lamp = home.parts.find(({ id, kind }) => kind === 'lamp' && [from[0], to[0]].includes(id))!;
  const node = page.locator(`.react-flow__node[data-id="${lamp.id}"]`);
  const box = (await node.boundingBox())!;
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
  await page.mouse.down();
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2 + 8, { steps: 2 });
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2 + 30, { steps: 4 });
  await page.mouse.up();
  await expect(page.getByRole('status').filter({ hasText: /^Move / })).toBeVisible();
  await saved(page);
  await keptTo();
  const moved = await wayOf(page, run);

  await sheet(page).focus();
  await page.keyboard.press('Control+z');
  await page.keyboard.press('Control+z');
  await expect.poll(() => wayOf(page, run)).toBe(first);
  await page.keyboard.press('Control+Shift+z');
  await page.keyboard.press('Control+Shift+z');
  await expect.poll(() => wayOf(page, run)).toBe(moved);
  await saved(page);
  await page.reload();
  await expect(page.locator('[role=application][aria-busy=false]')).toBeVisible({ timeout: 60_000 });
  await expect.poll(() => wayOf(page, run)).toBe(moved);
  expect((await bendsOf(page, job))[key]).toEqual(led);
});

test('a stretch is led by keys, and routed again by its command', async ({ page }) => {
  await signInAs(page, 'electrician');
  const job = await beginJob(page, 'Heron Row 6');
  await openFace(page, job);
  await command(page, 'place the supply');
  await extend(page, 'study lamps');
  await saved(page);
  const study = (await savedHome(page, job)).places.find(({ name }) => name === 'Study')!;
  await openFace(page, job, `connections?place=${study.id}`);
  const { run, x, y } = await bentRun(page);
  const first = await wayOf(page, run);
  await page.mouse.click(x, y);
  await sheet(page).focus();
  await page.keyboard.press('m');
  for (let n = 0; n < 3; n++) await page.keyboard.press('ArrowRight');
  await page.keyboard.press('Enter');
  await expect(page.getByRole('status').filter({ hasText: /^Lead / })).toBeVisible();
  await saved(page);
  const key = `connections:${run.slice('wire:'.length)}`;
  const [bend] = (await bendsOf(page, job))[key]!;
  expect(await wayOf(page, run)).toContain(`L${(bend as { x: number }).x} `);
  await command(page, 'route again');
  await expect.poll(() => wayOf(page, run)).toBe(first);
  await saved(page);
  expect(await bendsOf(page, job)).toEqual({});
});
