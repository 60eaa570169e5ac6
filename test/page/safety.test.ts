// Whatever a model's author writes is only text in the page: it is shown as written and never run.
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launch, open } from './browser.ts';
import { reportPage } from './report-page.ts';

const nasty =
  '</script></title></style><img src=x onerror=alert(1)><svg onload=alert(2)>"\'`&amp;{{1+1}}${alert(3)}]]>-->';

let browser: Browser;
let html: string;

beforeAll(async () => {
  const names = ['a', 'b', 'c', 'd', 'e', 'f', 'g', 'h'].map((letter) => `${nasty}${letter}`);
  [browser, html] = await Promise.all([launch(), reportPage({ text: nasty, names })]);
});
afterAll(() => browser.close());

describe('hostile text in a model', () => {
  it('is shown as it was written and runs nothing', async () => {
    const { page, complaints, close } = await open(browser, html);
    expect(await page.locator('h1').textContent()).toBe(nasty);
    expect(await page.title()).toBe(`${nasty}: decision report`);
    expect(await page.locator('pre').textContent()).toBe(nasty);
    expect(await page.locator('img, body > svg, [onerror], [onload]').count()).toBe(0);
    expect(complaints).toEqual([]);
    await close();
  });

  it('stays text when the script draws it again', async () => {
    const { page, complaints, close } = await open(browser, html);
    await page.locator('summary', { hasText: 'numbers of the map' }).click();
    await page.locator('#year').focus();
    await page.keyboard.press('Home');
    await page.locator('.wide [data-patch][tabindex="0"]').focus();
    expect(await page.locator('.tip strong').textContent()).toBe(`${nasty}f, 2026`);
    expect(await page.locator('#map-tables tbody th').first().textContent()).toBe(`${nasty}f`);
    expect(await page.locator('img, [onerror], [onload]').count()).toBe(0);
    expect(complaints).toEqual([]);
    await close();
  });

  it('would not run even if it came in: the policy stops scripts, styles, pictures and requests that are not the page’s own', async () => {
    const { page, complaints, close } = await open(browser, html);
    await page.evaluate(() => {
      const holder = document.createElement('div');
      holder.innerHTML = '<img src="https://example.invalid/x.png" onerror="document.title = 1">';
      const script = document.createElement('script');
      script.textContent = 'document.title = "run"';
      document.body.append(holder, script);
    });
    await page.waitForTimeout(100);
    expect(await page.title()).toBe(`${nasty}: decision report`);
    expect(complaints.filter((text) => text.startsWith('stopped'))).toEqual([
      'stopped: https://example.invalid/x.png csp',
    ]);
    expect(complaints.filter((text) => text.includes('Content Security Policy')).length).toBeGreaterThan(2);
    await close();
  });
});
