// A dispersal: who sets out, and by which rule those that left find another patch.
import type { DispersalSpec } from '../spec/schema/spec.ts';
import { checkOwnKeys, numbersIn } from './class-rates.ts';
import { classIndex, classMask, fail, patchIndex, type Context } from './context.ts';
import { resolveKernel } from './kernel.ts';
import { resolveLinks } from './links.ts';
import type { DispersalPhase, DispersalRule, RateTable, WaysByYear } from './model.ts';
import type { Where } from './numbers.ts';
import { buildTable, whereIn, withinBounds } from './rates.ts';
import { requirePlaces } from './places.ts';
import { isThere, waysByYear } from './ways.ts';

export function resolveDispersal(context: Context, name: string, spec: DispersalSpec): DispersalPhase | null {
  const moves = classMask(context, spec.classes, [name, 'classes']);
  if (spec.shares !== undefined) return bySharesTable(context, { name, spec, moves, shares: spec.shares });
  if (!hasKernelParts(context, name, spec)) return null;
  const { memory, numbers } = context;
  const toLeave = (): RateTable => leavingTable(context, { name, spec, moves });
  const leaving = memory === undefined ? toLeave() : memory.leaving.of(name, numbers, toLeave);
  const ways = waysByYear(context, { name, spec }, (there) => {
    const rule = kernelRule(there, name, spec);
    const links = resolveLinks(there, name, spec);
    return rule === null ? null : { rule, links };
  });
  return ways === null ? null : { kind: 'dispersal', name, moves, leaving, ...ways.first, ...byYearOf(ways) };
}

function byYearOf({ byYear }: WaysByYear): Pick<DispersalPhase, 'byYear'> {
  return byYear === undefined ? {} : { byYear };
}

interface Named {
  readonly name: string;
  readonly spec: DispersalSpec;
  readonly moves: Uint8Array;
}

/** Keys whose part a table of shares plays already. */
const notWithShares = [
  'leaving',
  'kernel',
  'attraction',
  'leavers',
  'distance',
  'hazard',
  'survival-on-the-way',
] as const;

function bySharesTable(
  context: Context,
  { name, spec, moves, shares }: Named & { readonly shares: NonNullable<DispersalSpec['shares']> },
): DispersalPhase | null {
  for (const key of notWithShares) {
    if (spec[key] !== undefined) {
      fail(context, 'dispersal-shape', [name, key], {
        message: `\`${key}\` and \`shares\` exclude each other`,
        part: 'key',
        details: { fix: 'Shares already say who leaves and who arrives where: remove one of the two.' },
      });
    }
  }
  refuseOwnLeaving(context, name);
  const ways = waysByYear(context, { name, spec }, (there) => {
    const table = sharesTable(there, name, shares);
    return { rule: { by: 'shares', shares: table }, links: resolveLinks(there, name, spec) };
  });
  if (ways === null) return null;
  const { epochs = [ways.first], epochOf = new Int32Array(0) } = ways.byYear ?? {};
  const leaving = epochs.map(({ rule }) =>
    rule.by === 'shares' ? sumOfShares(context, { name, moves, table: rule.shares }) : new Float64Array(0),
  );
  return {
    kind: 'dispersal',
    name,
    moves,
    leaving: { epochs: leaving, epochOf },
    ...ways.first,
    ...byYearOf(ways),
  };
}

/** Share that goes from p to q at q * P + p, as it is in the first year of the context. */
function sharesTable(context: Context, name: string, shares: NonNullable<DispersalSpec['shares']>): Float64Array {
  const patchCount = context.patches.length;
  const table = new Float64Array(patchCount * patchCount);
  for (const [from, row] of Object.entries(shares)) {
    const p = patchIndex(context, from, [name, 'shares', from]);
    for (const [to, expression] of Object.entries(row)) {
      const path = [name, 'shares', from, to];
      const q = patchIndex(context, to, path);
      if (p < 0 || q < 0) continue;
      if (p === q) tellSelf(context, path);
      const value = context.numbers.value(expression, path, whereIn(context, p, context.time.firstYear));
      const told = { expression, path, what: `share that goes to ${to}` };
      const open = withinBounds(context, told, { value, bounds: 'share', patch: from }) && isThere(context, q);
      if (open) table[q * patchCount + p] = value;
    }
  }
  return table;
}

