// A long page answers before it is all there: the map's controls work while the browser still waits for what follows.
import { createServer, type Server, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { launch } from './browser.ts';
import { reportPage } from './report-page.ts';

let browser: Browser;
let first: string;
let rest: string;

beforeAll(async () => {
  let html: string;
  [browser, html] = await Promise.all([launch(), reportPage()]);
  const end = html.lastIndexOf('</script>') + '</script>'.length;
  [first, rest] = [html.slice(0, end), html.slice(end)];
});
afterAll(() => browser.close());

/** Sends the first part of the page; the rest when it is told to. */
async function serve(): Promise<{ server: Server; address: string; finish: () => void }> {
  let held: ServerResponse | null = null;
  const server = createServer((request, response) => {
    if (request.url !== '/') return void response.writeHead(404).end();
    response.writeHead(200, { 'content-type': 'text/html; charset=utf-8' });
    response.write(first);
    held = response;
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  return { server, address: `http://127.0.0.1:${port}/`, finish: () => void held?.end(rest) };
}

it('the map works before the rest has arrived, and what arrives later joins in', async () => {
  const { server, address, finish } = await serve();
  const page = await browser.newPage();
  const errors: string[] = [];
  page.on('pageerror', (error) => errors.push(error.message));
  await page.goto(address, { waitUntil: 'commit' });

  await page.locator('#year').focus();
  await page.keyboard.press('Home');
  expect(await page.locator('figure.map .wide svg > text').first().textContent()).toBe('2026');
  await page.locator('.wide [data-patch="0"]').hover();
  expect(await page.locator('.tip strong').textContent()).toBe('North fen, 2026');
  expect(await page.locator('figure.map .save button').count()).toBe(2);
  expect(await page.evaluate(() => document.readyState)).toBe('loading');
  expect(await page.locator('#map-tables, #chances').count()).toBe(0);

  finish();
  await page.waitForLoadState();
  await page.locator('summary', { hasText: 'numbers of the map' }).click();
  expect(await page.locator('#map-tables caption').first().textContent()).toBe('Patches in 2026 (females)');
  expect(await page.locator('#chances [role=slider]').first().getAttribute('aria-valuetext')).toMatch(/^2026: /);
  const small = page.locator('.smalls [data-index="0"]');
  await small.scrollIntoViewIfNeeded();
  await expect.poll(() => small.textContent()).toMatch(/ in 2026/);
  expect(await page.locator('figure, .smalls').count()).toBe(await page.locator('.save').count());
  expect(errors).toEqual([]);
  await page.close();
  server.close();
});
