// Abundance over many futures: nine in ten lie in the light band, half in the darker one, the line is the middle.
import type { CountedView, Fan, Series, Size } from './contract.ts';
import { axes, cursor, plot, type Plot } from './axes.ts';
import { countedEntries, dots, mostCounted, yearsWith } from './counted.ts';
import { figure, type FigureWords } from './figure.ts';
import { key } from './key.ts';
import { mark, type Markup } from './markup.ts';
import { plain } from './number.ts';
import { deep, ink, middle, softInk, tint } from './palette.ts';
import { areaWithin, pathThrough, type Place } from './path.ts';
import { largest, pick } from './series.ts';

export interface FanChart {
  readonly words: FigureWords;
  readonly years: Series;
  readonly fan: Fan;
  /** What the upright axis counts. */
  readonly axis: string;
  /** A year to mark, where the chart is live. */
  readonly marked: number | null;
  readonly write?: (value: number) => string;
  /** What was counted, to be drawn over the fan. */
  readonly counts?: readonly CountedView[];
}

export function drawFan(chart: FanChart, size: Size): Markup {
  const { years, fan, counts = [] } = chart;
  const legend = key([...entries, ...(counts.length > 0 ? countedEntries(counts) : [])], 0, 4, size.width);
  const margins = { top: legend.height + 32, right: 16, bottom: 28, left: 52 };
  const place = plot(size, margins, yearsWith(years, counts), Math.max(largest(fan.p95), mostCounted(counts)));
  const title = mark`<text x="0" y="${legend.height + 20}" fill="${softInk}">${chart.axis}</text>`;
  const inside = mark`${bands(place, years, fan)}${dots(place, counts, 3.5)}${cursor(place, chart.marked)}`;
  const content = mark`${legend.markup}${title}${axes(place, chart.write ?? plain)}${inside}`;
  return figure(size, chart.words, content, { years: spanOf(place, years) });
}

/** Where the first and the last year of the futures stand. */
export function spanOf(place: Plot, years: Series): readonly [number, number] {
  return [place.x(pick(years, 0)), place.x(pick(years, years.length - 1))];
}

/** The two bands and the line of the middle. */
export function bands(place: Plot, years: Series, fan: Fan): Markup {
  const outer = ribbon(place, years, fan.p05, fan.p95);
  const inner = ribbon(place, years, fan.p25, fan.p75);
  return mark`<path d="${outer}" fill="${tint}"/><path d="${inner}" fill="${middle}"/>
<path d="${course(place, years, fan.median)}" fill="none" stroke="${deep}" stroke-width="2.5" stroke-linejoin="round"/>`;
}

/** One value a year. */
export function course(place: Plot, years: Series, values: Series): string {
  return pathThrough(years.map((year, i): Place => [place.x(year), place.y(pick(values, i))]));
}

export function ribbon(place: Plot, years: Series, lower: Series, upper: Series): string {
  const there = years.map((year, i): Place => [place.x(year), place.y(pick(upper, i))]);
  const back = years.map((year, i): Place => [place.x(year), place.y(pick(lower, i))]).reverse();
  return areaWithin([...there, ...back]);
}

const entries = [
  { sample: swatch(tint), width: 26, words: '90 of 100 futures' },
  { sample: swatch(middle), width: 26, words: 'the middle half' },
  {
    sample: mark`<line x1="0" x2="26" stroke="${deep}" stroke-width="2.5"/>`,
    width: 26,
    words: 'the middle future of each year',
  },
];

function swatch(colour: string): Markup {
  return mark`<rect y="-6" width="26" height="12" fill="${colour}" stroke="${ink}" stroke-width="0.5"/>`;
}
