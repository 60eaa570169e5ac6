// Brings the report to life in a browser: the page is whole without this, and nothing here asks for anything from outside.
import type { ReportView } from '../view/contract.ts';
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
  for (const controls of document.querySelectorAll<HTMLElement>('.controls')) controls.hidden = false;
  store.set({});
}

const data = document.querySelector('#view')?.textContent ?? '';
const view: ReportView = JSON.parse(data);
start(view);
