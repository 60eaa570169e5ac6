// What matters most as bars, each with the band within which it may lie.
import { scaleLinear } from 'd3';
import { figure, fitText } from '../figure.ts';
import { mark, type Markup } from '../markup.ts';
import { hairline, ink, middle, softInk } from '../palette.ts';

export interface SensitivityBars {
  readonly title: string;
  readonly by: string;
  readonly bars: readonly {
    readonly name: string;
    readonly value: number;
    readonly band: { readonly lower: number; readonly upper: number } | null;
    readonly words: string;
  }[];
}

const row = 26;
const left = 180;
const width = 640;

export function drawBars({ title, by, bars }: SensitivityBars): Markup {
  const size = { width, height: bars.length * row + 34 };
  const most = Math.max(...bars.flatMap(({ value, band }) => [value, band?.upper ?? 0]), 1e-12);
  const x = scaleLinear([0, most], [left, width - 90]);
  const drawn = bars.map(({ name, value, band, words }, i) => {
    const y = 8 + i * row;
    const from = x(Math.max(0, band?.lower ?? 0));
    const whisker =
      band === null
        ? null
        : mark`<line x1="${from}" x2="${x(Math.max(0, band.upper))}" y1="${y + 9}" y2="${y + 9}" stroke="${ink}" stroke-width="1.5"/>`;
    return mark`<text x="${left - 8}" y="${y + 13}" text-anchor="end" fill="${ink}">${fitText(name, 13, left - 12)}</text>
<rect x="${left}" y="${y}" width="${Math.max(0, x(Math.max(0, value)) - left)}" height="18" fill="${middle}"/>${whisker}
<text x="${width - 6}" y="${y + 13}" text-anchor="end" fill="${softInk}">${words}</text>`;
  });
  const foot = mark`<line x1="${left}" x2="${left}" y1="4" y2="${size.height - 24}" stroke="${hairline}"/>
<text x="${left}" y="${size.height - 6}" fill="${softInk}">${by}</text>`;
  const description = bars.map(({ name, words }) => `${name} ${words}`).join(', ');
  return figure(size, { title, description: `${description}.` }, mark`${drawn}${foot}`);
}
