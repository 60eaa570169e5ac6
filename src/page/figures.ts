// Every figure of the page, drawn again from the same functions that drew the report.
import { drawAbundance } from '../view/abundance.ts';
import { drawChance } from '../view/chance.ts';
import type { ReportView, Size } from '../view/contract.ts';
import { drawMap } from '../view/map/draw.ts';
import { layOut, type Layout } from '../view/map/sheet.ts';
import type { Markup } from '../view/markup.ts';
import { drawObserved } from '../view/observed.ts';
import { pick } from '../view/series.ts';
import { drawSmallFan } from '../view/small-fan.ts';
import { morph } from './morph.ts';
import type { PageState } from './state.ts';

function holders(): readonly HTMLElement[] {
  return [...document.querySelectorAll<HTMLElement>('[data-figure]')];
}

/** Redraws what can be seen, or everything. */
export type Redraw = (state: PageState, all?: boolean) => void;

/** The layout of a map does not change from year to year; it is worked out once. */
export function mountFigures(view: ReportView): Redraw {
  const layouts = new Map<number, Layout>();
  const layoutFor = (width: number): Layout => {
    const layout = layouts.get(width) ?? layOut(view, width);
    layouts.set(width, layout);
    return layout;
  };
  return (state, all = false) => {
    for (const holder of holders()) {
      if (!all && holder.getClientRects().length === 0) continue;
      const markup = draw(view, state, holder, layoutFor);
      if (markup !== null) morph(holder, markup);
    }
  };
}

function draw(
  view: ReportView,
  state: PageState,
  holder: HTMLElement,
  layoutFor: (width: number) => Layout,
): Markup | null {
  const index = Number(holder.dataset['index'] ?? 0);
  const marked = state.marked === null ? null : pick(view.years, state.marked);
  switch (holder.dataset['figure']) {
    case 'map':
      return drawMap(state, layoutFor(Number(holder.dataset['width'])));
    case 'chance':
      return drawChance({ outcome: pick(view.outcomes, index), years: view.years, marked }, sizeOf(holder));
    case 'fan':
      return drawAbundance(view, marked, sizeOf(holder));
    case 'observed':
      return view.observed === undefined ? null : drawObserved(view, view.observed, marked, sizeOf(holder));
    case 'observed-small': {
      const patch = view.observed?.patches[index];
      return patch === undefined ? null : drawSmallFan(patch, view.years, state.marked, sizeOf(holder));
    }
    case 'small':
      return drawSmallFan(pick(view.patches, index), view.years, state.marked, sizeOf(holder));
    default:
      return null;
  }
}

/** As it was drawn in the report. */
export function sizeOf(holder: Element): Size {
  const box = holder.querySelector('svg')?.viewBox.baseVal;
  return { width: box?.width ?? 0, height: box?.height ?? 0 };
}
