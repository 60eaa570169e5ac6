// The keyboard on the map: one stop for Tab, then the arrow keys go to the nearest patch that way.
import type { Store } from './state.ts';

interface Spot {
  readonly patch: number;
  readonly x: number;
  readonly y: number;
}

const directions: Readonly<Record<string, readonly [number, number]>> = {
  ArrowRight: [1, 0],
  ArrowLeft: [-1, 0],
  ArrowDown: [0, 1],
  ArrowUp: [0, -1],
};

export function mountWalk(store: Store): void {
  const figure = document.querySelector('#map-figure');
  figure?.addEventListener('focusin', (event) => {
    const patch = patchOf(event.target);
    if (patch !== null && patch !== store.get().focus) store.set({ focus: patch });
  });
  figure?.addEventListener('keydown', (event) => {
    if (!(event instanceof KeyboardEvent) || patchOf(event.target) === null) return;
    const holder = event.target instanceof Element ? event.target.closest('[data-figure]') : null;
    const next = holder === null ? null : target(event.key, patchOf(event.target), spots(holder));
    if (holder === null || next === null) return;
    event.preventDefault();
    store.set({ focus: next });
    holder.querySelector<SVGElement>(`[data-patch="${next}"]`)?.focus();
  });
}

function patchOf(target: EventTarget | null): number | null {
  const text = target instanceof Element ? target.getAttribute('data-patch') : null;
  return text === null ? null : Number(text);
}

function spots(holder: Element): readonly Spot[] {
  return [...holder.querySelectorAll('[data-patch]')]
    .map((element) => {
      const number = (name: string) => Number(element.getAttribute(name) ?? 0);
      return { patch: number('data-patch'), x: number('data-x'), y: number('data-y') };
    })
    .sort((a, b) => a.patch - b.patch);
}

function target(key: string, from: number | null, all: readonly Spot[]): number | null {
  if (key === 'Home') return all[0]?.patch ?? null;
  if (key === 'End') return all[all.length - 1]?.patch ?? null;
  const here = all.find((spot) => spot.patch === from);
  const direction = directions[key];
  if (here === undefined || direction === undefined) return null;
  const ahead = all
    .map((spot) => ({ spot, cost: effort(here, spot, direction) }))
    .filter(({ cost }) => Number.isFinite(cost))
    .sort((a, b) => a.cost - b.cost);
  return ahead[0]?.spot.patch ?? here.patch;
}

/** Distance ahead, with what lies aside counted double; infinite for what lies behind. */
function effort(here: Spot, spot: Spot, [dx, dy]: readonly [number, number]): number {
  const [x, y] = [spot.x - here.x, spot.y - here.y];
  const ahead = x * dx + y * dy;
  const aside = Math.abs(x * dy) + Math.abs(y * dx);
  return ahead > 0.5 ? ahead + 2 * aside : Infinity;
}
