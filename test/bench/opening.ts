// How long a reader waits for a page in a real browser, from disk.
import { readFileSync } from 'node:fs';
import { launch, open } from '../page/browser.ts';
import { median } from './measure.ts';

export interface OpeningTimes {
  /** Milliseconds from asking for the page until its controls work. */
  readonly opening: number;
  /** Milliseconds from a step of the slider until the picture of that year is painted. */
  readonly step: number;
}

export async function measureOpening(file: string, rounds: number): Promise<OpeningTimes> {
  const html = readFileSync(file, 'utf8');
  const browser = await launch();
  try {
    const times: OpeningTimes[] = [];
    for (let round = 0; round < rounds; round++) {
      const { page, close } = await open(browser, html);
      times.push(
        await page.evaluate(async () => {
          const painted = (): Promise<void> =>
            new Promise((resolve) => {
              requestAnimationFrame(() => {
                setTimeout(resolve);
              });
            });
          const [navigation] = performance.getEntriesByType('navigation');
          const opening = navigation instanceof PerformanceNavigationTiming ? navigation.domContentLoadedEventEnd : NaN;
          const slider = document.querySelector<HTMLInputElement>('#year');
          if (slider === null) throw new Error('The page has no slider.');
          const began = performance.now();
          slider.value = '1';
          slider.dispatchEvent(new Event('input', { bubbles: true }));
          await painted();
          return { opening, step: performance.now() - began };
        }),
      );
      await close();
    }
    return { opening: median(times.map((one) => one.opening)), step: median(times.map((one) => one.step)) };
  } finally {
    await browser.close();
  }
}
