import { expect, type Page } from 'playwright/test';

const supply = { system: 'TN-S', voltage: 230, frequency: 50, ze: 0.4, zln: 0.3 };

/** What the tests look at in a document. */
export interface Home {
  title: string;
  parts: { id: string; kind: string; ref?: string; label?: string; watts?: number; rating?: number; place?: string }[];
  wires: { id: string; from: [string, string]; to: [string, string]; role: string }[];
  places: { id: string; name: string }[];
  survey?: { id: string; name: string }[];
  plans?: { id: string; name: string; picture: string }[];
  sheet?: {
    overview?: Record<string, { x: number; y: number; pinned?: boolean }>;
    plan?: Record<string, { x: number; y: number; on: string }>;
  };
}

/** A new job with an empty sheet. */
export async function beginJob(page: Page, title: string): Promise<string> {
  const origin = new URL((await page.request.get('/signin')).url()).origin;
  const answer = await page.request.post('/api/jobs', {
    headers: { origin },
    data: { title, client: 'M. Orrin', address: title, practice: 'IEC', supply, hoursWanted: 3, due: null },
  });
  expect(answer.status()).toBe(201);
  return ((await answer.json()) as { id: string }).id;
}

/** The document as the server has it. */
export async function savedHome(page: Page, job: string): Promise<Home> {
  const drawingId = await drawingOf(page, job);
  const { document } = (await (await page.request.get(`/api/drawings/${drawingId}`)).json()) as { document: Home };
  return document;
}

export async function drawingOf(page: Page, job: string): Promise<string> {
  return ((await (await page.request.get(`/api/jobs/${job}`)).json()) as { drawingId: string }).drawingId;
}

/** Everything that was saved, in order. */
export async function savedChanges(page: Page, job: string): Promise<{ rev: number; saveId: string; label: string }[]> {
  const answer = await page.request.get(`/api/drawings/${await drawingOf(page, job)}/changes?since=0`);
  return ((await answer.json()) as { changes: { rev: number; saveId: string; label: string }[] }).changes;
}

export const sheet = (page: Page) => page.getByRole('application');
export const saved = (page: Page) =>
  expect(page.getByText(/^Saved \d\d:\d\d$/)).toBeVisible({ timeout: 60_000 });

/** Opens a face of the drawing and waits until it hears keys. */
export async function openFace(page: Page, job: string, face = 'overview'): Promise<void> {
  await page.goto(`/jobs/${job}/${face}`);
  await expect(page.locator('[role=application][aria-busy=false]')).toBeVisible({ timeout: 60_000 });
  await sheet(page).focus();
}

/** Does a command by its words. */
export async function command(page: Page, words: string): Promise<void> {
  await page.keyboard.press('Control+k');
  await page.keyboard.type(words);
  await page.keyboard.press('Enter');
}

/** Extends from the terminal in hand, by keys alone. */
export async function extend(page: Page, typed: string): Promise<void> {
  await page.keyboard.press('e');
  await expect(page.getByRole('listbox', { name: 'What comes next' })).toBeVisible();
  await page.keyboard.type(typed);
  await expect(page.getByRole('option').first()).toBeVisible();
  await page.keyboard.press('Enter');
  await expect(page.getByRole('listbox')).toHaveCount(0);
}

/** Finds a part by its name and writes its rating anew where it stands. */
export async function rate(page: Page, name: string, text: string): Promise<void> {
  await sheet(page).focus();
  await page.keyboard.press('/');
  await page.keyboard.type(name);
  await page.keyboard.press('Enter');
  await page.keyboard.press('Enter');
  await page.keyboard.type(text);
  await page.keyboard.press('Enter');
}

/** Opens the survey and waits until its blank row takes a name. */
export async function openSurvey(page: Page, job: string): Promise<void> {
  await page.goto(`/jobs/${job}/survey`);
  await expect(blankRow(page)).toBeVisible({ timeout: 60_000 });
  await page.waitForLoadState('load');
}
const blankRow = (page: Page) => page.getByRole('textbox', { name: 'New room, name' });

/** Types a room into the survey: one command, on the screen when this returns. */
export async function addRoom(page: Page, name: string): Promise<void> {
  await expect(async () => {
    await blankRow(page).fill(name);
    await blankRow(page).press('Enter');
    await expect(page.getByRole('textbox', { name: `${name}, name`, exact: true })).toBeVisible({ timeout: 2000 });
  }).toPass({ timeout: 60_000 });
}
export const rooms = (home: Home): string[] => (home.survey ?? []).map(({ name }) => name).sort();
