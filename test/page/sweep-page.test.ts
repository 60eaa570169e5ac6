// The page of a sweep: an accessibility checker finds nothing wrong with it, nothing of it runs beyond a phone, and what it draws is
// what was run.
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, expect, test, vi } from 'vitest';
import { folder, skein } from '../cli/skein.ts';
import { launch, open } from './browser.ts';
import { violations } from './violations.ts';

vi.setConfig({ testTimeout: 300_000, hookTimeout: 300_000 });

let browser: Browser;
beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());

function pageOf(words: readonly string[]): string {
  const cwd = folder();
  expect(skein(['sweep', ...words, '--quiet', '--out', 'out'], { cwd }).code).toBe(0);
  expect(skein(['sweep', 'summary', 'out', '--page', 'page.html'], { cwd }).code).toBe(0);
  return readFileSync(join(cwd, 'page.html'), 'utf8');
}

const plans = ['models/which-plan-where.yaml', '--replicates', '20'];
const sampled = ['--over', 'adult_survival=0.2:0.6', '--over', 'leaving_share=0:0.5', '--points', '48'];
const shares = ['models/survival-and-leaving.yaml', '--replicates', '20', ...sampled, '--design', 'sobol indices'];

test.each([
  ['of plans', plans],
  ['of shares of variance', shares],
])('%s', async (_, words) => {
  const html = pageOf(words);
  for (const viewport of [
    { width: 1200, height: 900 },
    { width: 380, height: 700 },
  ]) {
    const { page, complaints, close } = await open(browser, html, { viewport });
    for (const summary of await page.locator('summary').all()) await summary.click();
    expect(await violations(page)).toEqual([]);
    expect(await page.evaluate('document.documentElement.scrollWidth')).toBe(viewport.width);
    expect(complaints).toEqual([]);
    // Words in figures keep a size that can be read.
    const sizes = await page.evaluate(
      `[...document.querySelectorAll('figure svg text')].map((text) => text.getBoundingClientRect().height)`,
    );
    expect(Math.min(...(sizes as number[]).filter((size) => size > 0))).toBeGreaterThan(9);
    await close();
  }
});

test('curves are marked at the values that were run, and the line lies where the preferred plan changes', async () => {
  const { page, close } = await open(browser, pageOf(plans));
  const curve = page.locator('figure, div').locator('svg:has(title:text("animals [as now] over drowned"))').first();
  expect(await curve.locator('circle').count()).toBe(5);
  const best = page.locator('svg:has(title:text-is("Best by animals"))').first();
  const cells = await best.locator('g > title').allTextContents();
  expect(cells).toHaveLength(35);
  expect(new Set(cells.map((words) => words.replace(/, not told apart$/u, '')))).toEqual(
    new Set(['larger bank', 'safe ford']),
  );
  // With twenty runs only, some points do not tell; these are marked in the map and open on the curve of the difference.
  const untold = cells.filter((words) => words.endsWith(', not told apart')).length;
  expect(untold).toBeGreaterThan(0);
  expect(
    await best
      .locator('text')
      .filter({ hasText: /^[A-C]\?$/u })
      .count(),
  ).toBe(untold);
  const less = page.locator('svg:has(title:text("[larger bank less as now] over drowned"))').first();
  expect(await less.locator('circle[fill="#fbfbf7"]').count()).toBeGreaterThan(0);
  expect(await best.locator('line').count()).toBeGreaterThan(3);
  await close();
});
