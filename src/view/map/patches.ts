// The patches of the map: circles with counted dots, or on the ramp. Large ones lie beneath, so that none is hidden.
import { mark, type Markup } from '../markup.ts';
import { of100 } from '../number.ts';
import { deep, ink, inkOn, ramp, softInk } from '../palette.ts';
import { largest, pick } from '../series.ts';
import { dotPath } from './discs.ts';
import type { Sheet } from './sheet.ts';
import { patchLines } from './words.ts';

export function drawPatches(sheet: Sheet): Markup {
  const order = sheet.view.patches.map((_, p) => p);
  order.sort((a, b) => pick(sheet.discs.radius, b) - pick(sheet.discs.radius, a));
  return mark`<g>${order.map((p) => patch(sheet, p))}</g>`;
}

function patch(sheet: Sheet, p: number): Markup {
  const { view, state } = sheet;
  const said = [pick(view.patches, p).name, ...patchLines(view, p, state.count)].join('. ');
  const { x, y, radius } = disc(sheet, p);
  const halo = mark`<circle class="halo" cx="${x}" cy="${y}" r="${radius + 5}" fill="none" stroke="none"/>`;
  if (state.focus === null) return mark`<g><title>${said}</title>${filling(sheet, p)}</g>`;
  const stop = state.focus === p ? '0' : '-1';
  return mark`<g class="patch" role="img" tabindex="${stop}" data-patch="${String(p)}" aria-label="${said}">
${halo}${filling(sheet, p)}</g>`;
}

function disc({ placing, discs }: Sheet, p: number) {
  const [x, y] = pick(placing.points, p);
  return { x, y, radius: pick(discs.radius, p) };
}

function filling(sheet: Sheet, p: number): Markup {
  const { empty } = pick(sheet.view.patches, p);
  if (sheet.state.show === 'empty' && empty !== null) return chanceDisc(sheet, p, pick(empty, sheet.state.count));
  return sheet.discs.perDot === null ? fullnessDisc(sheet, p) : dottedDisc(sheet, p, sheet.discs.perDot);
}

function chanceDisc(sheet: Sheet, p: number, chance: number): Markup {
  const { x, y, radius } = disc(sheet, p);
  const number =
    radius < 13
      ? null
      : mark`<text x="${x}" y="${y + 4.5}" text-anchor="middle" fill="${inkOn(chance)}">${briefly(chance)}</text>`;
  return mark`<circle cx="${x}" cy="${y}" r="${radius}" fill="${ramp(chance)}" stroke="${ink}"/>${number}`;
}

/** Of 100, short enough for a circle. */
function briefly(chance: number): string {
  const futures = of100(chance);
  return { none: '0', all: '100', 'fewer than 1': '<1', 'more than 99': '>99' }[futures] ?? futures;
}

function fullnessDisc(sheet: Sheet, p: number): Markup {
  const { x, y, radius } = disc(sheet, p);
  const { fan, capacity } = pick(sheet.view.patches, p);
  const share = pick(fan.median, sheet.state.count) / Math.max(capacity ?? largest(fan.p95), 1e-9);
  const fill = ramp(Math.min(1, share));
  return mark`<circle cx="${x}" cy="${y}" r="${radius}" fill="${fill}" stroke="${ink}" stroke-width="0.75"/>`;
}

function dottedDisc(sheet: Sheet, p: number, perDot: number): Markup {
  const { x, y, radius } = disc(sheet, p);
  const { dotRadius, slots } = sheet.discs;
  const median = pick(pick(sheet.view.patches, p).fan.median, sheet.state.count);
  const count = Math.round(median / perDot);
  const path = dotPath(count, pick(slots, p), radius, [x, y]);
  const ground = mark`<circle cx="${x}" cy="${y}" r="${radius}" fill="#fff" stroke="${softInk}"/>`;
  const dots = mark`<path d="${path}" stroke="${deep}" stroke-width="${dotRadius * 2}" stroke-linecap="round" fill="none"/>`;
  if (count > 0 || median === 0) return mark`${ground}${dots}`;
  return mark`${ground}${dots}<circle cx="${x}" cy="${y}" r="${dotRadius}" fill="none" stroke="${deep}"/>`;
}
