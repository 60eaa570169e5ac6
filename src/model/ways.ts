// Who of the leavers goes where, by kernel or by shares, in every stretch of years in which that stays the same.
import type { SpecPath } from '../spec/document.ts';
import type { Finding } from '../spec/finding.ts';
import type { Dimension } from '../spec/quantity.ts';
import type { DispersalSpec } from '../spec/schema/spec.ts';
import type { Context } from './context.ts';
import type { Ways, WaysByYear } from './model.ts';

interface OfDispersal {
  readonly name: string;
  readonly spec: DispersalSpec;
}

/**
 * `waysIn` resolves them as they are in the first year of the context that it is given; null after telling why there are none.
 * Only where a number changes with the years is more than the first looked at.
 */
export function waysByYear(
  context: Context,
  dispersal: OfDispersal,
  waysIn: (context: Context) => Ways | null,
): WaysByYear | null {
  const make = (): WaysByYear | null => waysInYears(context, dispersal, waysIn);
  const { memory, numbers } = context;
  return memory === undefined ? make() : memory.ways.of(dispersal.name, numbers, make);
}

function waysInYears(
  context: Context,
  { name, spec }: OfDispersal,
  waysIn: (context: Context) => Ways | null,
): WaysByYear | null {
  const dated = numbersOf(name, spec).map(([expression, path, dimension]) =>
    context.numbers.varies(expression, path, dimension),
  );
  const first = waysIn(context);
  if (first === null) return null;
  if (!dated.includes(true) && !someComeOrGo(context)) return { first };
  const { firstYear, steps } = context.time;
  const epochs: Ways[] = [first];
  const texts: string[] = [textOf(first)];
  const epochOf = new Int32Array(steps);
  for (let t = 1; t < steps; t++) {
    const ways = waysLater(context, firstYear + t, waysIn);
    if (ways === null) return null;
    const text = textOf(ways);
    if (text !== texts.at(-1)) {
      epochs.push(ways);
      texts.push(text);
    }
    epochOf[t] = epochs.length - 1;
  }
  return epochs.length === 1 ? { first } : { first, byYear: { epochs, epochOf } };
}

/** As they would be in a model that begins in a later year; what that finds is told once. */
function waysLater(context: Context, year: number, waysIn: (context: Context) => Ways | null): Ways | null {
  const findings: Finding[] = [];
  const ways = waysIn({ ...context, time: { ...context.time, firstYear: year }, findings });
  const told = (one: Finding): boolean =>
    context.findings.some(({ code, path }) => code === one.code && path.join('\0') === one.path.join('\0'));
  for (const one of findings) if (!told(one)) context.findings.push(one);
  return ways;
}

function someComeOrGo({ patches }: Context): boolean {
  return patches.some(({ exists }) => exists !== undefined);
}

/** Whether there is this patch in the first year of the context. */
export function isThere({ patches, time }: Context, patch: number): boolean {
  const { from = -Infinity, until = Infinity } = patches[patch]?.exists ?? {};
  return from <= time.firstYear && time.firstYear <= until;
}

type Written = readonly [number | string, SpecPath, Dimension];

/** Every number of the ways with its place. */
function numbersOf(name: string, spec: DispersalSpec): readonly Written[] {
  const { kernel, links = [], shares = {} } = spec;
  const own: readonly (readonly [number | string | undefined, SpecPath, Dimension])[] = [
    [kernel?.mean, [name, 'kernel', 'mean'], 'length'],
    [kernel?.scale, [name, 'kernel', 'scale'], 'length'],
    [kernel?.reach, [name, 'kernel', 'reach'], 'length'],
    [kernel?.['shape-number'], [name, 'kernel', 'shape-number'], 'share'],
    [spec.attraction, [name, 'attraction'], 'share'],
    [spec.hazard, [name, 'hazard'], 'per-length'],
    [spec['survival-on-the-way'], [name, 'survival-on-the-way'], 'share'],
    [spec.leavers === 'may miss' ? 'area' : undefined, [name, 'leavers'], 'share'],
    ...links.flatMap((link, i) => [
      ...(['crossing-death', 'turn-back', 'distance-times'] as const).map(
        (key) => [link[key], [name, 'links', i, key], 'share'] as const,
      ),
      ...(['distance', 'distance-add'] as const).map((key) => [link[key], [name, 'links', i, key], 'length'] as const),
    ]),
    ...Object.entries(shares).flatMap(([from, row]) =>
      Object.entries(row).map(([to, share]) => [share, [name, 'shares', from, to], 'share'] as const),
    ),
  ];
  return own.flatMap(([expression, path, dimension]) =>
    expression === undefined ? [] : [[expression, path, dimension] as const],
  );
}

/** The same text for the same numbers. */
function textOf(ways: Ways): string {
  return JSON.stringify(ways, (_, value: unknown) => (value instanceof Float64Array ? [...value] : value));
}
