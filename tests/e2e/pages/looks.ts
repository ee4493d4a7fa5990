import AxeBuilder from '@axe-core/playwright';
import { expect, type Page } from '@playwright/test';

/** Fails where the page is wider than the window. */
export async function expectNoSidewaysScroll(page: Page): Promise<void> {
  const excess = await page.evaluate(
    () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
  );
  expect(excess, `${page.url()} is ${excess} px wider than the window`).toBeLessThanOrEqual(0);
}

/** Fails on a breach of WCAG 2.2 AA that a machine can find. */
export async function expectNoAxeFindings(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa'])
    .analyze();
  const findings = violations.map(({ id, help, nodes }) => ({
    id,
    help,
    nodes: nodes.map(({ target }) => target.join(' ')),
  }));
  expect(findings, `axe on ${page.url()}`).toEqual([]);
}
