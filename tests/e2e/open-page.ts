import type { Page } from 'playwright/test';

/** Opens a page and waits until it answers to keys: the first paint comes from the server and hears nothing yet. */
export async function openPage(page: Page, path: string): Promise<void> {
  await page.goto(path);
  await page.waitForLoadState('networkidle');
}