/** Shares say for every patch who leaves it, so nothing can be different under `in`. */
function refuseOwnLeaving(context: Context, name: string): void {
  for (const { name: patch } of context.patches) {
    if (numbersIn(context, patch, name) === undefined) continue;
    fail(context, 'dispersal-shape', ['in', patch, name], {
      message: `\`${name}\` has a table of shares, which already says who leaves ${patch}`,
      part: 'key',
      details: { fix: 'Remove this, and change the shares.' },
    });
  }
}

function tellSelf(context: Context, path: readonly string[]): void {
  fail(context, 'self-share', path, {
    message: 'A share goes from a patch to itself',
    part: 'key',
    details: { fix: 'Remove it: who does not leave stays.' },
  });
}

function sumOfShares(
  context: Context,
  { name, moves, table }: { readonly name: string; readonly moves: Uint8Array; readonly table: Float64Array },
): Float64Array {
  const [patchCount, classCount] = [context.patches.length, context.classes.length];
  const leaving = new Float64Array(patchCount * classCount);
  for (let p = 0; p < patchCount; p++) {
    let sum = 0;
    for (let q = 0; q < patchCount; q++) sum += table[q * patchCount + p] ?? 0;
    const from = context.patches[p]?.name ?? '';
    if (sum > 1 + 1e-9) {
      fail(context, 'shares-above-one', [name, 'shares', from], {
        message: `The shares that leave ${from} add up to ${Number(sum.toFixed(6))}`,
        part: 'key',
        details: { expected: 'at most 1' },
      });
    }
    for (let c = 0; c < classCount; c++) if (moves[c] === 1) leaving[p * classCount + c] = Math.min(1, sum);
  }
  return leaving;
}

function hasKernelParts(context: Context, name: string, spec: DispersalSpec): boolean {
  const wanted = {
    leaving: 'the share that sets out, such as `leaving: 0.2`, or a table of `shares`',
    kernel: 'such as `kernel: { shape: exponential, mean: 4 km }`, or a table of `shares`',
    leavers: '`leavers: all arrive` (isolation costs nothing by itself) or `leavers: may miss`',
  } as const;
  let complete = true;
  for (const key of ['leaving', 'kernel', 'leavers'] as const) {
    if (spec[key] !== undefined) continue;
    complete = false;
    fail(context, 'dispersal-shape', [name], {
      message: `The dispersal \`${name}\` does not say \`${key}\``,
      part: 'key',
      details: { expected: wanted[key] },
    });
  }
  if (spec.hazard !== undefined && spec['survival-on-the-way'] !== undefined) {
    complete = false;
    fail(context, 'dispersal-shape', [name, 'hazard'], {
      message: '`hazard` and `survival-on-the-way` exclude each other',
      part: 'key',
      details: { fix: 'Remove one of the two.' },
    });
  }
  return complete;
}

function leavingTable(context: Context, { name, spec, moves }: Named): RateTable {
  const { leaving } = spec;
  if (typeof leaving === 'object') {
    for (const key of Object.keys(leaving)) {
      const c = classIndex(context, key, [name, 'leaving', key]);
      if (c < 0 || moves[c] === 1) continue;
      fail(context, 'dispersal-shape', [name, 'leaving', key], {
        message: `\`${key}\` leaves, but is not among the classes of \`${name}\``,
        part: 'key',
        details: { fix: `Add it to \`classes\`, or remove it here.` },
      });
    }
  }
  checkOwnKeys(context, name);
  return buildTable(context, {
    size: context.classes.length,
    bounds: 'share',
    written: (p, c) => {
      if (leaving === undefined || moves[c] !== 1) return null;
      const patch = context.patches[p]?.name ?? '';
      const own = numbersIn(context, patch, name)?.[context.classes[c] ?? ''];
      if (typeof own === 'number' || typeof own === 'string') {
        return { expression: own, path: ['in', patch, name, context.classes[c] ?? ''], what: 'leaving share' };
      }
      if (typeof leaving !== 'object') return { expression: leaving, path: [name, 'leaving'], what: 'leaving share' };
      const key = context.classes[c] ?? '';
      const expression = leaving[key];
      return expression === undefined
        ? null
        : { expression, path: [name, 'leaving', key], what: `leaving share of ${key}` };
    },
  });
}

