// Takes, moves and releases: of whom, where, how many, in which years.
import type { SpecPath } from '../spec/document.ts';
import type { AddSpec, MoveSpec, TakeSpec } from '../spec/schema/spec.ts';
import { classIndex, classMask, fail, patchIndex, type Context } from './context.ts';
import type { AddPhase, MovePhase, RateTable, TakePhase } from './model.ts';
import { buildTable, whereIn, withinBounds, type Written } from './rates.ts';
import { activeYears } from './years.ts';

export function resolveTake(context: Context, name: string, spec: TakeSpec): TakePhase | null {
  const patches = patchesOf(context, spec.in, [name, 'in']);
  const quota = quotaOf(context, { name, spec, patches });
  return quota === null
    ? null
    : { kind: 'take', name, patches, active: activeYears(context, spec.years, [name, 'years']), ...quota };
}

export function resolveMove(context: Context, name: string, spec: MoveSpec): MovePhase | null {
  const patches = patchesOf(context, spec.from, [name, 'from']);
  const to = patchIndex(context, spec.to, [name, 'to'], 'value');
  if (to >= 0 && patches[to] === 1) {
    fail(context, 'handling-shape', [name, 'to'], {
      message: `Animals are moved from ${spec.to} to itself`,
      details: { expected: 'another patch than those they come from' },
    });
  }
  const quota = quotaOf(context, { name, spec, patches });
  if (quota === null || to < 0) return null;
  const active = activeYears(context, spec.years, [name, 'years']);
  const homing = shareOf(context, {
    expression: spec.homing ?? 0,
    path: [name, 'homing'],
    what: 'share that goes back',
  });
  return { kind: 'move', name, patches, active, ...quota, to, survival: survivalOf(context, name, spec), homing };
}

export function resolveAdd(context: Context, name: string, spec: AddSpec): AddPhase {
  const patches = patchesOf(context, spec.in, [name, 'in']);
  const path = [name, 'number'];
  const classes = namedClasses(context, spec.number, path);
  const amounts = buildTable(context, {
    size: context.classes.length,
    bounds: 'from zero',
    written: (p, c) => (patches[p] === 1 ? writtenFor(context, spec.number, { path, c, what: 'number' }) : null),
  });
  const active = activeYears(context, spec.years, [name, 'years']);
  return { kind: 'add', name, patches, classes, active, amounts, survival: survivalOf(context, name, spec) };
}

function patchesOf(context: Context, asked: string | readonly string[] | undefined, path: SpecPath): Uint8Array {
  const mask = new Uint8Array(context.patches.length);
  if (asked === undefined) return mask.fill(1);
  const one = typeof asked === 'string';
  [asked].flat().forEach((patch, i) => {
    const p = patchIndex(context, patch, one ? path : [...path, i], 'value');
    if (p >= 0) mask[p] = 1;
  });
  return mask;
}

function namedClasses(context: Context, numbers: Readonly<Record<string, unknown>>, path: SpecPath): Uint8Array {
  const mask = new Uint8Array(context.classes.length);
  for (const name of Object.keys(numbers)) {
    const c = classIndex(context, name, [...path, name]);
    if (c >= 0) mask[c] = 1;
  }
  return mask;
}

interface QuotaRequest {
  readonly name: string;
  readonly spec: TakeSpec | MoveSpec;
  readonly patches: Uint8Array;
}

type Quota = Pick<TakePhase, 'classes' | 'amounts' | 'rule' | 'together' | 'byClass' | 'levels'>;

const rules = { number: 'number', share: 'share', 'share-of-excess': 'excess' } as const;

/** Null after telling what is missing or too much. */
function quotaOf(context: Context, { name, spec, patches }: QuotaRequest): Quota | null {
  const all = wholeShare(context, name, spec.number);
  if (all === null) return null;
  if (all !== undefined && spec.share !== undefined) {
    tellRule(context, name, ['number', 'share']);
    return null;
  }
  const given = {
    number: all === undefined ? spec.number : undefined,
    share: all ?? spec.share,
    'share-of-excess': 'share-of-excess' in spec ? spec['share-of-excess'] : undefined,
  };
  const keys = (['number', 'share', 'share-of-excess'] as const).filter((key) => given[key] !== undefined);
  const [key] = keys;
  if (key === undefined || keys.length > 1) {
    tellRule(context, name, keys);
    return null;
  }
  const over = 'over' in spec ? spec.over : undefined;
  if ((key === 'share-of-excess') !== (over !== undefined)) {
    fail(context, 'handling-shape', [name, over === undefined ? key : 'over'], {
      message: over === undefined ? 'A share of the excess needs a level' : '`over` belongs to `share-of-excess`',
      part: 'key',
      details: { fix: over === undefined ? 'Add `over: …`.' : 'Remove it.' },
    });
    return null;
  }
  const amount = given[key] ?? 0;
  const byClass = typeof amount === 'object';
  if (!byClass && spec.classes === undefined) {
    fail(context, 'handling-shape', [name], {
      message: `\`${name}\` does not say which classes`,
      part: 'key',
      details: { expected: 'such as `classes: [adult]`, or numbers by class' },
    });
    return null;
  }
  const together = isTogether(context, { name, spec, patches });
  const path = [name, all === undefined ? key : 'number'];
  const classes = byClass
    ? namedClasses(context, amount, path)
    : classMask(context, spec.classes ?? 'all', [name, 'classes']);
  const where = { name, together, path };
  return {
    classes,
    rule: rules[key],
    together,
    byClass,
    amounts: amountsOf(context, amount, { ...where, bounds: key === 'number' ? 'from zero' : 'share' }),
    levels: levelsOf(context, over, { ...where, path: [name, 'over'] }),
  };
}

