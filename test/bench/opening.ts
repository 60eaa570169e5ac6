// How long a reader waits for a page in a real browser, from disk.
import { pathToFileURL } from 'node:url';
import type { Browser } from 'playwright-core';
import { launch } from '../page/browser.ts';
import { openBare } from './bare-page.ts';
import { median } from './measure.ts';
import { pressAtOnce, type Pressed } from './press.ts';

/** Milliseconds. */
export interface OpeningTimes {
  /** From asking for the page until a slider that was moved as soon as it could be has shown its year on the map. */
  readonly opening: number;
  /** From asking for the page until every control works. */
  readonly whole: number;
  /** The longest time for which nothing that a reader does is answered. */
  readonly longest: number;
  /** From a later step of the slider until the picture of that year is painted. */
  readonly step: number;
}

export async function measureOpening(file: string, rounds: number): Promise<OpeningTimes> {
  const browser = await launch();
  try {
    await measureOnce(browser, file);
    const times: Pressed[] = [];
    for (let round = 0; round < rounds; round++) times.push(await measureOnce(browser, file));
    const of = (part: keyof Pressed): number => median(times.map((one) => one[part]));
    return { opening: of('opening'), whole: of('whole'), longest: of('longest'), step: of('step') };
  } finally {
    await browser.close();
  }
}

async function measureOnce(browser: Browser, file: string): Promise<Pressed> {
  const page = await openBare(browser, `(${pressAtOnce.toString()})()`);
  try {
    await page.open(pathToFileURL(file).href);
    for (let waited = 0; waited < 60_000; waited += 200) {
      await new Promise((resolve) => setTimeout(resolve, 200));
      const told = await page.evaluate('window.pressed ?? ""');
      if (typeof told === 'string' && told !== '') return JSON.parse(told);
    }
  } finally {
    await page.close();
  }
  throw new Error(`The controls of ${file} did not come to work within a minute.`);
}
