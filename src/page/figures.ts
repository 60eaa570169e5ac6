// Every figure of the page, drawn again from the same functions that drew the report.
import { drawAbundance } from '../view/abundance.ts';
import { drawChance } from '../view/chance.ts';
import type { ReportView, Size } from '../view/contract.ts';
import { drawMap } from '../view/map/draw.ts';
import { layOut, type Layout } from '../view/map/sheet.ts';
import type { Markup } from '../view/markup.ts';
import { drawObserved } from '../view/observed.ts';
import { pick } from '../view/series.ts';
import { drawSmallChance, smallChanceOf } from '../view/plans/small-chance.ts';
import { drawSmallFan } from '../view/small-fan.ts';
import { eachElement } from './arrival.ts';
import { morph } from './morph.ts';
import type { PageState } from './state.ts';

/** Redraws what can be seen, or everything. */
export type Redraw = (state: PageState, all?: boolean) => void;

/**
 * A figure is drawn again only where what it shows has changed, and only once it can be seen: a page of hundreds of patches
 * answers as quickly as one of eight. The layout of a map does not change from year to year; it is worked out once.
 */
export function mountFigures(view: ReportView): Redraw {
  const layouts = new Map<string, Layout>();
  const layoutFor = (width: number, plan: string | undefined): Layout => {
    const key = `${width} ${plan ?? ''}`;
    const layout = layouts.get(key) ?? layOut(viewOf(view, plan), width);
    layouts.set(key, layout);
    return layout;
  };
  const asWritten = { count: view.years.length - 1, show: 'abundance', focus: null, marked: null } as const;
  const drawn = new Map<HTMLElement, string>();
  let now: PageState = asWritten;
  const isStale = (holder: HTMLElement): boolean => drawn.get(holder) !== dependsOn(holder, now);
  const refresh = (holder: HTMLElement): void => {
    if (!isStale(holder)) return;
    drawn.set(holder, dependsOn(holder, now));
    const markup = draw(view, now, holder, layoutFor);
    if (markup !== null) morph(holder, markup);
  };
  const sight = observeSight(refresh);
  eachElement('[data-figure]', (holder) => {
    drawn.set(holder, dependsOn(holder, asWritten));
    sight.watch(holder);
    if (sight.has(holder)) refresh(holder);
  });
  return (state, all = false) => {
    now = state;
    for (const holder of drawn.keys()) if (isStale(holder) && (all || sight.has(holder))) refresh(holder);
  };
}

/** What of the state a figure shows. */
function dependsOn(holder: HTMLElement, state: PageState): string {
  if (holder.dataset['figure'] !== 'map') return String(state.marked);
  const { count, show, focus } = mapState(state, holder);
  return `${count} ${show} ${String(focus)} ${holder.dataset['plan'] ?? ''}`;
}

interface Sight {
  watch(holder: HTMLElement): void;
  has(holder: HTMLElement): boolean;
}

/** Calls for each small figure that comes into sight. All others are in sight where the style sheet shows them. */
function observeSight(appear: (holder: HTMLElement) => void): Sight {
  const small = new Set<Element>();
  const seen = new Set<Element>();
  const observer = new IntersectionObserver(
    (entries) => {
      for (const { target, isIntersecting } of entries) {
        if (isIntersecting) seen.add(target);
        else seen.delete(target);
        if (isIntersecting && target instanceof HTMLElement) appear(target);
      }
    },
    { rootMargin: '300px' },
  );
  return {
    watch(holder) {
      if (holder.closest('.smalls') === null) return;
      small.add(holder);
      observer.observe(holder);
    },
    // Asks for no box: the whole page would have to be laid out for it.
    has: (holder) => (small.has(holder) ? seen.has(holder) : getComputedStyle(holder).display !== 'none'),
  };
}

function draw(
  view: ReportView,
  state: PageState,
  holder: HTMLElement,
  layoutFor: (width: number, plan: string | undefined) => Layout,
): Markup | null {
  const index = Number(holder.dataset['index'] ?? 0);
  const marked = state.marked === null ? null : pick(view.years, state.marked);
  switch (holder.dataset['figure']) {
    case 'map':
      return drawMap(mapState(state, holder), layoutFor(Number(holder.dataset['width']), holder.dataset['plan']));
    case 'small-chance':
      return smallChance(view, holder, state);
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

/** Of a plan by its place, or of its difference from another, such as '2-0'. */
function viewOf(view: ReportView, plan: string | undefined): ReportView {
  if (plan === undefined) return view;
  const [own, minus] = plan.split('-').map((place) => view.plans?.[Number(place)]);
  return { ...(own?.view ?? view), ...(minus === undefined ? {} : { minus }) };
}

/** Maps of plans stand still beside the one that the keyboard walks on. */
function mapState(state: PageState, holder: HTMLElement): PageState {
  const plan = holder.dataset['plan'];
  if (plan === undefined) return state;
  return { ...state, focus: null, show: plan.includes('-') ? 'difference' : state.show };
}

function smallChance(view: ReportView, holder: HTMLElement, { marked }: PageState): Markup | null {
  if (view.plans === undefined) return null;
  const [plan, outcome] = [Number(holder.dataset['index'] ?? 0), Number(holder.dataset['outcome'] ?? 0)];
  return drawSmallChance(smallChanceOf(view, view.plans, { plan, outcome, marked }), sizeOf(holder));
}

/** As it was drawn in the report. */
export function sizeOf(holder: Element): Size {
  const box = holder.querySelector('svg')?.viewBox.baseVal;
  return { width: box?.width ?? 0, height: box?.height ?? 0 };
}
