import AxeBuilder from '@axe-core/playwright';
import { expect, type Page } from '@playwright/test';

const WCAG = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

/** Holds the page as it stands to WCAG 2.2 AA, as far as a machine can judge it. */
export async function expectAccessible(page: Page, what: string): Promise<void> {
  // Colours are judged as they come to rest, not in the middle of a fade.
  await page.evaluate(async () => {
    await Promise.all(document.getAnimations().map((animation) => animation.finished.catch(() => undefined)));
  });
  const { violations } = await new AxeBuilder({ page }).withTags(WCAG).analyze();
  const found = violations.flatMap(({ id, nodes }) =>
    nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')}: ${failureSummary?.split('\n').slice(1).join(' ') ?? ''}`),
  );
  expect(found, what).toEqual([]);
}
