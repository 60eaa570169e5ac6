// A real browser on a page written to disk. Chromium is found on the PATH, or named by CHROMIUM.
import { mkdtempSync, rmSync, writeFileSync, accessSync, constants } from 'node:fs';
import { tmpdir } from 'node:os';
import { delimiter, join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { chromium, type Browser, type BrowserContextOptions, type Page } from 'playwright-core';

const names = ['chromium', 'chromium-browser', 'google-chrome-stable', 'google-chrome'];
const quiet = ['--headless', '--no-sandbox', '--disable-gpu', '--disable-background-networking'];
quiet.push('--disable-component-update', '--disable-sync', '--no-first-run');

export function findBrowser(): string {
  const named = process.env['CHROMIUM'];
  const folders = (process.env['PATH'] ?? '').split(delimiter);
  const candidates = [
    ...(named === undefined ? [] : [named]),
    ...folders.flatMap((folder) => names.map((name) => join(folder, name))),
  ];
  const found = candidates.find((path) => {
    try {
      accessSync(path, constants.X_OK);
      return true;
    } catch {
      return false;
    }
  });
  if (found === undefined) throw new Error('no Chromium on the PATH; name one with CHROMIUM=/path/to/chromium');
  return found;
}

export function launch(): Promise<Browser> {
  return chromium.launch({ executablePath: findBrowser(), args: quiet });
}

export interface OpenPage {
  readonly page: Page;
  /** Everything that went wrong or tried to leave the page. */
  readonly complaints: string[];
  close(): Promise<void>;
}

/** Opens the text from disk, offline, and listens for errors, dialogs and requests. */
export async function open(browser: Browser, html: string, options: BrowserContextOptions = {}): Promise<OpenPage> {
  const folder = mkdtempSync(join(tmpdir(), 'skein-page-'));
  const file = join(folder, 'report.html');
  writeFileSync(file, html);
  const address = pathToFileURL(file).href;
  const context = await browser.newContext({ offline: true, ...options });
  const page = await context.newPage();
  const complaints: string[] = [];
  page.on('pageerror', (error) => complaints.push(`error: ${error.message}`));
  page.on('console', (message) => complaints.push(`console: ${message.text()}`));
  page.on('dialog', (dialog) => {
    complaints.push(`dialog: ${dialog.message()}`);
    void dialog.dismiss();
  });
  page.on('request', (request) => {
    const url = request.url();
    if (url !== address && !/^(data|blob):/.test(url)) complaints.push(`request: ${url}`);
  });
  page.on('requestfailed', (request) =>
    complaints.push(`stopped: ${request.url()} ${request.failure()?.errorText ?? ''}`),
  );
  await page.goto(address);
  const close = async () => {
    await context.close();
    rmSync(folder, { recursive: true, force: true });
  };
  return { page, complaints, close };
}
