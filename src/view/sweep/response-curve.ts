// How a measure answers one number: its mean, and the range in which the middle 90 % of the points lie.
import { area, line, scaleLinear } from 'd3';
import { figure } from '../figure.ts';
import { mark, type Markup } from '../markup.ts';
import { deep, hairline, ink, paper, softInk, tint, umber } from '../palette.ts';

export interface ResponseCurve {
  readonly measure: string;
  readonly number: string;
  /** Middle of each value or slice, in order. */
  readonly points: readonly {
    readonly at: number;
    readonly mean: number;
    readonly lower: number;
    readonly upper: number;
    /** Drawn open: at half of the points or more it is not told from 0. */
    readonly open: boolean;
  }[];
  /** What a mark stands for, such as `each value that was run`. */
  readonly at: string;
  /** A level that matters, such as growth of 1; null for none. */
  readonly level: number | null;
  readonly write: (value: number) => string;
}

const size = { width: 360, height: 250 };
/** More of them would run into each other. */
const mostMarks = 40;

export function drawResponse({ measure, number, points, at, level, write }: ResponseCurve): Markup {
  const values = points.flatMap(({ lower, upper }) => [lower, upper]).concat(level ?? []);
  const [least, most] = [Math.min(...values), Math.max(...values)];
  const x = scaleLinear([points[0]?.at ?? 0, points.at(-1)?.at ?? 1], [62, size.width - 14]);
  const y = scaleLinear([least, most > least ? most : least + 1], [size.height - 44, 30]).nice(4);
  type Point = ResponseCurve['points'][number];
  const band = area<Point>()
    .x(({ at }) => x(at))
    .y0(({ lower }) => y(lower))
    .y1(({ upper }) => y(upper))
    .digits(1);
  const mean = line<Point>()
    .x(({ at }) => x(at))
    .y((one) => y(one.mean))
    .digits(1);
  const rules = y.ticks(4).map(
    (value) => mark`<line x1="62" x2="${size.width - 14}" y1="${y(value)}" y2="${y(value)}" stroke="${hairline}"/>
<text x="56" y="${y(value) + 4}" text-anchor="end" fill="${softInk}">${write(value)}</text>`,
  );
  const foot = x.ticks(5).map(
    (
      value,
    ) => mark`<line x1="${x(value)}" x2="${x(value)}" y1="${size.height - 44}" y2="${size.height - 40}" stroke="${ink}"/>
<text x="${x(value)}" y="${size.height - 26}" text-anchor="middle" fill="${softInk}">${String(value)}</text>`,
  );
  const levelLine =
    level === null
      ? null
      : mark`<line x1="62" x2="${size.width - 14}" y1="${y(level)}" y2="${y(level)}" stroke="${umber}" stroke-dasharray="6 3"/>`;
  const marks =
    points.length > mostMarks
      ? null
      : points.map(
          (one) =>
            mark`<circle cx="${x(one.at)}" cy="${y(one.mean)}" r="3.2" fill="${one.open ? paper : deep}" stroke="${one.open ? deep : paper}"/>`,
        );
  const content = mark`<text x="0" y="16" fill="${ink}">${measure}</text>${rules}${foot}
<path d="${band([...points]) ?? ''}" fill="${tint}"/>${levelLine}
<path d="${mean([...points]) ?? ''}" fill="none" stroke="${deep}" stroke-width="2.5"/>${marks}
<text x="${(62 + size.width) / 2}" y="${size.height - 6}" text-anchor="middle" fill="${ink}">${number}</text>`;
  const [first, last] = [points[0], points.at(-1)];
  const ends =
    first === undefined || last === undefined
      ? ''
      : `From ${write(first.mean)} at ${String(first.at)} to ${write(last.mean)} at ${String(last.at)}. `;
  const isOpen = marks !== null && points.some(({ open }) => open);
  const told = isOpen ? ' (open where at half of the points or more it is not told from 0)' : '';
  const marked = marks === null ? '' : `, marked at ${at}${told}`;
  const description = `${ends}The line is the mean${marked}, the band holds the middle 90 % of the points.`;
  return figure(size, { title: `${measure} over ${number}`, description }, content);
}
