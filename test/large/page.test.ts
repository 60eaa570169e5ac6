// A landscape of 400 patches, six classes and a hundred years: its page stays light, opens, and draws only what can be seen.
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { launch, open } from '../page/browser.ts';
import { reportOf } from '../page/report-of.ts';
import { pageScript } from '../page/report-page.ts';
import { withoutScripts } from '../page/without-scripts.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { largeModel } from './landscape.ts';

let browser: Browser;
let html: string;

beforeAll(async () => {
  const { text, files } = largeModel({ patches: 400, classes: 6 });
  const compiled = compileText(text, { replicates: 16, years: 100 }, files);
  html = reportOf(compiled, { pageScript: await pageScript() });
  browser = await launch();
}, 300_000);
afterAll(() => browser.close());

test('is lighter than 5 MB, with a map and a curve of every patch', () => {
  expect(Buffer.byteLength(html)).toBeLessThan(5e6);
  expect(withoutScripts(html).match(/data-figure="small"/g)).toHaveLength(400);
});

test('draws a small curve again only once it comes into sight', async () => {
  const { page, complaints, close } = await open(browser, html);
  await expect.poll(() => page.locator('figure.map .wide [data-patch]').count(), { timeout: 60_000 }).toBe(400);
  const last = page.locator('.smalls [data-index="399"]');
  await last.evaluate((cell) => cell.setAttribute('data-before', cell.innerHTML));
  await page.locator('#year').focus();
  await page.keyboard.press('Home');
  expect(await page.locator('figure.map .wide svg > text').first().textContent()).toBe('2026');
  expect(await last.evaluate((cell) => cell.innerHTML === cell.getAttribute('data-before'))).toBe(true);
  await last.scrollIntoViewIfNeeded();
  await expect.poll(() => last.textContent(), { timeout: 60_000 }).toMatch(/ in 2026/);
  expect(complaints).toEqual([]);
  await close();
}, 180_000);
