// Differences as dots with their intervals, one row each, around an upright line at no difference.
import { scaleLinear, type ScaleLinear } from 'd3';
import type { Size } from '../contract.ts';
import { figure, fitText } from '../figure.ts';
import { mark, type Markup } from '../markup.ts';
import { deep, hairline, ink, paper, softInk } from '../palette.ts';

export interface Whisker {
  /** Such as 'hedge against as now'. */
  readonly label: string;
  readonly estimate: number;
  readonly lower: number;
  readonly upper: number;
  /** From what is not known; null where it was not drawn. */
  readonly outer: readonly [number, number] | null;
  /** No interval holds 0. */
  readonly apart: boolean;
}

export interface WhiskerChart {
  readonly title: string;
  readonly description: string;
  /** What the axis counts, at its left and right end. */
  readonly less: string;
  readonly more: string;
  readonly rows: readonly Whisker[];
  readonly write: (value: number) => string;
}

const rowHeight = 34;
const top = 40;

export function whiskersHeight(rows: number): number {
  return top + rows * rowHeight + 26;
}

export function drawWhiskers(chart: WhiskerChart, width: number): Markup {
  const size: Size = { width, height: whiskersHeight(chart.rows.length) };
  const ends = chart.rows
    .flatMap(({ lower, upper, outer }) => [lower, upper, ...(outer ?? [])])
    .filter(Number.isFinite);
  const reach = Math.max(...ends.map(Math.abs), 1e-9);
  const [least, most] = [Math.min(0, ...ends), Math.max(0, ...ends)];
  const pad = 0.06 * (most - least || reach);
  const x = scaleLinear([least - pad, most + pad], [14, width - 14]);
  const foot = size.height - 26;
  const content = mark`${axis(x, { foot, write: chart.write })}${directions(chart, x, width)}
${chart.rows.map((row, i) => whisker(row, { x, y: top + (i + 0.5) * rowHeight, width }))}`;
  return figure(size, { title: chart.title, description: chart.description }, content);
}

type Scale = ScaleLinear<number, number>;

function axis(x: Scale, { foot, write }: { readonly foot: number; readonly write: (value: number) => string }): Markup {
  const room = Math.max(2, Math.floor(x.range().reduce((a, b) => b - a) / 80));
  const ticks = x.ticks(room).map((value) => {
    const at = x(value);
    return mark`<line x1="${at}" x2="${at}" y1="${top - 8}" y2="${foot}" stroke="${value === 0 ? ink : hairline}"/>
<text x="${at}" y="${foot + 17}" text-anchor="middle" font-size="12" fill="${softInk}">${write(value)}</text>`;
  });
  return mark`<g>${ticks}</g>`;
}

function directions({ less, more }: WhiskerChart, x: Scale, width: number): Markup {
  const zero = x(0);
  const [before, after] = [zero - 30, width - zero - 40];
  const left = mark`<text x="${zero - 8}" y="20" text-anchor="end" fill="${softInk}">← ${wholeOrFirst(less, before)}</text>`;
  const right = mark`<text x="${zero + 8}" y="20" fill="${softInk}">${wholeOrFirst(more, after)} →</text>`;
  return mark`${zero > 90 ? left : null}${width - zero > 90 ? right : null}`;
}

/** Where not all of it has room, its first word, which says the direction. */
function wholeOrFirst(text: string, room: number): string {
  return fitText(text, 13, room) === text ? text : fitText(text.split(' ')[0] ?? '', 13, room);
}

function whisker(
  row: Whisker,
  { x, y, width }: { readonly x: Scale; readonly y: number; readonly width: number },
): Markup {
  const { estimate, lower, upper, outer, apart } = row;
  const [from, to] = [x(lower), x(upper)];
  const line =
    outer === null
      ? null
      : mark`<line x1="${x(outer[0])}" x2="${x(outer[1])}" y1="${y + 8}" y2="${y + 8}" stroke="${deep}" stroke-width="1.5" stroke-dasharray="3 3"/>`;
  const halo = mark`stroke="${paper}" stroke-width="3.5" stroke-linejoin="round" paint-order="stroke"`;
  const dot = mark`<circle cx="${x(estimate)}" cy="${y + 8}" r="5" fill="${apart ? deep : paper}" stroke="${deep}" stroke-width="1.75"/>`;
  return mark`<g>${line}<line x1="${from}" x2="${to}" y1="${y + 8}" y2="${y + 8}" stroke="${deep}" stroke-width="2.5"/>
<text x="14" y="${y - 4}" fill="${ink}" ${halo}>${fitText(row.label, 13, width - 28)}</text>${dot}</g>`;
}
