// The patches of the map with counted dots, or on the ramp. Large ones lie beneath, so that none is hidden.
import { mark, type Markup } from '../markup.ts';
import { deep, inkOn, lossRamp, ramp } from '../palette.ts';
import { pick } from '../series.ts';
import { drawShape, drawTicks, edgeOf, type Shape } from './shape.ts';
import type { Sheet } from './sheet.ts';
import { differenceOf, shownIn } from './shown.ts';
import { patchLines } from './words.ts';

export function drawPatches(sheet: Sheet): Markup {
  const { shapes } = sheet.marks;
  const order = shapes.map((_, p) => p);
  order.sort((a, b) => pick(shapes, b).radius - pick(shapes, a).radius);
  return mark`<g>${order.map((p) => patch(sheet, p))}</g>`;
}

function patch(sheet: Sheet, p: number): Markup {
  const { view, state } = sheet;
  const said = [pick(view.patches, p).name, ...patchLines(view, p, state.count)].join('. ');
  // Where the page's script draws it again, the title gives way to the halo and all else stays.
  if (state.focus === null) return mark`<g><title>${said}</title>${drawn(sheet, p)}</g>`;
  const shape = pick(sheet.marks.shapes, p);
  const [x, y] = shape.at;
  const stop = state.focus === p ? '0' : '-1';
  return mark`<g class="patch" role="img" tabindex="${stop}" data-patch="${String(p)}" data-x="${x}" data-y="${y}" aria-label="${said}">${halo(shape)}${drawn(sheet, p)}</g>`;
}

/** Lies around a circle and beneath an outline. */
function halo(shape: Shape): Markup {
  if (shape.outline !== null) return drawShape(shape, mark`class="halo under" fill="none" stroke="none"`);
  return drawShape({ ...shape, radius: shape.radius + 5 }, mark`class="halo" fill="none" stroke="none"`);
}

function drawn(sheet: Sheet, p: number): Markup {
  const shape = pick(sheet.marks.shapes, p);
  const role = pick(sheet.view.patches, p).worth?.role ?? null;
  const heavy = sheet.state.show === 'role';
  const fill = fillOf(sheet, p);
  const ticks = role === 'source' ? drawTicks(shape, heavy) : null;
  return mark`${ticks}${drawShape(shape, mark`fill="${fill}" ${edgeOf(role, heavy)}`)}${inside(sheet, p)}`;
}

function fillOf(sheet: Sheet, p: number): string {
  const { share } = shownIn(sheet.view, sheet.state, p);
  if (share === null || hasDots(sheet)) return '#ffffff';
  const fewer = sheet.state.show === 'difference' && differenceOf(sheet.view, sheet.state.count, p) < 0;
  return fewer ? lossRamp(share) : ramp(share);
}

function hasDots({ state, marks }: Sheet): boolean {
  return state.show === 'abundance' && marks.perDot !== null;
}

function inside(sheet: Sheet, p: number): Markup | null {
  if (hasDots(sheet)) return dots(sheet, p);
  const { share, text } = shownIn(sheet.view, sheet.state, p);
  if (text === '' || !textFits(sheet, p, text)) return null;
  const [x, y] = pick(sheet.marks.shapes, p).at;
  return mark`<text x="${x}" y="${y + 4.5}" text-anchor="middle" fill="${inkOn(share ?? 0)}">${text}</text>`;
}

/** Words and numbers that find no room inside stand behind the name of the patch. */
export function textFits({ marks }: Sheet, p: number, text: string): boolean {
  const { radius, outline } = pick(marks.shapes, p);
  return outline === null && radius >= Math.max(13, text.length * 4);
}

function dots({ view, state, marks }: Sheet, p: number): Markup {
  const median = pick(pick(view.patches, p).fan.median, state.count);
  const count = Math.round(median / (marks.perDot ?? 1));
  const { dotRadius } = marks;
  const [x, y] = pick(marks.shapes, p).at;
  if (count === 0 && median > 0)
    return mark`<circle cx="${x}" cy="${y}" r="${dotRadius}" fill="none" stroke="${deep}"/>`;
  return mark`<path d="${marks.dots(p, count)}" stroke="${deep}" stroke-width="${dotRadius * 2}" stroke-linecap="round" fill="none"/>`;
}
