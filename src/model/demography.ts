// A whole year of fates and births in one matrix a patch, entry by entry or as a Leslie matrix.
import type { SpecPath } from '../spec/document.ts';
import type { Spec } from '../spec/schema/spec.ts';
import { fail, patchIndex, type Context } from './context.ts';
import { missingRates } from './life-phases.ts';
import type { DemographyPhase, RateTable } from './model.ts';
import { buildTable, type Written } from './rates.ts';

type DemographySpec = NonNullable<Spec['demography']>;

/** The expression at a row and column of the fates or the births, or null for 0. */
type Entry = (part: 'fates' | 'births', to: number, from: number) => Written | null;

export function resolveDemography(context: Context): DemographyPhase | null {
  const { spec, patches } = context;
  if (spec.demography === undefined) {
    return missingRates(context, 'demography', '`demography: { fates: …, births: … }`');
  }
  for (const [patch, own] of Object.entries(spec.in ?? {})) {
    if (own.demography !== undefined) patchIndex(context, patch, ['in', patch]);
  }
  const general = readEntries(context, spec.demography, ['demography']);
  const own = patches.map(({ name }) => {
    const demography = spec.in?.[name]?.demography;
    if (demography === undefined) return general;
    return withGeneral(readEntries(context, demography, ['in', name, 'demography']), demography, general);
  });
  const table = (part: 'fates' | 'births'): RateTable => matrices(context, part, own);
  const phase: DemographyPhase = {
    kind: 'demography',
    name: 'demography',
    fates: table('fates'),
    births: table('births'),
  };
  checkColumns(context, phase.fates);
  return phase;
}

/** What a patch does not write of its own, all fates or all births, is as everywhere. */
function withGeneral(own: Entry | null, demography: DemographySpec, general: Entry | null): Entry | null {
  if ('survival' in demography || own === null) return own;
  return (part, to, from) =>
    demography[part] === undefined ? (general?.(part, to, from) ?? null) : own(part, to, from);
}

function matrices(context: Context, part: 'fates' | 'births', own: readonly (Entry | null)[]): RateTable {
  const n = context.classes.length;
  return buildTable(context, {
    size: n * n,
    bounds: part === 'fates' ? 'share' : 'from zero',
    written: (patch, i) => own[patch]?.(part, Math.floor(i / n), i % n) ?? null,
  });
}

function readEntries(context: Context, demography: DemographySpec, path: SpecPath): Entry | null {
  return 'survival' in demography ? readLeslie(context, demography, path) : readSquares(context, demography, path);
}

function readSquares(
  context: Context,
  squares: Exclude<DemographySpec, { survival: unknown }>,
  path: SpecPath,
): Entry | null {
  const n = context.classes.length;
  let fits = true;
  for (const part of ['fates', 'births'] as const) {
    const rows = squares[part];
    if (rows === undefined) continue;
    const bad = rows.length === n ? rows.findIndex((row) => row.length !== n) : -2;
    if (bad === -1) continue;
    fits = false;
    const found = bad === -2 ? `${rows.length} rows` : `${rows[bad]?.length} numbers`;
    wrongSize(context, bad === -2 ? [...path, part] : [...path, part, bad], {
      found,
      expected: `${n} rows of ${n} numbers`,
    });
  }
  if (!fits) return null;
  return (part, to, from) => {
    const expression = squares[part]?.[to]?.[from];
    if (expression === undefined) return null;
    const names = `${context.classes[from]} to ${context.classes[to]}`;
    const what = part === 'fates' ? `share that goes from ${names}` : `births from ${names}`;
    return { expression, path: [...path, part, to, from], what };
  };
}

type LeslieSpec = Extract<DemographySpec, { survival: unknown }>;

function readLeslie(context: Context, { survival, fecundity }: LeslieSpec, path: SpecPath): Entry | null {
  const { classes, spec } = context;
  const n = classes.length;
  if (spec.oldest === undefined) {
    fail(context, 'missing-oldest', path, {
      message: `It is not said whether \`${classes.at(-1)}\` stays in its class or leaves`,
      part: 'key',
      details: { expected: '`oldest: open-ended` (the oldest stay) or `oldest: terminal` (the oldest leave)' },
    });
    return null;
  }
  if (context.sexes !== null) {
    fail(context, 'sexes-shape', path, {
      message: 'A Leslie matrix holds one sex, and the classes are of both',
      part: 'key',
      details: { expected: '`demography: { fates: …, births: … }` over all classes' },
    });
    return null;
  }
  const wanted = spec.oldest === 'terminal' ? n - 1 : n;
  if (fecundity.length !== n) {
    wrongSize(context, [...path, 'fecundity'], { found: `${fecundity.length} numbers`, expected: `${n}, one a class` });
    return null;
  }
  if (survival.length !== wanted) {
    const why =
      spec.oldest === 'terminal'
        ? 'since nobody survives the oldest class'
        : 'the last for the oldest class, which stays';
    wrongSize(context, [...path, 'survival'], { found: `${survival.length} numbers`, expected: `${wanted}, ${why}` });
    return null;
  }
  return (part, to, from) => {
    if (part === 'births') {
      if (to !== 0) return null;
      return {
        expression: fecundity[from] ?? 0,
        path: [...path, 'fecundity', from],
        what: `fecundity of ${classes[from]}`,
      };
    }
    const expression = survival[from];
    if (to !== Math.min(from + 1, n - 1) || expression === undefined) return null;
    return { expression, path: [...path, 'survival', from], what: `survival of ${classes[from]}` };
  };
}

function wrongSize(
  context: Context,
  path: SpecPath,
  details: { readonly found: string; readonly expected: string },
): void {
  fail(context, 'matrix-size', path, {
    message: 'The matrix does not have the size of the classes',
    part: 'value',
    details,
  });
}

/** One animal has one fate: a column of the fates adds up to no more than 1. */
function checkColumns(context: Context, fates: RateTable): void {
  const n = context.classes.length;
  const told = new Set<number>();
  for (const table of fates.epochs) {
    for (let i = 0; i < context.patches.length * n; i++) {
      const [p, from] = [Math.floor(i / n), i % n];
      let sum = 0;
      for (let to = 0; to < n; to++) sum += table[(p * n + to) * n + from] ?? 0;
      if (sum <= 1 + 1e-9 || told.has(from)) continue;
      told.add(from);
      const own = context.spec.in?.[context.patches[p]?.name ?? '']?.demography !== undefined;
      fail(context, 'column-above-one', own ? ['in', context.patches[p]?.name ?? '', 'demography'] : ['demography'], {
        message: `The fates of ${context.classes[from]} add up to ${Number(sum.toFixed(6))}`,
        part: 'key',
        details: {
          expected: 'at most 1, since one animal has one fate',
          fix: 'Put young into `births`; columns are from, rows are to.',
        },
      });
    }
  }
}
