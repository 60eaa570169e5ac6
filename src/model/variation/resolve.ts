// Year-to-year variation: which rates and parameters differ between years, by how much, and what differs together.
import type { SpecPath } from '../../spec/document.ts';
import { readQuantity } from '../../spec/quantity.ts';
import type { Spec, VariedSpec } from '../../spec/schema/spec.ts';
import type { Correlation, PatchNumbers, Varied, Variation } from '../chance.ts';
import type { VariedShape } from './shape.ts';
import { classIndex, fail, type Context } from '../context.ts';
import type { Phase } from '../model.ts';
import { requirePlaces } from '../places.ts';
import { correlationTable, evenCorrelation, type Pairs } from './correlation.ts';
import { distributionOf, largestSd } from './distribution.ts';
import { refuseBeyondLitters } from './litter-bounds.ts';
import { mapNumbers, patchNumbers } from './patch-numbers.ts';
import { findRates, meanRate, rateWords, tableOf, tellNoRates } from './rate-name.ts';
import { resolveResponses } from './response.ts';

type VariationSpec = NonNullable<Spec['variation']>;
type Entry = VariationSpec[string];

const settings: ReadonlySet<string> = new Set(['between-rates', 'between-patches', 'autocorrelation']);

/** Null where nothing varies. */
export function resolveVariation(context: Context, phases: readonly Phase[]): Variation | null {
  const { resampled } = context.drivers;
  const spec = context.spec.variation ?? {};
  if (context.spec.variation === undefined && resampled === null) return null;
  const varied = Object.entries(spec)
    .filter(([key]) => !settings.has(key))
    .flatMap(([key, entry]) => resolveEntry(context, { key, entry, phases }))
    .sort((a, b) => (a.name < b.name ? -1 : a.name > b.name ? 1 : 0));
  refuseBeyondLitters(context, phases, varied);
  if (varied.length === 0 && context.spec.variation !== undefined) {
    if (!context.findings.some(({ severity }) => severity === 'error')) tellNothing(context);
    return null;
  }
  return {
    varied,
    resampled,
    ...resolveResponses(context, phases, varied),
    betweenRates: betweenRates(context, spec['between-rates'], varied),
    betweenPatches: varied.length === 0 ? { of: 0, repaired: 0 } : betweenPatches(context, spec['between-patches']),
    autocorrelation: numberIn(spec['autocorrelation']) ?? 0,
  };
}

function tellNothing(context: Context): void {
  fail(context, 'nothing-varies', ['variation'], {
    message: '`variation` names no rate and no parameter',
    part: 'key',
    details: { expected: 'such as `survival: { adult: { sd: 0.05 } }`' },
  });
}

interface EntryRequest {
  readonly key: string;
  readonly entry: Entry;
  readonly phases: readonly Phase[];
}

function resolveEntry(context: Context, { key, entry, phases }: EntryRequest): readonly Varied[] {
  const path = ['variation', key];
  if (isVaried(entry)) return variedParameter(context, { key, entry, path, phases });
  const rates = findRates(phases, key);
  if (rates === null) {
    tellNoRates(context, key, path, phases);
    return [];
  }
  return Object.entries(entry).flatMap(([name, own]): Varied[] => {
    const at = [...path, name];
    const c = classIndex(context, name, at);
    const phase = phases[rates.phase];
    if (c < 0 || phase === undefined || !isVaried(own)) return [];
    const table = tableOf(phase, rates.part);
    const epochs = Math.max(1, table?.epochs.length ?? 1);
    const place = (epoch: number, patch: number) => ({ classes: context.classes.length, epoch, patch, c });
    const mean: PatchNumbers = {
      epochs: Array.from({ length: epochs }, (_, epoch) =>
        Float64Array.from(context.patches, (_patch, p) => meanRate(phase, rates.part, place(epoch, p))),
      ),
      epochOf: table?.epochOf ?? new Int32Array(0),
    };
    const share = rates.part !== 'births';
    const words = rateWords(context, key, c);
    const shape = shapeOf(context, { own, path: at, words, share });
    const found: Varied = {
      name: words,
      of: { kind: 'rate', ...rates, class: c },
      shape,
      mean,
      sd: sdOf(context, own, at, mean),
    };
    checkMoments(context, found, at);
    return [found];
  });
}

function variedParameter(
  context: Context,
  { key, entry, path, phases }: EntryRequest & { readonly entry: VariedSpec; readonly path: SpecPath },
): readonly Varied[] {
  if (context.spec.parameters?.[key] === undefined) {
    tellNoRates(context, key, path, phases);
    return [];
  }
  const at = ['parameters', key];
  const value = (_: number, year: number): number => context.numbers.value(key, at, { year });
  const mean = patchNumbers(context, context.numbers.varies(key, at), value);
  const first = mean.epochs[0]?.[0] ?? 0;
  const share = first > 0 && first < 1;
  const shape = shapeOf(context, { own: entry, path, words: key, share });
  const found: Varied = { name: key, of: { kind: 'parameter' }, shape, mean, sd: sdOf(context, entry, path, mean) };
  checkMoments(context, found, path);
  return [found];
}

function isVaried(entry: Entry | Record<string, VariedSpec>[string]): entry is VariedSpec {
  if (typeof entry !== 'object') return false;
  return ['sd', 'cv', 'shape'].some((key) => {
    const value: unknown = Object.entries(entry).find(([name]) => name === key)?.[1];
    return typeof value === 'number' || typeof value === 'string';
  });
}

interface ShapeRequest {
  readonly own: VariedSpec;
  readonly path: SpecPath;
  readonly words: string;
  readonly share: boolean;
}

