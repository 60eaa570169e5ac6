// What is done in the page that is timed. It is handed to the browser as text, so it names nothing outside itself.

/** Milliseconds. */
export interface Pressed {
  readonly opening: number;
  readonly whole: number;
  readonly longest: number;
  readonly step: number;
}

declare global {
  interface Window {
    /** `Pressed` as JSON, once all is measured. */
    pressed?: string;
  }
}

/** Moves the slider as soon as it can be moved, waits until all else works, and moves it again. */
export function pressAtOnce(): void {
  const pause = (): Promise<void> => new Promise((resolve) => setTimeout(resolve, 4));
  const painted = (): Promise<void> =>
    new Promise((resolve) => {
      requestAnimationFrame(() => void scheduler.postTask(resolve, { priority: 'user-blocking' }));
    });
  const slider = (): HTMLInputElement | null => {
    const found = document.querySelector<HTMLInputElement>('#year');
    const controls = found?.closest<HTMLElement>('.controls');
    return controls?.hidden === false ? (found ?? null) : null;
  };
  const move = async (input: HTMLInputElement, count: string): Promise<number> => {
    const before = document.querySelector('#map-figure svg > text')?.textContent;
    input.value = count;
    input.dispatchEvent(new Event('input', { bubbles: true }));
    const after = document.querySelector('#map-figure svg > text')?.textContent;
    if (after === before || after === undefined) throw new Error(`The map stayed at ${before ?? 'no year'}.`);
    await painted();
    return performance.now();
  };
  const allWork = (): boolean =>
    document.readyState !== 'loading' &&
    document.querySelector('.smalls[role=slider]') !== null &&
    document.querySelector('.smalls + .save, .smalls + .readout') !== null &&
    document.querySelector('[data-patch][tabindex="0"]') !== null;
  const tasks: number[] = [];
  new PerformanceObserver((list) => {
    for (const { duration } of list.getEntries()) tasks.push(duration);
  }).observe({ type: 'longtask', buffered: true });
  const measure = async (): Promise<void> => {
    if (!location.protocol.startsWith('file')) return;
    let input = slider();
    for (; input === null; input = slider()) await pause();
    const opening = await move(input, '1');
    while (!allWork()) await pause();
    const whole = performance.now();
    await new Promise((resolve) => setTimeout(resolve, 500));
    const longest = Math.max(0, ...tasks);
    const began = performance.now();
    const step = (await move(input, '2')) - began;
    window.pressed = JSON.stringify({ opening, whole, longest, step });
  };
  void measure();
}
