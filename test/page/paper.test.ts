// The report on paper and in grey.
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launch, open } from './browser.ts';
import { modelText } from '../golden/models.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { reportOf } from './report-of.ts';
import { pageScript, reportPage } from './report-page.ts';

let browser: Browser;
let html: string;

beforeAll(async () => {
  [browser, html] = await Promise.all([launch(), reportPage()]);
});
afterAll(() => browser.close());

/** Where things stand in the print layout of an A4 sheet with the margins of the style sheet, in pages from 0. */
async function pagesOf(page: Page, selectors: readonly string[]): Promise<readonly number[]> {
  const bytes = await page.pdf({ preferCSSPageSize: true, format: 'A4' });
  expect(bytes.subarray(0, 5).toString()).toBe('%PDF-');
  await page.emulateMedia({ media: 'print' });
  await page.setViewportSize({ width: 673, height: 1001 });
  return page.evaluate(
    (list) => list.map((one) => document.querySelector(one)?.getBoundingClientRect().height ?? 0),
    selectors,
  );
}

describe('the report on paper', () => {
  it('keeps question, answer and outcomes on one sheet, map and chances on the next', async () => {
    const { page, close } = await open(browser, html);
    const heights = await pagesOf(page, ['header', '#answer', '#outcomes', '#map', '#chances']);
    const [header = 0, answer = 0, outcomes = 0, map = 0, chances = 0] = heights;
    for (const height of heights) expect(height).toBeGreaterThan(50);
    expect(header + answer + outcomes).toBeLessThan(1001);
    expect(map + chances).toBeLessThan(1001);
    await close();
  });

  it('keeps the summary on two sheets with eight outcomes: four of them first, three curves, and all others behind', async () => {
    const more = ['adult', 'yearling', 'newborn', 'all'].map(
      (of, k) =>
        `  another outcome of this model, number ${k + 4}: { of: ${of.startsWith('[') ? of : `[${of}]`}, below: ${30 + k} }\n`,
    );
    const text = modelText('reed-hare').replace(
      '\noutcomes:\n',
      `\noutcomes:\n${more.join('').replace('[all]', 'all')}`,
    );
    const compiled = compileText(text, { replicates: 64 });
    expect(compiled.model.outcomes.length).toBe(8);
    const { page, close } = await open(browser, reportOf(compiled, { pageScript: await pageScript() }));
    const [header = 0, answer = 0, outcomes = 0] = await pagesOf(page, ['header', '#answer', '#outcomes']);
    expect(header + answer + outcomes).toBeLessThan(1001);
    expect(await page.locator('#outcomes tbody:visible').count()).toBe(4);
    expect(await page.locator('.pages .outcomes tbody:visible').count()).toBe(4);
    expect(await page.locator('#outcomes .note').textContent()).toBe(
      'The other 4 outcomes stand behind the map and the chances.',
    );
    const figures = await page.evaluate(() => {
      const top = document.querySelector('#map')!.getBoundingClientRect().top;
      return [...document.querySelectorAll('#chances figure')].map((one) => one.getBoundingClientRect().bottom - top);
    });
    expect(figures.length).toBe(8);
    for (const bottom of figures.slice(0, 3)) expect(bottom).toBeLessThan(1001);
    expect(
      await page
        .locator('#chances figure')
        .nth(3)
        .evaluate((one) => getComputedStyle(one).breakBefore),
    ).toBe('page');
    await close();
    const screen = await open(browser, reportOf(compiled));
    expect(await screen.page.locator('.outcomes tbody:visible').count()).toBe(8);
    expect(await screen.page.locator('.paper:visible').count()).toBe(0);
    await screen.close();
  });

  it('prints what is folded away on a screen, and no controls', async () => {
    const { page, close } = await open(browser, html);
    await page.emulateMedia({ media: 'print' });
    expect(await page.locator('pre').isVisible()).toBe(true);
    expect(await page.locator('#play').isVisible()).toBe(false);
    expect(await page.locator('nav').isVisible()).toBe(false);
    await close();
  });
});

describe('the report in grey', () => {
  it('keeps every text at 4.5 to 1 and every outline at 3 to 1 against what lies behind it', async () => {
    const { page, close } = await open(browser, html);
    const pairs = await page.evaluate(() => {
      const seen = new Set<string>();
      for (const element of document.querySelectorAll('body *')) {
        if (element.closest('svg') !== null || (element.textContent ?? '').trim() === '') continue;
        let behind: Element | null = element;
        let back = 'rgba(0, 0, 0, 0)';
        while (behind !== null && back === 'rgba(0, 0, 0, 0)') {
          back = getComputedStyle(behind).backgroundColor;
          behind = behind.parentElement;
        }
        seen.add(`${getComputedStyle(element).color}|${back}`);
      }
      for (const text of document.querySelectorAll('svg text'))
        seen.add(`${getComputedStyle(text).fill}|rgb(251, 251, 247)`);
      return [...seen];
    });
    expect(pairs.length).toBeGreaterThan(3);
    for (const pair of pairs) expect([pair, contrast(pair) >= 4.5]).toEqual([pair, true]);
    await close();
  });
});

function contrast(pair: string): number {
  const [a = 0, b = 0] = pair.split('|').map(luminance);
  return (Math.max(a, b) + 0.05) / (Math.min(a, b) + 0.05);
}

/** Relative luminance of WCAG 2.2. */
function luminance(colour: string): number {
  const [r = 0, g = 0, b = 0] = (colour.match(/[\d.]+/g) ?? []).map((text) => {
    const share = Number(text) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}