function tellRule(context: Context, name: string, keys: readonly string[]): void {
  fail(context, 'handling-shape', keys[1] === undefined ? [name] : [name, keys[1]], {
    message: keys.length === 0 ? `\`${name}\` does not say how many` : `\`${name}\` says in several ways how many`,
    part: 'key',
    details: { expected: 'one of `number`, `share` and `share-of-excess` (of a take)' },
  });
}

/** Whether all patches are one group. Where there are several it must be said. */
function isTogether(context: Context, { name, spec, patches }: QuotaRequest): boolean {
  const several = patches.filter((one) => one === 1).length > 1;
  if (several && spec.counted === undefined) {
    fail(context, 'handling-shape', [name], {
      message: `\`${name}\` does not say whether each patch is counted or all as a whole`,
      part: 'key',
      details: { expected: '`counted: each patch` or `counted: as a whole`' },
    });
  }
  return several && spec.counted === 'as a whole';
}

interface AmountPlace {
  readonly together: boolean;
  readonly path: SpecPath;
  readonly bounds: 'share' | 'from zero';
}

type Amount = number | string | Readonly<Record<string, number | string>>;

function amountsOf(context: Context, amount: Amount, { together, path, bounds }: AmountPlace): RateTable {
  const what = bounds === 'share' ? 'share' : 'number';
  // Patches that go together have no attributes in common: reading one is told here.
  if (together && typeof amount !== 'object') context.numbers.value(amount, path, { year: context.time.firstYear });
  return buildTable(context, {
    size: context.classes.length,
    bounds,
    written: (p, c) => {
      if (together && p > 0) return null;
      if (typeof amount === 'object') return writtenFor(context, amount, { path, c, what });
      return c === 0 ? { expression: amount, path, what } : null;
    },
  });
}

interface ClassPlace {
  readonly path: SpecPath;
  readonly c: number;
  readonly what: string;
}

function writtenFor(
  context: Context,
  amounts: Readonly<Record<string, number | string>>,
  { path, c, what }: ClassPlace,
): Written | null {
  const name = context.classes[c] ?? '';
  const expression = amounts[name];
  return expression === undefined ? null : { expression, path: [...path, name], what: `${what} of ${name}` };
}

function levelsOf(
  context: Context,
  over: number | string | undefined,
  { together, path }: Omit<AmountPlace, 'bounds'>,
): Float64Array {
  const levels = new Float64Array(context.patches.length);
  if (over === undefined) return levels;
  return levels.map((_, p) => {
    const { firstYear } = context.time;
    const value = context.numbers.value(over, path, together ? { year: firstYear } : whereIn(context, p, firstYear));
    withinBounds(context, { expression: over, path, what: 'level' }, { value, bounds: 'from zero', patch: undefined });
    return value;
  });
}

/** By class, handling and the first year at once. */
function survivalOf(context: Context, name: string, spec: MoveSpec | AddSpec): Float64Array {
  const product = new Float64Array(context.classes.length).fill(1);
  for (const key of ['handling-survival', 'first-year-survival'] as const) {
    const written = spec[key] ?? 1;
    if (typeof written === 'object') namedClasses(context, written, [name, key]);
    product.forEach((share, c) => {
      const one = context.classes[c] ?? '';
      const expression = typeof written === 'object' ? (written[one] ?? 1) : written;
      const path = typeof written === 'object' ? [name, key, one] : [name, key];
      product[c] = share * shareOf(context, { expression, path, what: key.replaceAll('-', ' ') });
    });
  }
  return product;
}

function shareOf(context: Context, written: Written): number {
  const value = context.numbers.value(written.expression, written.path, { year: context.time.firstYear });
  withinBounds(context, written, { value, bounds: 'share', patch: undefined });
  return value;
}

/** A number that is `all` is a share of 1; null after telling of one that is so for some classes only. */
function wholeShare(context: Context, name: string, number: Amount | undefined): Amount | undefined | null {
  if (number === 'all') return 1;
  if (typeof number !== 'object') return undefined;
  const all = Object.keys(number).filter((one) => number[one] === 'all');
  if (all.length === 0) return undefined;
  if (all.length === Object.keys(number).length) return Object.fromEntries(all.map((one) => [one, 1]));
  fail(context, 'handling-shape', [name, 'number', all[0] ?? ''], {
    message: '`all` of some classes and numbers of others do not go together',
    details: { fix: 'Write two phases or actions, one with `all` and one with numbers.' },
  });
  return null;
}
