import AxeBuilder from '@axe-core/playwright';
import type { Page } from 'playwright/test';

/** WCAG 2.2 AA and what came before it, and the tool's own good practice. */
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];
/** The rules that read colours. Every page that is looked at in dark is looked at in light too, by all rules. */
const COLOURS = ['color-contrast', 'link-in-text-block'];

/** What axe finds on a page as it stands, each with where; `what` names the state it is in. */
export async function faultsOf(page: Page, what: string): Promise<string[]> {
  const dark = await page.evaluate(() => matchMedia('(prefers-color-scheme: dark)').matches);
  const axe = new AxeBuilder({ page });
  const { violations } = await (dark ? axe.withRules(COLOURS) : axe.withTags(TAGS)).analyze();
  return violations.map(({ id, nodes }) => `${what}: ${id} at ${nodes.map(({ target }) => target.join(' ')).join('; ')}`);
}
