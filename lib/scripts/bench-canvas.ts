import { chromium, type Browser, type Page } from 'playwright';
import { elkGraph } from '@/components/sheet/tidy/elk-graph';
import { connectionPages } from '@/diagram/layout/connections-scene';
import { buildScene } from '@/diagram/layout/build-scene';
import { gesture, nodeInSight, quantile, zoomOut } from './bench-canvas/gestures';
import { bareGraph, overviewOf } from './bench-canvas/bare-graph';
import { openWith, serveApp, serveBare } from './bench-canvas/pages';
import { homeOfAtLeast } from './bench-home';

/**
 * npm run bench -- canvas [--json]
 * The sheet in Chromium, as it is built for people, beside a bare page of reactflow with as many default nodes and edges, in
 * turns, in one run. One object a line: { name, ratio, bar, holds }; a figure that is only reported has no bar.
 */
export interface CanvasMeasure {
  name: string;
  ratio: number;
  bar: number | null;
  holds: boolean;
  /** the figures behind the ratio */
  of: string;
}

const PARTS = 500;
const ZOOM = 0.9;
const FRAMES = 100;
const ROUNDS = 5;
const LONG_TASK = 50;
const TIDIED = 'r0001';

const median = (values: readonly number[]): number => quantile(values, 0.5);
const most = (name: string, ours: number, theirs: number, bar: number, unit: string): CanvasMeasure => {
  const ratio = ours / theirs;
  return { name, ratio, bar, holds: ratio <= bar, of: `${ours.toFixed(1)} against ${theirs.toFixed(1)} ${unit}` };
};

const launch = (): Promise<Browser> =>
  chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: [
      ...['--headless', '--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-sync'],
      ...['--disable-background-networking', '--disable-component-update'],
      // Frames as they are made, not as a screen of 60 Hz would show them: a ratio needs more than two steps.
      ...['--disable-frame-rate-limit', '--disable-gpu-vsync'],
    ],
  });

const settled = async (page: Page) => {
  await page.waitForSelector('.react-flow__node');
  await page.evaluate(() => new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done))));
};

/** ms from asking for a page to its first nodes on the screen. */
async function firstShown(page: Page, address: string): Promise<number> {
  const start = performance.now();
  await page.goto(address);
  await settled(page);
  // The sheet hears keys from here on, and what was left unsent on this device has been found.
  await page.waitForFunction(() => document.querySelector('[role=application]')?.ariaBusy !== 'true');
  return performance.now() - start;
}

async function frames(sheet: Page, bare: Page, what: string): Promise<CanvasMeasure[]> {
  const pages = [
    { page: sheet, pan: 1, node: await nodeInSight(sheet) },
    { page: bare, pan: 0, node: await nodeInSight(bare) },
  ] as const;
  const taken = { pan: [[], []] as number[][], drag: [[], []] as number[][] };
  for (let round = 0; round < ROUNDS; round++)
    for (const [i, { page, pan, node }] of pages.entries()) {
      await page.bringToFront();
      const selector = `.react-flow__node[data-id="${node}"]`;
      const moved = await gesture(page, { selector: '.react-flow__pane', button: pan, frames: FRAMES, step: { x: -8, y: -1 } });
      taken.pan[i]!.push(quantile(moved, 0.95));
      const dragged = await gesture(page, { selector, button: 0, frames: FRAMES, step: { x: 3, y: 1 } });
      taken.drag[i]!.push(quantile(dragged, 0.95));
      // What was dropped is examined before the other page has its turn.
      await page.waitForTimeout(1500);
    }
  return (['drag', 'pan'] as const).map((kind) =>
    most(
      `${kind === 'drag' ? 'dragging a part' : 'panning'}, ${what}: frame time at the 95th percentile`,
      ...([median(taken[kind][0]!), median(taken[kind][1]!)] as const),
      ...([1.3, 'ms'] as const),
    ),
  );
}

/** What the page keeps of its long tasks while an edit is watched. */
interface Watch {
  /** when the key was heard, and when the frame that shows the edit was made */
  heard: number;
  drawn: number;
  tasks: { start: number; duration: number }[];
}

/** The longest task of the page after an edit was drawn, until its findings stand in the margin, ms. */
async function examining(page: Page): Promise<CanvasMeasure> {
  await page.bringToFront();
  const longest: number[] = [];
  for (const rating of ['B16', 'B10', 'B16', 'B10', 'B16']) {
    await page.getByRole('application').focus();
    await page.keyboard.press('/');
    await page.keyboard.type('Q9');
    await page.keyboard.press('Enter');
    await page.keyboard.press('Enter');
    await page.keyboard.type(rating);
    // The watch stands before the key is struck: a key that comes first would not be heard by it.
    await page.evaluate(() => {
      const watch: Watch = { heard: 0, drawn: Infinity, tasks: [] };
      Object.assign(window, { watch });
      new PerformanceObserver((list) => {
        for (const { startTime, duration } of list.getEntries()) watch.tasks.push({ start: startTime, duration });
      }).observe({ entryTypes: ['longtask'] });
      const heard = () => {
        watch.heard = performance.now();
        requestAnimationFrame(() => requestAnimationFrame(() => (watch.drawn = performance.now())));
      };
      window.addEventListener('keydown', heard, { once: true, capture: true });
    });
    await page.keyboard.press('Enter');
    await page.waitForTimeout(4000);
    const { heard, drawn, tasks } = await page.evaluate(() => (window as unknown as { watch: Watch }).watch);
    if (drawn === Infinity) throw new Error(heard === 0 ? 'the key was not heard by the page' : 'the edit was not drawn');
    const seen = Math.max(0, ...tasks.filter(({ start }) => start >= drawn).map(({ duration }) => duration));
    longest.push(seen);
    if ((await page.locator('aside [aria-busy=true]').count()) > 0) throw new Error('the findings did not come in 4 s');
  }
  const worst = Math.max(...longest);
  return {
    name: `examining after an edit at ${PARTS} parts: longest task of the page over ${LONG_TASK} ms`,
    ...{ ratio: worst, bar: LONG_TASK, holds: worst <= LONG_TASK, of: worst === 0 ? 'none seen' : `${worst} ms` },
  };
}

