// One small fan for one patch, to stand beside many others.
import type { CountedView, Fan, Series, Size } from './contract.ts';
import { cursor, plot, type Plot } from './axes.ts';
import { dots, mostCounted, yearsWith } from './counted.ts';
import { bands, spanOf } from './fan.ts';
import { figure, fitText } from './figure.ts';
import { mark, type Markup } from './markup.ts';
import { plain, whole } from './number.ts';
import { deep, ink, rule, softInk } from './palette.ts';
import { largest, pick } from './series.ts';

export interface SmallFan {
  readonly name: string;
  readonly fan: Fan;
  /** What was counted, to be drawn over it. */
  readonly counts?: readonly CountedView[];
}

/** `marked` is the index of a count at which the middle is written out, or null. */
export function drawSmallFan(patch: SmallFan, years: Series, marked: number | null, size: Size): Markup {
  const { fan, counts = [] } = patch;
  const span = yearsWith(years, counts);
  const most = Math.max(largest(fan.p95), mostCounted(counts));
  const place = plot(size, { top: 44, right: 32, bottom: 22, left: 6 }, span, most);
  const year = marked === null ? null : pick(years, marked);
  const content = mark`${frame(place)}${bands(place, thinned(years, years), thinnedFan(fan, years))}${dots(place, counts, 2.5)}${labels(patch, span, place)}
${cursor(place, year)}${reading(patch, years, marked, place)}`;
  return figure(size, words(patch, years), content, { years: spanOf(place, years), brief: true });
}

/** More points than this cannot be told apart in so small a picture, and hundreds of them make a page heavy. */
const mostPoints = 52;

/** Every so many-th of a series by year, the first and the last among them. */
function thinned(series: Series, years: Series): Series {
  const last = years.length - 1;
  const apart = Math.ceil(last / (mostPoints - 1));
  return apart <= 1 ? series : series.filter((_, i) => i % apart === 0 || i === last);
}

function thinnedFan(fan: Fan, years: Series): Fan {
  const thin = (series: Series) => thinned(series, years);
  const { mean, p05, p25, median, p75, p95 } = fan;
  return { mean: thin(mean), p05: thin(p05), p25: thin(p25), median: thin(median), p75: thin(p75), p95: thin(p95) };
}

function frame({ left, right, top, bottom }: Plot): Markup {
  return mark`<line x1="${left}" x2="${right}" y1="${bottom}" y2="${bottom}" stroke="${ink}"/>
<line x1="${left}" x2="${right}" y1="${top}" y2="${top}" stroke="${rule}"/>`;
}

function labels(patch: SmallFan, years: Series, place: Plot): Markup {
  const { left, right, top, bottom, size } = place;
  const most = pick(place.y.domain(), 1);
  const foot = mark`<text x="${left}" y="${size.height - 5}">${String(pick(years, 0))}</text>
<text x="${right}" y="${size.height - 5}" text-anchor="end">${String(pick(years, years.length - 1))}</text>`;
  return mark`<text x="${left}" y="16" fill="${ink}" font-weight="600">${fitText(patch.name, 13.5, size.width - 12)}</text>
<g font-size="12" fill="${softInk}"><text x="${right + 5}" y="${top + 4}">${plain(most)}</text><text x="${right + 5}" y="${bottom + 4}">0</text>${foot}</g>`;
}

function reading(patch: SmallFan, years: Series, marked: number | null, { left }: Plot): Markup {
  const count = marked ?? years.length - 1;
  const median = whole(pick(patch.fan.median, count));
  return mark`<text x="${left}" y="34" font-size="12" fill="${deep}">${median} in ${String(pick(years, count))}</text>`;
}

function words(patch: SmallFan, years: Series) {
  const last = years.length - 1;
  const { p05, p95, median } = patch.fan;
  const range = `90 of 100 futures lie between ${whole(pick(p05, last))} and ${whole(pick(p95, last))}`;
  const end = `In ${pick(years, last)}, ${range}, the middle at ${whole(pick(median, last))}`;
  const counted = patch.counts === undefined ? '' : ` ${plain(patch.counts.length)} counts are drawn over it.`;
  return {
    title: `Abundance in ${patch.name}`,
    description: `${end}; it starts from ${whole(pick(median, 0))}.${counted}`,
  };
}
