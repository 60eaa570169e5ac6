// The numbers of a patch or a band beside the pointer or the focus. The pointer may go onto them; Escape takes them away.
import type { ReportView } from '../view/contract.ts';
import { linkLine, patchLines } from '../view/map/words.ts';
import { mark, type Markup } from '../view/markup.ts';
import { pick } from '../view/series.ts';
import { morph } from './morph.ts';
import type { Store } from './state.ts';

const things = '[data-patch],[data-link]';

export function mountTip(view: ReportView, store: Store): void {
  const figure = document.querySelector<HTMLElement>('#map-figure');
  if (figure === null) return;
  const tip = document.createElement('div');
  tip.className = 'tip';
  tip.setAttribute('aria-hidden', 'true');
  tip.hidden = true;
  document.body.append(tip);
  let shown: Element | null = null;
  const show = (thing: Element | null) => {
    shown = thing;
    tip.hidden = thing === null;
    if (thing === null) return;
    morph(tip, words(view, thing, store.get().count));
    place(tip, thing);
  };
  figure.addEventListener('pointerover', (event) => {
    if (event.pointerType === 'mouse') show(thingAt(event.target));
  });
  figure.addEventListener('pointerleave', (event) => {
    if (event.relatedTarget !== tip) show(null);
  });
  tip.addEventListener('pointerleave', () => show(null));
  figure.addEventListener('focusin', (event) => show(thingAt(event.target)));
  figure.addEventListener('focusout', () => show(null));
  document.addEventListener('click', (event) => show(thingAt(event.target)));
  document.addEventListener('keydown', (event) => {
    if (event.key === 'Escape') show(null);
  });
  store.onChange(() => {
    if (shown?.isConnected === true) show(shown);
  });
}

function thingAt(target: EventTarget | null): Element | null {
  return target instanceof Element ? target.closest(things) : null;
}

function words(view: ReportView, thing: Element, count: number): Markup {
  const [patch, link] = [thing.getAttribute('data-patch'), thing.getAttribute('data-link')];
  if (patch !== null) {
    const index = Number(patch);
    const lines = patchLines(view, index, count).map((line) => mark`<span>${line}</span>`);
    return mark`<strong>${pick(view.patches, index).name}, ${String(pick(view.years, count))}</strong>${lines}`;
  }
  return mark`<span>${linkLine(view, pick(view.links, Number(link)), count)}</span>`;
}

/** Just under the thing, or over it where the window ends. */
function place(tip: HTMLElement, thing: Element): void {
  const box = thing.getBoundingClientRect();
  const [width, height] = [tip.offsetWidth, tip.offsetHeight];
  const left = Math.max(
    4,
    Math.min(box.left + box.width / 2 - width / 2, document.documentElement.clientWidth - width - 4),
  );
  const below = box.bottom + height + 8 < window.innerHeight;
  const top = below ? box.bottom + 2 : box.top - height - 2;
  tip.style.left = `${left + window.scrollX}px`;
  tip.style.top = `${Math.max(0, top + window.scrollY)}px`;
}
