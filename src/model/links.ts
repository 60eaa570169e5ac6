// Links: pairs of patches whose way has a distance of its own, a crossing that kills, or a barrier that turns animals back.
import type { SpecPath } from '../spec/document.ts';
import type { DispersalSpec } from '../spec/schema/spec.ts';
import { fail, patchIndex, type Context } from './context.ts';
import { positiveKm } from './kernel.ts';
import type { Link } from './model.ts';
import { withinBounds } from './rates.ts';

export function resolveLinks(context: Context, name: string, spec: DispersalSpec): readonly Link[] {
  const seen = new Set<string>();
  return (spec.links ?? []).flatMap((link, i) => {
    const path: SpecPath = [name, 'links', i];
    const ends = link.between.map((patch, k) => patchIndex(context, patch, [...path, 'between', k], 'value'));
    const [a = -1, b = -1] = ends.sort((p, q) => p - q);
    if (a < 0) return [];
    const pair = `${a} ${b}`;
    if (a === b || seen.has(pair)) {
      fail(context, 'dispersal-shape', [...path, 'between'], {
        message: a === b ? 'A link leads from a patch to itself' : 'Two links join the same two patches',
        details: { found: link.between.join(', '), expected: 'two different patches, each pair once' },
      });
    }
    seen.add(pair);
    const distance = (['distance', 'distance-times', 'distance-add'] as const).find((key) => link[key] !== undefined);
    if (distance !== undefined && spec.shares !== undefined) {
      fail(context, 'dispersal-shape', [...path, distance], {
        message: 'A table of shares uses no distance',
        part: 'key',
        details: { fix: 'Remove the distance: the shares already say how many go.' },
      });
    }
    const distanceKm = link.distance === undefined ? null : positiveKm(context, link.distance, [...path, 'distance']);
    const factors = distanceFactors(context, link, path);
    const share = (key: 'crossing-death' | 'turn-back') => shareOf(context, link[key], [...path, key]);
    return [
      {
        between: [a, b] as const,
        distanceKm,
        ...factors,
        crossingDeath: share('crossing-death'),
        turnBack: share('turn-back'),
      },
    ];
  });
}

type LinkSpec = NonNullable<DispersalSpec['links']>[number];

function distanceFactors(
  context: Context,
  link: LinkSpec,
  path: SpecPath,
): Pick<Link, 'distanceTimes' | 'distanceAddKm'> {
  const { 'distance-times': times, 'distance-add': add } = link;
  const year = context.time.firstYear;
  const [timesPath, addPath] = [
    [...path, 'distance-times'],
    [...path, 'distance-add'],
  ];
  const bounded = (expression: number | string, at: SpecPath, value: number): number => {
    const told = { expression, path: at, what: 'factor of the distance' };
    withinBounds(context, told, { value, bounds: 'from zero', patch: undefined });
    return value;
  };
  return {
    ...(times === undefined
      ? {}
      : { distanceTimes: bounded(times, timesPath, context.numbers.value(times, timesPath, { year })) }),
    ...(add === undefined ? {} : { distanceAddKm: context.numbers.value(add, addPath, { year, dimension: 'length' }) }),
  };
}

function shareOf(context: Context, expression: number | string | undefined, path: SpecPath): number {
  if (expression === undefined) return 0;
  const value = context.numbers.value(expression, path, { year: context.time.firstYear });
  const what = path.at(-1) === 'turn-back' ? 'share that turns back' : 'share that dies at the crossing';
  withinBounds(context, { expression, path, what }, { value, bounds: 'share', patch: undefined });
  return value;
}
