// The report of a comparison in a real browser, without scripts, on paper, and before an accessibility checker.
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launch, open } from './browser.ts';
import { plansPage } from './plans-page.ts';
import { violations } from './violations.ts';
import { withoutScripts } from './without-scripts.ts';

let browser: Browser;
let html: string;

beforeAll(async () => {
  [browser, html] = await Promise.all([launch(), plansPage()]);
}, 240_000);
afterAll(() => browser.close());

describe('the report of a comparison', () => {
  it('opens offline without an error, and begins with what the results support', async () => {
    const { page, complaints, close } = await open(browser, html);
    await page.locator('#year').waitFor();
    expect(complaints).toEqual([]);
    expect(await page.locator('.lead').textContent()).toMatch(/^The results support “/);
    expect(await page.locator('table.plans thead th').allTextContents()).toEqual(
      expect.arrayContaining(['as now', 'hedge and moves', 'rewet the wash']),
    );
    await close();
  });

  it('shows two plans side by side, or their difference, in the year of the map', async () => {
    const { page, complaints, close } = await open(browser, html);
    const right = page.locator('[data-side=right] svg').first();
    const texts = async (): Promise<string> => (await right.locator('text').allTextContents()).join(' ');
    expect(await texts()).toMatch(/mean difference from as now.*[+−]\d/);
    await page.locator('#plan-difference').uncheck();
    expect(await texts()).toContain('the middle of');
    await page.locator('#right-plan').selectOption({ label: 'rewet the wash' });
    await page.locator('#plan-difference').check();
    await page.locator('#year').focus();
    await page.keyboard.press('Home');
    expect(await texts()).toMatch(/^2026/);
    expect(complaints).toEqual([]);
    await close();
  });

  it('reads the chances of all plans at a year by keyboard', async () => {
    const { page, close } = await open(browser, html);
    await page.locator('.smalls.plans').focus();
    await page.keyboard.press('PageDown');
    expect(await page.locator('.smalls.plans + .readout, .smalls.plans ~ .readout').first().textContent()).toMatch(
      /^By 2066, of 100 futures have come to few adults: as now /,
    );
    await close();
  });

  it('is a whole document where scripts do not run', async () => {
    const { page, close } = await open(browser, withoutScripts(html));
    for (const id of ['answer', 'plans', 'differences', 'chances', 'money', 'patches', 'robust', 'signs', 'limits']) {
      expect([id, await page.locator(`#${id}`).isVisible()]).toEqual([id, true]);
    }
    expect(await page.locator('.pair svg').count()).toBe(2);
    expect(await page.locator('.controls').first().isVisible()).toBe(false);
    await close();
  });

  it('keeps its summary on two sheets of paper', async () => {
    const { page, close } = await open(browser, html);
    await page.emulateMedia({ media: 'print' });
    await page.setViewportSize({ width: 673, height: 1001 });
    const heights = await page.evaluate(() =>
      ['header', '#answer', '#plans', '#map', '#differences'].map(
        (one) => document.querySelector(one)?.getBoundingClientRect().height ?? 0,
      ),
    );
    const [header = 0, answer = 0, plans = 0, map = 0, differences = 0] = heights;
    for (const height of heights) expect(height).toBeGreaterThan(50);
    expect(header + answer + plans).toBeLessThan(1001);
    expect(map + differences).toBeLessThan(1001);
    await close();
  });

  it('shows every plan on a phone, each number beside the name of its plan', async () => {
    const { page, close } = await open(browser, html, { viewport: { width: 380, height: 700 } });
    const cells = await page.evaluate(() =>
      [...document.querySelectorAll('table.plans tbody tr:first-child td')].map((cell) => ({
        name: getComputedStyle(cell, '::before').content.split('"')[1],
        right: cell.getBoundingClientRect().right,
        height: cell.getBoundingClientRect().height,
      })),
    );
    expect(cells.map(({ name }) => name)).toEqual([
      'as now',
      'rewet the wash',
      'mow later',
      'hedge and moves',
      'hedge, moves and mowing',
    ]);
    for (const { right, height } of cells) {
      expect(right).toBeLessThanOrEqual(380);
      expect(height).toBeGreaterThan(15);
    }
    await close();
  });

  it('says whose the map and the abundance are', async () => {
    const { page, close } = await open(browser, html);
    expect(await page.locator('#map-figure figcaption').textContent()).toMatch(/^The map is of “as now”\./);
    expect(await page.locator('#abundance p').first().textContent()).toBe('Under “as now”.');
    await close();
  });

  it('fits a phone, and stands before an accessibility checker', async () => {
    const { page, close } = await open(browser, html, { viewport: { width: 380, height: 700 } });
    await page.locator('#year').waitFor();
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(380);
    expect(await violations(page)).toEqual([]);
    await close();
    const wide = await open(browser, html);
    for (const summary of await wide.page.locator('summary').all()) await summary.click();
    expect(await violations(wide.page)).toEqual([]);
    await wide.close();
  });
});
