// Charts that can be read year by year: each is a slider for the keyboard, and follows the pointer or the finger.
import type { ReportView } from '../view/contract.ts';
import { readAbundance, readChance, readObserved, readPatches, readPlans } from '../view/reading.ts';
import { pick } from '../view/series.ts';
import { eachElement } from './arrival.ts';
import { sizeOf } from './figures.ts';
import type { PageState, Store } from './state.ts';

export function mountReaders(view: ReportView, store: Store): void {
  eachElement('figure.chart, .smalls', (figure) => {
    const drawn = [
      ...figure.querySelectorAll<HTMLElement>('[data-figure=fan], [data-figure=chance], [data-figure=observed]'),
    ];
    const readout = document.createElement('p');
    readout.className = 'readout';
    readout.textContent = 'Point, tap, or use the arrow keys to read a year.';
    (drawn[drawn.length - 1] ?? figure).after(readout);
    for (const holder of drawn.length > 0 ? drawn : [figure]) mountReader(holder, readout, view, store);
  });
}

function mountReader(holder: HTMLElement, readout: HTMLElement, view: ReportView, store: Store): void {
  const last = view.years.length - 1;
  makeSlider(holder, last);
  holder.addEventListener('keydown', (event) => {
    const marked = moved(event.key, store.get().marked ?? last, last);
    if (marked === null) return;
    event.preventDefault();
    store.set({ marked });
  });
  const follow = (event: PointerEvent) => {
    const marked = countAt(event, holder, last);
    if (marked !== null && marked !== store.get().marked) store.set({ marked });
  };
  holder.addEventListener('pointermove', follow);
  holder.addEventListener('pointerdown', follow);
  store.onChange((state) => tell(holder, readout, view, state));
  tell(holder, readout, view, store.get());
}

function makeSlider(holder: HTMLElement, last: number): void {
  const name = holder.querySelector('svg title')?.textContent ?? '';
  holder.tabIndex = 0;
  holder.setAttribute('role', 'slider');
  holder.setAttribute('aria-label', labelOf(holder.classList) ?? name);
  holder.setAttribute('aria-valuemin', '0');
  holder.setAttribute('aria-valuemax', String(last));
  holder.setAttribute('aria-valuenow', String(last));
}

function labelOf(classes: DOMTokenList): string | null {
  if (classes.contains('plans')) return 'Chance under each plan';
  return classes.contains('smalls') ? 'Abundance patch by patch' : null;
}

function moved(key: string, from: number, last: number): number | null {
  const steps: Readonly<Record<string, number>> = {
    ArrowRight: 1,
    ArrowUp: 1,
    ArrowLeft: -1,
    ArrowDown: -1,
    PageUp: 10,
    PageDown: -10,
    Home: -last,
    End: last,
  };
  const step = steps[key];
  return step === undefined ? null : Math.max(0, Math.min(last, from + step));
}

function countAt(event: PointerEvent, holder: HTMLElement, last: number): number | null {
  const cell = event.target instanceof Element ? event.target.closest('[data-figure]') : null;
  const svg = (cell ?? holder).querySelector('svg');
  const [left, right] = [Number(svg?.dataset['left'] ?? NaN), Number(svg?.dataset['right'] ?? NaN)];
  if (svg === null || Number.isNaN(left) || Number.isNaN(right)) return null;
  const box = svg.getBoundingClientRect();
  const x = ((event.clientX - box.left) / box.width) * sizeOf(cell ?? holder).width;
  return Math.max(0, Math.min(last, Math.round(((x - left) / (right - left)) * last)));
}

function tell(holder: HTMLElement, readout: HTMLElement, view: ReportView, { marked }: PageState): void {
  if (marked === null) return;
  const text = sentence(holder, view, marked);
  readout.textContent = text;
  holder.setAttribute('aria-valuenow', String(marked));
  holder.setAttribute('aria-valuetext', text);
}

function sentence(holder: HTMLElement, view: ReportView, marked: number): string {
  if (holder.dataset['figure'] === 'fan') return readAbundance(view, marked);
  if (holder.dataset['figure'] === 'observed' && view.observed !== undefined) {
    return readObserved(view, view.observed, marked);
  }
  if (holder.classList.contains('plans')) return readPlans(view, 0, marked);
  if (holder.dataset['figure'] !== 'chance') return readPatches(view, marked);
  return readChance(view, pick(view.outcomes, Number(holder.dataset['index'] ?? 0)), marked);
}
