// What an accessibility checker finds wrong on a page.
import axe from 'axe-core';
import type { Page } from 'playwright-core';

/** Each as rule, place and reason. The checker speaks to the page through the browser, past the page's own policy. */
export async function violations(page: Page): Promise<readonly string[]> {
  return page.evaluate(`(async () => {
    ${axe.source}
    const found = await axe.run(document, { runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'] });
    return found.violations.flatMap((rule) =>
      rule.nodes.map((node) => rule.id + ' at ' + node.target.join(' ') + ': ' + node.failureSummary));
  })()`);
}