function shapeOf(context: Context, { own, path, words, share }: ShapeRequest): VariedShape {
  const { shape } = own;
  if (shape === undefined) {
    context.defaults.push(`Over the years ${words} has a ${share ? 'beta' : 'lognormal'} distribution.`);
    return share ? 'beta' : 'lognormal';
  }
  if (share && (shape === 'lognormal' || shape === 'gamma') && path.length > 2) {
    fail(context, 'impossible-variation', [...path, 'shape'], {
      message: `A share cannot be ${shape}, which has no upper end`,
      details: { expected: '`beta` or `logit-normal`' },
    });
  }
  return shape;
}

function sdOf(context: Context, own: VariedSpec, path: SpecPath, mean: PatchNumbers): PatchNumbers {
  const both = own.sd !== undefined && own.cv !== undefined;
  const expression = own.sd ?? own.cv;
  if (expression === undefined || both) {
    fail(context, 'impossible-variation', path, {
      message: both ? '`sd` and `cv` exclude each other' : 'It is not said by how much this varies',
      part: 'key',
      details: { expected: '`sd`, on the scale of the number, or `cv`, a share of its mean' },
    });
    return mapNumbers(mean, () => 0);
  }
  const at = [...path, own.sd === undefined ? 'cv' : 'sd'];
  const value = context.numbers.value(expression, at, { year: context.time.firstYear });
  if (value < 0) {
    fail(context, 'impossible-variation', at, {
      message: 'A standard deviation is not below zero',
      details: { found: String(value) },
    });
  }
  const size = value > 0 ? value : 0;
  return mapNumbers(mean, (m) => (own.sd === undefined ? size * Math.abs(m) : m === 0 ? 0 : size));
}

/** Whether every patch can have its mean and SD. */
function checkMoments(context: Context, { name, shape, mean, sd }: Varied, path: SpecPath): void {
  for (const [e, means] of mean.epochs.entries()) {
    for (const [p, m] of means.entries()) {
      const s = sd.epochs[e]?.[p] ?? 0;
      if (Number.isNaN(m) || Number.isNaN(s) || distributionOf(shape, { mean: m, sd: s }) !== null) continue;
      const share = shape === 'beta' || shape === 'logit-normal';
      const where = context.patches.length > 1 ? ` in ${context.patches[p]?.name ?? ''}` : '';
      fail(context, 'impossible-variation', path, {
        message: `No ${shape} distribution has the mean ${Number(m.toPrecision(6))} and the SD ${Number(s.toPrecision(6))} (${name}${where})`,
        part: 'key',
        details: {
          expected:
            share && m > 0 && m < 1
              ? `an SD below ${largestSd(m).toFixed(4)}`
              : share
                ? 'a mean between 0 and 1'
                : 'a mean above zero',
          ...(share ? { reason: 'With this mean even a share that is always 0 or 1 varies no more.' } : {}),
        },
      });
      return;
    }
  }
}

function numberIn(entry: Entry | undefined): number | undefined {
  return typeof entry === 'number' ? entry : undefined;
}

function betweenRates(context: Context, entry: Entry | undefined, varied: readonly Varied[]): Correlation {
  const request = {
    path: ['variation', 'between-rates'],
    what: 'number that varies',
    names: varied.map(({ name }) => name),
  };
  if (entry === undefined) {
    if (varied.length > 1) context.defaults.push('Between the rates that vary there is no correlation.');
    return { of: 0, repaired: 0 };
  }
  const value = numberIn(entry);
  return value === undefined
    ? correlationTable(context, pairsIn(entry), request)
    : evenCorrelation(context, value, request);
}

function betweenPatches(context: Context, entry: Entry | undefined): Variation['betweenPatches'] {
  const path = ['variation', 'between-patches'];
  const request = { path, what: 'patch', names: context.patches.map(({ name }) => name) };
  if (context.patches.length === 1) return { of: 1, repaired: 0 };
  if (entry === undefined) {
    fail(context, 'missing-correlation', ['variation'], {
      message: 'It is not said how alike the years are in different patches',
      part: 'key',
      details: {
        expected:
          '`between-patches: { range: 20 km }`, a number from 0 (each patch its own) to 1 (all alike), or a table',
        reason: 'Whether patches have bad years together often moves the risk more than anything else.',
      },
    });
    return { of: 0, repaired: 0 };
  }
  const value = numberIn(entry);
  if (value !== undefined) return evenCorrelation(context, value, request);
  const range = typeof entry === 'object' ? Object.entries(entry).find(([key]) => key === 'range')?.[1] : undefined;
  if (typeof range === 'object' || range === undefined) return correlationTable(context, pairsIn(entry), request);
  const read = readQuantity(range, 'length');
  const rangeKm = read.ok ? read.value : NaN;
  if (!(rangeKm > 0)) {
    fail(context, 'impossible-correlation', [...path, 'range'], {
      message: 'A range is a distance above zero',
      details: { found: String(range), expected: 'such as `20 km`' },
    });
    return { of: 0, repaired: 0 };
  }
  requirePlaces(context, 'between-patches');
  return { rangeKm };
}

function pairsIn(entry: Entry): Pairs {
  if (typeof entry !== 'object') return {};
  const pairs: Record<string, Record<string, number>> = {};
  for (const [left, row] of Object.entries(entry)) {
    if (typeof row !== 'object') continue;
    const own: Record<string, number> = {};
    for (const [right, value] of Object.entries(row)) if (typeof value === 'number') own[right] = value;
    pairs[left] = own;
  }
  return pairs;
}
