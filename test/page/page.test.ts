// The report in a real browser: offline, by keyboard, by pointer, narrow, printed, and with nothing but its own words.
import { readFileSync } from 'node:fs';
import type { Browser, Locator } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launch, open } from './browser.ts';
import { reportPage } from './report-page.ts';

let browser: Browser;
let html: string;

beforeAll(async () => {
  [browser, html] = await Promise.all([launch(), reportPage()]);
});
afterAll(() => browser.close());

const yearIn = 'figure.map .wide svg > text';

describe('the report in a browser', () => {
  it('opens from disk, offline, without an error and without asking for anything', async () => {
    const { page, complaints, close } = await open(browser, html);
    await page.locator('#year').waitFor();
    expect(complaints).toEqual([]);
    expect(await page.locator('h1').textContent()).toBe('Reed hare on the Harrow Levels');
    await close();
  });

  it('moves the map, its table and its label with the year slider, by keyboard alone', async () => {
    const { page, complaints, close } = await open(browser, html);
    await page.locator('summary', { hasText: 'numbers of the map' }).click();
    await page.locator('#year').focus();
    await page.keyboard.press('Home');
    expect(await page.locator(yearIn).first().textContent()).toBe('2026');
    await page.keyboard.press('ArrowRight');
    expect(await page.locator(yearIn).first().textContent()).toBe('2027');
    expect(await page.locator('#map-tables caption').first().textContent()).toBe('Patches in 2027 (females)');
    expect(await page.locator('#year').getAttribute('aria-valuetext')).toMatch(/^2027: [\d,]+ females in the middle/);
    expect(complaints).toEqual([]);
    await close();
  });

  it('walks from patch to patch with the arrow keys and says the numbers of each', async () => {
    const { page, close } = await open(browser, html);
    const focused = () => page.evaluate(() => document.activeElement?.getAttribute('aria-label') ?? '');
    await page.locator('.wide [data-patch][tabindex="0"]').focus();
    expect(await focused()).toMatch(/^North fen\. [\d,]+ females in the middle of 2,000 futures/);
    await page.keyboard.press('ArrowRight');
    expect(await focused()).toMatch(/^Eel pond\./);
    expect(await page.locator('.tip').textContent()).toMatch(/^Eel pond, 2076/);
    await page.keyboard.press('Escape');
    expect(await page.locator('.tip').isHidden()).toBe(true);
    await page.keyboard.press('End');
    expect(await focused()).toMatch(/^Far bank\./);
    expect(await page.locator('.wide [data-patch][tabindex="0"]').count()).toBe(1);
    await close();
  });

  it('shows the chance of being empty when asked, as a number in each circle', async () => {
    const { page, close } = await open(browser, html);
    await page.getByLabel('the chance of being empty').check();
    expect(await page.locator('.wide [data-patch="4"] text').textContent()).toMatch(/^\d+$/);
    expect(await page.locator('figure.map .wide svg').first().getAttribute('aria-label')).toContain(
      'chance of being empty',
    );
    await close();
  });

  it('tells source and sink by the edge on every map, and the word and the number where the switch says so', async () => {
    const { page, close } = await open(browser, html);
    const dashes = () =>
      page.evaluate(() =>
        [...document.querySelectorAll('figure.map .wide [data-patch] > :nth-last-child(2)')].map((edge) =>
          edge.getAttribute('stroke-dasharray'),
        ),
      );
    await page.locator('.wide [data-patch]').first().waitFor();
    const edges = await dashes();
    expect(edges.filter((dash) => dash === '6 4').length).toBe(3);
    expect(edges.filter((dash) => dash === '0.1 4.5').length).toBe(1);
    expect(await page.locator('.wide [data-patch="0"] > path').count()).toBe(2);
    await page.getByLabel('source or sink').check();
    expect(await page.locator('.wide [data-patch="0"] text').textContent()).toBe('source');
    expect(await page.locator('.wide [data-patch="3"]').getAttribute('aria-label')).toMatch(
      /source: each of the females there leaves 1\.04 a year later in all patches/,
    );
    await page.getByLabel('the contribution').check();
    expect(await page.locator('.wide [data-patch="0"] text').textContent()).toBe('1.06');
    await page.locator('summary', { hasText: 'numbers of the map' }).click();
    expect(await page.locator('#map-tables tbody tr').first().textContent()).toMatch(/source1\.0600\.980$/);
    await close();
  });

  it('plays from the first to the last year and stops there', async () => {
    const { page, close } = await open(browser, html);
    await page.clock.install({ time: 0 });
    await page.clock.pauseAt(1000);
    await page.locator('#play').click();
    expect(await page.locator('#year-shown').textContent()).toBe('2026');
    expect(await page.locator('#play').getAttribute('aria-pressed')).toBe('true');
    await page.clock.runFor(1300);
    expect(await page.locator('#year-shown').textContent()).toBe('2029');
    await page.clock.runFor(60_000);
    expect(await page.locator('#year-shown').textContent()).toBe('2076');
    expect(await page.locator('#play').getAttribute('aria-pressed')).toBe('false');
    await close();
  });

  it('tells the numbers of a patch to the pointer and to a finger', async () => {
    const { page, close } = await open(browser, html, { hasTouch: true });
    await page.locator('.wide [data-patch="0"]').hover();
    expect(await page.locator('.tip strong').textContent()).toBe('North fen, 2076');
    await page.locator('h1').hover();
    expect(await page.locator('.tip').isHidden()).toBe(true);
    await page.locator('.wide [data-patch="1"]').tap();
    expect(await page.locator('.tip strong').textContent()).toBe('Long holm, 2076');
    await close();
  });

  it('reads a chart at any year by keyboard and by pointer', async () => {
    const { page, close } = await open(browser, html);
    const chart = page.locator('#chances [role=slider]').first();
    await chart.focus();
    await page.keyboard.press('Home');
    expect(await chart.getAttribute('aria-valuetext')).toBe('2026: the start, which is not looked at.');
    await page.keyboard.press('PageUp');
    expect(await page.locator('#chances .readout').first().textContent()).toMatch(/^2036: /);
    await page.locator('#abundance .wide svg').hover({ position: { x: 700, y: 200 } });
    expect(await page.locator('#abundance .readout').first().textContent()).toMatch(/^2076: [\d,]+ females/);
    await close();
  });

  it('saves every figure as SVG with its origin and as PNG, also what has not been in sight', async () => {
    const { page, complaints, close } = await open(browser, html);
    await page.locator('#chances [role=slider]').first().focus();
    await page.keyboard.press('Home');
    const save = async (button: Locator) => {
      const [download] = await Promise.all([page.waitForEvent('download'), button.click()]);
      return { name: download.suggestedFilename(), bytes: readFileSync(await download.path()) };
    };
    const rows = await page.locator('.save').all();
    const names: string[] = [];
    for (const row of rows) {
      const svg = await save(row.getByText('Save as SVG'));
      expect(svg.bytes.toString()).toMatch(/^<svg xmlns=.*Drawn from the run with hash 5f0c2b7e/);
      const [, width = ''] = /viewBox="0 0 ([\d.]+) /.exec(svg.bytes.toString()) ?? [];
      const png = await save(row.getByText('Save as PNG'));
      expect(png.bytes.subarray(1, 4).toString()).toBe('PNG');
      expect(png.bytes.readUInt32BE(16)).toBe(2 * Number(width));
      expect(png.bytes.length).toBeGreaterThan(2000);
      expect(png.name).toBe(svg.name.replace('.svg', '.png'));
      names.push(svg.name);
      // The patches, far below, are those of the year that was marked above.
      if (svg.name.includes('abundance-1')) expect(svg.bytes.toString().match(/ in 2026</g)).toHaveLength(8);
    }
    const title = 'reed-hare-on-the-harrow-levels';
    expect(names).toEqual(
      ['answer', 'map', 'chances-1', 'chances-2', 'abundance', 'abundance-1'].map((part) => `${title}-${part}.svg`),
    );
    expect(await page.locator('figure, .smalls').count()).toBe(rows.length);
    expect(complaints).toEqual([]);
    await close();
  });

  it('fits a phone of 380 px, and one of 320 px, without scrolling sideways', async () => {
    for (const width of [380, 320]) {
      const { page, close } = await open(browser, html, { viewport: { width, height: 700 } });
      expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(width);
      expect(await page.locator('figure.map .narrow').isVisible()).toBe(true);
      expect(await page.locator('figure.map .wide').isVisible()).toBe(false);
      await close();
    }
  });

  it('is whole with scripts blocked: answer, map, curves, tables; and no dead controls', async () => {
    const { page, close } = await open(browser, html, { javaScriptEnabled: false });
    expect(await page.locator('.lead').textContent()).toContain('about 4 of 100 futures');
    expect(await page.locator('figure svg:visible').count()).toBe(5);
    expect(await page.locator('.smalls svg:visible').count()).toBe(8);
    expect(await page.locator('.controls').isVisible()).toBe(false);
    expect(await page.locator('button:visible').count()).toBe(0);
    await page.locator('summary', { hasText: 'numbers of the map' }).click();
    expect(await page.locator('#map-tables tbody tr').first().isVisible()).toBe(true);
    await close();
  });
});
