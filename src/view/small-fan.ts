// One small fan for one patch, to stand beside many others.
import type { PatchView, Series, Size } from './contract.ts';
import { cursor, plot, type Plot } from './axes.ts';
import { bands } from './fan.ts';
import { figure, fitText } from './figure.ts';
import { mark, type Markup } from './markup.ts';
import { plain, whole } from './number.ts';
import { deep, ink, rule, softInk } from './palette.ts';
import { largest, pick } from './series.ts';

/** `marked` is the index of a count at which the middle is written out, or null. */
export function drawSmallFan(patch: PatchView, years: Series, marked: number | null, size: Size): Markup {
  const place = plot(size, { top: 44, right: 32, bottom: 22, left: 6 }, years, largest(patch.fan.p95));
  const year = marked === null ? null : pick(years, marked);
  const content = mark`${frame(place)}${bands(place, years, patch.fan)}${labels(patch, years, place)}
${cursor(place, year)}${reading(patch, years, marked, place)}`;
  return figure(size, words(patch, years), content, { years: [place.left, place.right] });
}

function frame({ left, right, top, bottom }: Plot): Markup {
  return mark`<line x1="${left}" x2="${right}" y1="${bottom}" y2="${bottom}" stroke="${ink}"/>
<line x1="${left}" x2="${right}" y1="${top}" y2="${top}" stroke="${rule}"/>`;
}

function labels(patch: PatchView, years: Series, place: Plot): Markup {
  const { left, right, top, bottom, size } = place;
  const most = pick(place.y.domain(), 1);
  const foot = mark`<text x="${left}" y="${size.height - 5}">${String(pick(years, 0))}</text>
<text x="${right}" y="${size.height - 5}" text-anchor="end">${String(pick(years, years.length - 1))}</text>`;
  return mark`<text x="${left}" y="16" fill="${ink}" font-weight="600">${fitText(patch.name, 13.5, size.width - 12)}</text>
<g font-size="12" fill="${softInk}"><text x="${right + 5}" y="${top + 4}">${plain(most)}</text><text x="${right + 5}" y="${bottom + 4}">0</text>${foot}</g>`;
}

function reading(patch: PatchView, years: Series, marked: number | null, { left }: Plot): Markup {
  const count = marked ?? years.length - 1;
  const median = whole(pick(patch.fan.median, count));
  return mark`<text x="${left}" y="34" font-size="12" fill="${deep}">${median} in ${String(pick(years, count))}</text>`;
}

function words(patch: PatchView, years: Series) {
  const last = years.length - 1;
  const { p05, p95, median } = patch.fan;
  const range = `90 of 100 futures lie between ${whole(pick(p05, last))} and ${whole(pick(p95, last))}`;
  const end = `In ${pick(years, last)}, ${range}, the middle at ${whole(pick(median, last))}`;
  return { title: `Abundance in ${patch.name}`, description: `${end}; it starts from ${whole(pick(median, 0))}.` };
}
