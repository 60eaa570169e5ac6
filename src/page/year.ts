// The year of the map: its slider, its play button and what it shows.
import { mapShows, type ReportView } from '../view/contract.ts';
import { mapTables } from '../view/map/table.ts';
import { pick } from '../view/series.ts';
import { readAbundance } from '../view/reading.ts';
import { eachElement } from './arrival.ts';
import { morph } from './morph.ts';
import type { PageState, Store } from './state.ts';

const milliseconds = 420;

export function mountYear(view: ReportView, store: Store): void {
  const slider = document.querySelector<HTMLInputElement>('#year');
  const play = document.querySelector<HTMLButtonElement>('#play');
  const shown = document.querySelector<HTMLOutputElement>('#year-shown');
  if (slider === null || play === null || shown === null) return;
  const player = createPlayer(store, view.years.length - 1, play);
  slider.addEventListener('input', () => {
    player.stop();
    store.set({ count: Number(slider.value), marked: Number(slider.value) });
  });
  for (const choice of document.querySelectorAll<HTMLInputElement>('input[name=show]')) {
    choice.addEventListener('change', () => {
      store.set({ show: mapShows.find((show) => show === choice.value) ?? 'abundance' });
    });
  }
  store.onChange((state: PageState) => {
    slider.value = String(state.count);
    slider.setAttribute('aria-valuetext', readAbundance(view, state.count));
    shown.textContent = String(pick(view.years, state.count));
  });
  eachElement('#map-tables', (tables) => mountTables(tables, view, store));
}

/** Tables of hundreds of patches are drawn again only where they can be seen. */
function mountTables(tables: HTMLElement, view: ReportView, store: Store): void {
  let told = view.years.length - 1;
  const folder = tables.closest('details');
  const refresh = (): void => {
    const { count } = store.get();
    if (count === told || folder?.open === false) return;
    told = count;
    morph(tables, mapTables(view, count));
  };
  folder?.addEventListener('toggle', refresh);
  store.onChange(refresh);
  refresh();
}

function createPlayer(store: Store, last: number, button: HTMLButtonElement) {
  let timer: number | null = null;
  const stop = () => {
    if (timer !== null) window.clearInterval(timer);
    timer = null;
    button.setAttribute('aria-pressed', 'false');
    button.textContent = 'Play';
  };
  const next = () => {
    const count = store.get().count + 1;
    if (count <= last) store.set({ count, marked: count });
    if (count >= last) stop();
  };
  button.addEventListener('click', () => {
    if (timer !== null) return stop();
    if (store.get().count >= last) store.set({ count: 0, marked: 0 });
    timer = window.setInterval(next, milliseconds);
    button.setAttribute('aria-pressed', 'true');
    button.textContent = 'Pause';
  });
  return { stop };
}
