// The script runs right behind the map, while the browser still reads the rest of a long page.

/** Once the whole document is there. */
export function whenWhole(act: () => void): void {
  if (document.readyState === 'loading') document.addEventListener('DOMContentLoaded', act, { once: true });
  else act();
}

/** Once for each element that the selector finds: at once for those that stand above the script, later for all others. */
export function eachElement(selector: string, mount: (element: HTMLElement) => void): void {
  const mounted = new Set<HTMLElement>();
  const mountNew = (): void => {
    for (const element of document.querySelectorAll<HTMLElement>(selector)) {
      if (mounted.has(element)) continue;
      mounted.add(element);
      mount(element);
    }
  };
  mountNew();
  whenWhole(mountNew);
}

/** When the whole document is there and the browser has nothing else to do. */
export function whenIdle(act: () => void): void {
  whenWhole(() => {
    // Safari has none.
    if ('requestIdleCallback' in window) window.requestIdleCallback(act);
    else setTimeout(act, 200);
  });
}
