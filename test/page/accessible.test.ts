// An accessibility checker finds nothing wrong with the page, in any state that a reader can bring it to.
import type { Browser, BrowserContextOptions, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { compileModel } from '../golden/models.ts';
import { launch, open } from './browser.ts';
import { reportOf } from './report-of.ts';
import { pageScript, reportPage } from './report-page.ts';
import { violations } from './violations.ts';
import { withoutScripts } from './without-scripts.ts';

let browser: Browser;
let html: string;
let counts: string;

beforeAll(async () => {
  [browser, html] = await Promise.all([launch(), reportPage()]);
  const compiled = compileModel('held-against-counts', { replicates: 64 });
  counts = reportOf(compiled, { pageScript: await pageScript() });
});
afterAll(() => browser.close());

interface State {
  readonly name: string;
  readonly context?: BrowserContextOptions;
  readonly reach?: (page: Page) => Promise<void>;
  readonly scripts?: false;
  /** Which page; the usual one where it is missing. */
  readonly of?: 'counts';
}

const states: readonly State[] = [
  { name: 'with every table open', reach: openTables },
  { name: 'with every table open on a phone', context: { viewport: { width: 380, height: 700 } }, reach: openTables },
  { name: 'switched over, with the numbers of a patch shown and a year marked', reach: useAll },
  { name: 'where scripts do not run', scripts: false },
  { name: 'with counts of the past, a year of them marked', of: 'counts', reach: markCounted },
];

async function openTables(page: Page): Promise<void> {
  for (const summary of await page.locator('summary').all()) await summary.click();
}

async function markCounted(page: Page): Promise<void> {
  await openTables(page);
  const counted = page.locator('[data-figure=observed]:visible');
  await counted.focus();
  await page.keyboard.press('Home');
  await page.keyboard.press('ArrowRight');
  await page.keyboard.press('ArrowRight');
  expect(await counted.getAttribute('aria-valuetext')).toMatch(/^2017: \d+ breeder in the middle; .* Counted: 80\.$/);
  expect(await counted.locator('circle').count()).toBeGreaterThan(6);
  await page.evaluate(() => window.scrollTo({ top: 0, behavior: 'instant' }));
}

async function useAll(page: Page): Promise<void> {
  await page.locator('#abundance [role=slider]:visible').first().focus();
  await page.keyboard.press('PageDown');
  await page.getByLabel('the chance of being empty').check();
  await page.locator('[data-patch][tabindex="0"]:visible').focus();
  // What has gone under the contents at the top can be scrolled out again; the checker would call it too small.
  await page.evaluate(() => window.scrollTo({ top: 0, behavior: 'instant' }));
}

describe('the accessibility checker', () => {
  it.each(states)('has nothing against the page $name', async ({ context, reach, scripts, of }) => {
    const whole = of === 'counts' ? counts : html;
    const text = scripts === false ? withoutScripts(whole) : whole;
    const { page, close } = await open(browser, text, context);
    await reach?.(page);
    expect(await violations(page)).toEqual([]);
    await close();
  });

  it('would complain of a page without a language and a slider without a name, so it does look', async () => {
    const { page, close } = await open(browser, '<title>t</title><main><h1>h</h1><p role="slider">1</p></main>');
    const found = (await violations(page)).map((text) => text.split(' ')[0]);
    expect(found).toEqual(expect.arrayContaining(['html-has-lang', 'aria-input-field-name']));
    await close();
  });
});
