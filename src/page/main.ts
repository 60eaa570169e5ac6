// Brings the report to life in a browser: the page is whole without this, and nothing here asks for anything from outside.
import type { ReportView } from '../view/contract.ts';
import { eachElement, whenIdle } from './arrival.ts';
import { mountFigures } from './figures.ts';
import { mountReaders } from './reader.ts';
import { mountSave } from './save.ts';
import { mountPlans } from './plans.ts';
import { createStore } from './state.ts';
import { mountTip } from './tip.ts';
import { mountWalk } from './walk.ts';
import { mountYear } from './year.ts';

function start(view: ReportView): void {
  const store = createStore({ count: view.years.length - 1, show: 'abundance', focus: 0, marked: null });
  const redraw = mountFigures(view);
  store.onChange((state) => redraw(state));
  mountYear(view, store);
  mountReaders(view, store);
  mountSave(view, () => redraw(store.get(), true));
  mountPlans(view, store);
  mountTip(view, store);
  mountWalk(store);
  window.matchMedia('(max-width: 40rem)').addEventListener('change', () => redraw(store.get()));
  window.addEventListener('beforeprint', () => redraw(store.get(), true));
  wakeMap(() => redraw(store.get()));
  eachElement('.controls', (controls) => (controls.hidden = false));
}

/**
 * The map as it was written is right. What it lacks is a stop for the keyboard and words at each patch, for which it is drawn
 * again: when the reader comes near it, or else when the browser rests.
 */
function wakeMap(wake: () => void): void {
  document.querySelector('#map-figure')?.addEventListener('pointerover', wake, { once: true, capture: true });
  document.addEventListener('keydown', ({ key }) => void (key === 'Tab' && wake()), { capture: true });
  whenIdle(wake);
}

const data = document.querySelector('#view')?.textContent ?? '';
const view: ReportView = JSON.parse(data);
start(view);
