// The maps of two plans side by side: which plan each shows, or how the right one differs from the left.
import type { ReportView } from '../view/contract.ts';
import { whenWhole } from './arrival.ts';
import type { Store } from './state.ts';

export function mountPlans(view: ReportView, store: Store): void {
  whenWhole(() => mountChoices(view, store));
}

function mountChoices(view: ReportView, store: Store): void {
  const [left, right] = [select('#left-plan'), select('#right-plan')];
  const difference = document.querySelector<HTMLInputElement>('#plan-difference');
  if (view.plans === undefined || left === null || right === null || difference === null) return;
  const show = () => {
    for (const holder of document.querySelectorAll<HTMLElement>('[data-side]')) {
      holder.dataset['plan'] = planOf(holder.dataset['side'] ?? '', [left.value, right.value], difference.checked);
    }
    store.set({});
  };
  for (const input of [left, right, difference]) input.addEventListener('change', show);
}

function select(selector: string): HTMLSelectElement | null {
  return document.querySelector<HTMLSelectElement>(selector);
}

function planOf(side: string, [left, right]: readonly [string, string], difference: boolean): string {
  if (side === 'left') return left;
  return difference ? `${right}-${left}` : right;
}
