// The key of the map: what a dot, a circle, a colour and a band stand for.
import type { KeyEntry } from '../key.ts';
import { mark, type Markup } from '../markup.ts';
import { decimal, plain, roundDown } from '../number.ts';
import { deep, lossRamp, ramp, rule, softInk, umber } from '../palette.ts';
import { bandPath } from './band.ts';
import type { Marks } from './marks.ts';
import { circleShape, drawShape, drawTicks, edgeOf } from './shape.ts';
import type { Sheet } from './sheet.ts';
import { contributionRange, mostDifferent } from './shown.ts';

export function legendEntries(sheet: Sheet): readonly KeyEntry[] {
  const entries = [...shownEntries(sheet), ...roleEntries(sheet)];
  return sheet.view.links.length === 0 ? entries : [...entries, ...bandEntry(sheet), wayEntry];
}

function shownEntries(sheet: Sheet): readonly KeyEntry[] {
  switch (sheet.state.show) {
    case 'abundance':
      return abundanceEntries(sheet);
    case 'empty':
      return [rampEntry('empty in 0 to 100 of 100 futures')];
    case 'contribution': {
      const { low, high } = contributionRange(sheet.view);
      return [rampEntry(`${decimal(low, 2)} to ${decimal(high, 2)} a year later for each one there`)];
    }
    case 'role':
      return [];
    case 'difference': {
      const most = plain(mostDifferent(sheet.view, sheet.state.count));
      return [rampEntry(`up to ${most} more`), rampEntry(`up to ${most} fewer, with a minus`, lossRamp)];
    }
  }
}

const roleWords = {
  source: 'source: each one there leaves more than one',
  sink: 'sink: each one there leaves fewer than one',
  undecided: 'undecided',
} as const;

function roleEntries({ view, state }: Sheet): readonly KeyEntry[] {
  const heavy = state.show === 'role';
  return (['source', 'sink', 'undecided'] as const)
    .filter((role) => view.patches.some(({ worth }) => worth?.role === role))
    .map((role) => {
      const shape = circleShape([13, 0], 7.5);
      const ticks = role === 'source' ? drawTicks(shape, heavy) : null;
      const sample = mark`${ticks}${drawShape(shape, mark`fill="#fff" ${edgeOf(role, heavy)}`)}`;
      return { sample, width: 26, words: roleWords[role] };
    });
}

function abundanceEntries({ view, marks }: Sheet): readonly KeyEntry[] {
  const circle = mark`<circle cx="8" r="7.5" fill="#fff" stroke="${softInk}"/>`;
  const words = sizeWords[marks.sizeMeans];
  const size = words === null ? [] : [{ sample: circle, width: 16, words }];
  if (marks.perDot === null) {
    const full = view.patches.every(({ capacity }) => capacity !== null) ? 'capacity' : 'most';
    return [...size, rampEntry(fullness[full])];
  }
  const dot = mark`<circle cx="5" r="${marks.dotRadius}" fill="${deep}"/>`;
  return [{ sample: dot, width: 10, words: perDotWords(marks.perDot, view.animals) }, ...size];
}

const fullness = {
  capacity: 'the middle, from nothing to what it can hold',
  most: 'the middle, from nothing to the most in 95 of 100 futures',
} as const;

const sizeWords: Readonly<Record<Marks['sizeMeans'], string | null>> = {
  outline: null,
  'outline or area': 'circle: a patch without an outline, by its area',
  capacity: 'circle: what the patch can hold',
  area: 'circle: area of the patch',
  animals: 'circle: the most in 95 of 100 futures',
};

export function perDotWords(perDot: number, animals: string): string {
  if (perDot === 1) return `one dot is one ${animals.replace(/s$/, '')}`;
  return `one dot is ${plain(perDot)} ${animals}`;
}

function rampEntry(words: string, colour = ramp): KeyEntry {
  const steps = Array.from({ length: 10 }, (_, i) => step(i, colour));
  const frame = mark`<rect y="-6" width="100" height="12" fill="none" stroke="${rule}" stroke-width="0.75"/>`;
  return { sample: mark`${steps}${frame}`, width: 100, words };
}

function step(i: number, colour: (share: number) => string): Markup {
  return mark`<rect x="${i * 10}" y="-6" width="10.2" height="12" fill="${colour((i + 0.5) / 10)}"/>`;
}

function bandEntry({ view, flows }: Sheet): readonly KeyEntry[] {
  if (flows.most <= 0) return [];
  const sample = roundDown(flows.most);
  const width = (flows.widest * sample) / flows.most;
  const path = bandPath({ from: [0, 0], to: [56, 0], fromRadius: 0, toRadius: 0 }, width, 0);
  const count = sample >= 1 ? plain(sample) : String(Number(sample.toPrecision(1)));
  const words = `${count} ${view.animals} a year, from the wide end to the thin`;
  return [{ sample: mark`<path d="${path}" fill="${umber}" fill-opacity="0.6"/>`, width: 58, words }];
}

const wayEntry: KeyEntry = {
  sample: mark`<line x1="0" x2="30" stroke="${softInk}" stroke-dasharray="1 4" stroke-linecap="round"/>`,
  width: 30,
  words: 'animals can go between these',
};
