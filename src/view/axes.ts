// The plot area of a chart over years, with its two axes.
import { scaleLinear, type ScaleLinear } from 'd3';
import type { Series, Size } from './contract.ts';
import { mark, type Markup } from './markup.ts';
import { hairline, ink, softInk } from './palette.ts';
import { pick } from './series.ts';

export interface Plot {
  readonly size: Size;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly x: ScaleLinear<number, number>;
  readonly y: ScaleLinear<number, number>;
}

export interface Margins {
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
  readonly left: number;
}

/** A plot from the first to the last year and from 0 to a round number not below `most`. */
export function plot(size: Size, margins: Margins, years: Series, most: number): Plot {
  const [left, right] = [margins.left, size.width - margins.right];
  const [top, bottom] = [margins.top, size.height - margins.bottom];
  const first = pick(years, 0);
  const last = Math.max(pick(years, years.length - 1), first + 1);
  const x = scaleLinear([first, last], [left, right]);
  const y = scaleLinear([0, most > 0 ? most : 1], [bottom, top]).nice(4);
  return { size, left, right, top, bottom, x, y };
}

/** Horizontal rules with numbers, years along the foot. */
export function axes(area: Plot, write: (value: number) => string): Markup {
  const ticks = area.y.ticks(4);
  const lines = ticks.map((value) => {
    const y = area.y(value);
    return mark`<line x1="${area.left}" x2="${area.right}" y1="${y}" y2="${y}" stroke="${value === 0 ? ink : hairline}"/>
<text x="${area.left - 7}" y="${y + 4}" text-anchor="end" fill="${softInk}">${write(value)}</text>`;
  });
  return mark`<g>${lines}${yearTicks(area)}</g>`;
}

function yearTicks(area: Plot): readonly Markup[] {
  const room = Math.max(2, Math.floor((area.right - area.left) / 62));
  const ticks = area.x.ticks(room).filter((year) => Number.isInteger(year));
  return ticks.map((year) => {
    const x = area.x(year);
    return mark`<line x1="${x}" x2="${x}" y1="${area.bottom}" y2="${area.bottom + 4}" stroke="${ink}"/>
<text x="${x}" y="${area.bottom + 18}" text-anchor="middle" fill="${softInk}">${String(year)}</text>`;
  });
}

/** A line through all charts at the year that is looked at. */
export function cursor(area: Plot, year: number | null): Markup | null {
  if (year === null) return null;
  const x = area.x(year);
  const { top, bottom } = area;
  return mark`<line x1="${x}" x2="${x}" y1="${top}" y2="${bottom}" stroke="${ink}" stroke-dasharray="2 3"/>`;
}