function kernelRule(context: Context, name: string, spec: DispersalSpec): DispersalRule | null {
  const { kernel, leavers } = spec;
  if (kernel === undefined || leavers === undefined) return null;
  if (!requirePlaces(context, name, spec['distance-between'])) return null;
  const resolved = resolveKernel(context, name, kernel);
  const attraction = attractionOf(context, name, spec);
  if (leavers === 'may miss') requireAreas(context, name);
  const where: Where = { year: context.time.firstYear };
  const onTheWay = spec['survival-on-the-way'] ?? 1;
  const wayPath = [name, 'survival-on-the-way'];
  const survivalOnTheWay = context.numbers.value(onTheWay, wayPath, where);
  withinBounds(
    context,
    { expression: onTheWay, path: wayPath, what: 'survival on the way' },
    { value: survivalOnTheWay, bounds: 'share', patch: undefined },
  );
  const hazardPath = [name, 'hazard'];
  const hazardPerKm = context.numbers.value(spec.hazard ?? 0, hazardPath, { ...where, dimension: 'per-length' });
  withinBounds(
    context,
    { expression: spec.hazard ?? 0, path: hazardPath, what: 'hazard per km' },
    { value: hazardPerKm, bounds: 'from zero', patch: undefined },
  );
  if (resolved === null) return null;
  return {
    by: 'kernel',
    kernel: resolved,
    ...(spec['distance-between'] === 'nearest edges' ? { between: 'nearest edges' } : {}),
    attraction,
    leavers,
    hazardPerKm,
    survivalOnTheWay,
    ...(leavers === 'may miss' ? areasOf(context) : {}),
  };
}

/** Areas as they are in this year, where they are not the same in all. */
function areasOf(context: Context): { readonly areaKm2?: Float64Array } {
  const { firstYear } = context.time;
  const areas = context.patches.map((patch, p) => {
    const where = whereIn(context, p, firstYear);
    const written = where.attributes?.get('area');
    const value = context.numbers.attribute('area', where) ?? patch.areaKm2 ?? NaN;
    if (typeof written === 'object') {
      withinBounds(context, { ...written, what: 'area' }, { value, bounds: 'from zero', patch: patch.name });
    }
    return value;
  });
  return areas.every((area, p) => area === context.patches[p]?.areaKm2) ? {} : { areaKm2: Float64Array.from(areas) };
}

function attractionOf(context: Context, name: string, spec: DispersalSpec): Float64Array {
  const expression = spec.attraction ?? 1;
  const path = [name, 'attraction'];
  return Float64Array.from(context.patches, (patch, p) => {
    const value = context.numbers.value(expression, path, whereIn(context, p, context.time.firstYear));
    withinBounds(context, { expression, path, what: 'attraction' }, { value, bounds: 'from zero', patch: patch.name });
    return isThere(context, p) ? value : 0;
  });
}

function requireAreas(context: Context, name: string): void {
  const without = context.patches.filter((patch) => patch.areaKm2 === null);
  if (without.length === 0) return;
  fail(context, 'missing-area', [name, 'leavers'], {
    message: `Leavers may miss, and \`${without[0]?.name}\` has no area`,
    details: {
      expected: 'an `area` for every patch',
      reason: 'The chance of meeting a patch is the kernel at its distance times its area.',
    },
  });
}
