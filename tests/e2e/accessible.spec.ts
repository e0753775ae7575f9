import { expect, test, type Page } from 'playwright/test';
import { faultsOf } from './axe';
import { openPage } from './open-page';
import { signInAs, type DemoRole } from './sign-in';

/** Each screen with the state in which there is most to find fault with. */
const screens: { path: string; role: DemoRole | null; open?: (page: Page) => Promise<void> }[] = [
  { path: '/signin', role: null },
  { path: '/invitation#short', role: null },
  { path: '/jobs', role: 'electrician', open: (page) => page.locator('[data-job]').first().press('Enter') },
  { path: '/jobs?search=zzzz', role: 'electrician' },
  { path: '/jobs/new', role: 'electrician', open: (page) => page.getByRole('button', { name: 'Begin the job' }).click() },
  { path: '/people', role: 'admin', open: (page) => page.getByRole('button', { name: /^Change/ }).first().click() },
  { path: '/account', role: 'admin', open: (page) => page.getByRole('button', { name: 'Sign out everywhere' }).click() },
  { path: '/rules', role: 'apprentice' },
  { path: '/rules/backfeed', role: 'apprentice' },
];

for (const scheme of ['light', 'dark'] as const) {
  for (const width of [1440, 390]) {
    test(`axe finds nothing on the screens, ${scheme}, ${width} px`, async ({ browser, baseURL }) => {
      test.setTimeout(180_000);
      const faults: string[] = [];
      const contexts = new Map<DemoRole | null, Page>();
      for (const { path, role, open } of screens) {
        if (!contexts.has(role)) {
          const context = await browser.newContext({ baseURL, colorScheme: scheme, viewport: { width, height: 844 }, reducedMotion: 'reduce' });
          contexts.set(role, await context.newPage());
          if (role) await signInAs(contexts.get(role)!, role);
        }
        const page = contexts.get(role)!;
        await openPage(page, path);
        await open?.(page);
        faults.push(...(await faultsOf(page, path)));
      }
      const page = contexts.get('electrician')!;
      await openPage(page, '/jobs');
      await page.locator('[data-job]').first().press('Enter');
      const survey = await page.getByRole('link', { name: /1 Survey/ }).getAttribute('href');
      await openPage(page, survey!);
      faults.push(...(await faultsOf(page, 'survey')));
      await page.goto(survey!.replace(/survey$/, 'schedules'));
      await expect(page.getByRole('table', { name: 'Schedule of ways' })).toBeVisible();
      faults.push(...(await faultsOf(page, 'schedules')));
      await page.goto(survey!.replace(/survey$/, 'rehearsal'));
      await page.locator('[role=application][aria-busy=false]').waitFor();
      faults.push(...(await faultsOf(page, 'rehearsal')));
      for (const each of contexts.values()) await each.context().close();
      expect(faults).toEqual([]);
    });
  }
}
