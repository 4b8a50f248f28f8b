/** What every page that a browser test visits must keep: axe finds nothing, and nothing is wider than the screen. */
import AxeBuilder from "@axe-core/playwright";
import { expect, type Page } from "@playwright/test";

/**
 * What axe finds, as "rule: element". In one go and without what passed: no page has frames, and the other way takes
 * thrice as long.
 */
export async function violations(page: Page): Promise<string[]> {
  const found = await new AxeBuilder({ page })
    .setLegacyMode(true)
    .options({ resultTypes: ["violations"] })
    .analyze();
  return found.violations.flatMap(({ id, nodes }) => nodes.map(({ html }) => `${id}: ${html}`));
}

/** By how many pixels the page can be pushed sideways; what stands at its edge is lost then. */
export const overflow = (page: Page): Promise<number> =>
  page.evaluate(() => {
    const { scrollWidth, clientWidth } = document.scrollingElement ?? document.documentElement;
    return scrollWidth - clientWidth;
  });

export async function expectAccessible(page: Page): Promise<void> {
  expect(await violations(page)).toEqual([]);
  expect(await overflow(page)).toBe(0);
}
