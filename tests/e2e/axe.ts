import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';

/** WCAG 2.2 A and AA by axe, and nothing wider than the screen. */
export async function check(page: Page, what: string): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']).analyze();
  const overflow = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
  const found = violations.map((v) => `${what}: ${v.id} ${v.nodes.map((node) => node.target.join(' ')).slice(0, 3).join(' | ')}`);
  return overflow === 0 ? found : [...found, `${what}: ${overflow} px too wide`];
}
