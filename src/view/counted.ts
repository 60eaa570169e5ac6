// Counts of the past over a fan: dots, hollow where they lie outside its band, with a bar for how exact each count is.
import type { CountedView, Series } from './contract.ts';
import type { Plot } from './axes.ts';
import type { KeyEntry } from './key.ts';
import { mark, type Markup } from './markup.ts';
import { ink, paper } from './palette.ts';
import { pick } from './series.ts';

/** The years of the futures, and before or behind them those of the counts. */
export function yearsWith(years: Series, counts: readonly CountedView[]): Series {
  const all = [pick(years, 0), pick(years, years.length - 1), ...counts.map(({ year }) => year)];
  return [Math.min(...all), Math.max(...all)];
}

export function mostCounted(counts: readonly CountedView[]): number {
  return counts.reduce((most, { animals, bar }) => Math.max(most, animals, bar?.[1] ?? 0), 0);
}

export function dots(place: Plot, counts: readonly CountedView[], radius: number): Markup {
  const drawn = counts.map(({ year, animals, bar, lies }) => {
    const [x, y] = [place.x(year), place.y(animals)];
    const reach =
      bar === null
        ? null
        : mark`<line x1="${x}" x2="${x}" y1="${place.y(bar[0])}" y2="${place.y(bar[1])}" stroke="${ink}"/>`;
    return mark`${reach}${dot(x, y, { radius, hollow: lies === 'below' || lies === 'above' })}`;
  });
  return mark`<g>${drawn}</g>`;
}

function dot(x: number, y: number, { radius, hollow }: { readonly radius: number; readonly hollow: boolean }): Markup {
  return hollow
    ? mark`<circle cx="${x}" cy="${y}" r="${radius + 0.5}" fill="${paper}" stroke="${ink}" stroke-width="2"/>`
    : mark`<circle cx="${x}" cy="${y}" r="${radius}" fill="${ink}" stroke="${paper}"/>`;
}

export function countedEntries(counts: readonly CountedView[]): readonly KeyEntry[] {
  const outside = counts.some(({ lies }) => lies === 'below' || lies === 'above');
  const bars = counts.some(({ bar }) => bar !== null);
  return [
    { sample: dot(7, 0, { radius: 3.5, hollow: false }), width: 14, words: 'counted' },
    ...(outside
      ? [{ sample: dot(7, 0, { radius: 3.5, hollow: true }), width: 14, words: 'counted, outside the 90' }]
      : []),
    ...(bars
      ? [
          {
            sample: mark`<line x1="7" x2="7" y1="-8" y2="8" stroke="${ink}"/>`,
            width: 14,
            words: '95 % interval of the count',
          },
        ]
      : []),
  ];
}