/** kB of scripts that a page has loaded, as they are on the wire before compression. */
const scripts = (page: Page): Promise<number> =>
  page.evaluate(() =>
    performance
      .getEntriesByType('resource')
      // What is fetched ahead for other sheets is not run here.
      .filter((entry) => (entry as PerformanceResourceTiming).initiatorType === 'script')
      .reduce((sum, entry) => sum + (entry as PerformanceResourceTiming).decodedBodySize / 1000, 0),
  );

/** In the page, as the other is: ms from a click on the way to tidy until what it gives is shown. */
const untilShown = (word: HTMLElement | SVGElement): Promise<number> =>
  new Promise((resolve) => {
    const panel = word.closest('[data-way]')!;
    const start = performance.now();
    new MutationObserver((_, observer) => {
      if (panel.getAttribute('data-way') !== 'short') return;
      observer.disconnect();
      resolve(performance.now() - start);
    }).observe(panel, { attributeFilter: ['data-way'] });
    word.dispatchEvent(new MouseEvent('click', { bubbles: true, cancelable: true }));
  });

async function tidying(page: Page, bare: Page): Promise<CanvasMeasure> {
  const ours: number[] = [];
  const theirs: number[] = [];
  const panel = page.getByRole('dialog', { name: 'Tidy' });
  for (let round = 0; round < 3; round++) {
    await page.bringToFront();
    await page.getByRole('application').focus();
    await page.keyboard.press('t');
    await panel.waitFor();
    ours.push(await panel.getByText('short wires').evaluate(untilShown));
    await page.keyboard.press('Escape');
    await bare.bringToFront();
    theirs.push(
      await bare.evaluate(() => (window as unknown as { layOut(file: string): Promise<number> }).layOut('./tidy.json')),
    );
  }
  return most('tidy for short wires, against elkjs alone on the same graph', median(ours), median(theirs), 1.3, 'ms');
}

async function measureCanvas(report: (measure: CanvasMeasure) => void): Promise<void> {
  const home = homeOfAtLeast(PARTS);
  const scene = overviewOf(home);
  // A room as people tidy it: larger graphs come to the limit after which elkjs is given up, here and there alike.
  const { place } = connectionPages(home).find((page) => page.place === TIDIED)!;
  const face = buildScene(home, 'connections', { place });
  const tidied = elkGraph(face, new Set(face.parts.map(({ id }) => id)));
  const bareServer = await serveBare({ 'graph.json': bareGraph(scene, ZOOM), 'tidy.json': tidied });
  const app = await serveApp();
  const browser = await launch();
  try {
    const { context, job } = await openWith(browser, app.address, home);
    const sheet = await context.newPage();
    const bare = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
    for (const page of [sheet, bare]) await page.addInitScript('globalThis.__name = (named) => named');
    const shown = { sheet: [] as number[], bare: [] as number[] };
    for (let round = 0; round < ROUNDS; round++) {
      await bare.bringToFront();
      shown.bare.push(await firstShown(bare, bareServer.address));
      await sheet.bringToFront();
      shown.sheet.push(await firstShown(sheet, `${app.address}${job}/overview`));
      await sheet.waitForTimeout(2500);
    }
    report(most('first interactive sheet', median(shown.sheet), median(shown.bare), 1.5, 'ms'));
    const [added, without] = [await scripts(sheet), await scripts(bare)];
    report({
      name: 'JavaScript added to the bare page',
      ...{ ratio: added / without, bar: null, holds: true, of: `${added.toFixed(0)} against ${without.toFixed(0)} kB` },
    });
    for (const measure of await frames(sheet, bare, 'at reading size')) report(measure);
    report(await examining(sheet));
    await zoomOut(sheet, 'key');
    await zoomOut(bare, 'wheel');
    for (const measure of await frames(sheet, bare, 'the whole home in sight')) report(measure);
    await sheet.goto(`${app.address}${job}/connections?place=${encodeURIComponent(place)}`);
    await settled(sheet);
    report(await tidying(sheet, bare));
  } finally {
    await browser.close();
    await app.stop();
    await bareServer.stop();
  }
}

/** Runs them all and says each on a line of its own. @returns whether all hold */
export async function benchCanvas(json: boolean): Promise<boolean> {
  let held = true;
  await measureCanvas(({ name, ratio, bar, holds, of }) => {
    held &&= holds;
    const line = json
      ? JSON.stringify({ name, ratio: Number(ratio.toPrecision(4)), bar, holds })
      : `${bar === null ? 'is' : holds ? 'holds' : 'MISSES'}  ${ratio.toPrecision(3)}${bar === null ? '' : `, at most ${bar}`}: ${name} (${of})`;
    process.stdout.write(`${line}\n`);
  });
  return held;
}
