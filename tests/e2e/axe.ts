import AxeBuilder from '@axe-core/playwright';
import type { Page } from 'playwright/test';

/** WCAG 2.2 AA and what came before it, and the tool's own good practice. */
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];

/** What axe finds on a page as it stands, each with where; `what` names the state it is in. */
export async function faultsOf(page: Page, what: string): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
  return violations.map(({ id, nodes }) => `${what}: ${id} at ${nodes.map(({ target }) => target.join(' ')).join('; ')}`);
}
