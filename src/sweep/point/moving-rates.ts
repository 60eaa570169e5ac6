// Rates that move with what is swept: where they stand in the tables of the phases, and how they are worked out anew. Null where
// anything else of the model moves, too: then every point is compiled from its spec.
import { pinned } from '../../machine/pinned.ts';
import type { Model, Phase, RateTable } from '../../model/model.ts';
import { resolveWithContext } from '../../model/resolve.ts';
import type { Context } from '../../model/context.ts';
import { evaluateColumns } from '../../spec/expression/evaluate-columns.ts';
import { namesIn } from '../../spec/expression/names.ts';
import type { Ast } from '../../spec/expression/ast.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import { columnsOfPoint, type Columns, type Factor, type Value } from '../design/factor.ts';
import { namedPlaces } from './named-places.ts';

type RateField = 'births' | 'survival' | 'leaving';

/** One number of a table. */
export interface MovingRate {
  readonly phase: number;
  readonly field: RateField;
  readonly index: number;
  /** Which of the numbers of `ratesAt` it is. */
  readonly source: number;
}

export interface MovingRates {
  readonly model: Model;
  /** What the model was resolved from. */
  readonly context: Context;
  readonly rates: readonly MovingRate[];
  /** How many different numbers they are. */
  readonly sources: number;
  /** Of the first so many rows of the columns of the factors. */
  ratesAt(columns: Columns, rows: number): RateColumns;
}

export interface RateColumns {
  /** In the order of `source`, each a number a row. */
  readonly columns: readonly Float64Array[];
  /** By row, 1 where all are rates; else the whole compiler has to say what stands against it. */
  readonly fine: Uint8Array;
}

/** In the order of `source`; null where one is no rate. */
export function ratesOf({ ratesAt }: Pick<MovingRates, 'ratesAt'>, values: readonly Value[]): Float64Array | null {
  const { columns, fine } = ratesAt(columnsOfPoint(values), 1);
  return fine[0] === 1 ? Float64Array.from(columns, (column) => column[0] ?? NaN) : null;
}

/** `spec` has the base values of the factors, which are named parameters or numbers at places. */
export function movingRates(spec: Spec, factors: readonly Factor[]): MovingRates | null {
  const named = namedPlaces(spec, factors);
  if (named === null) return null;
  const { model, context } = resolveWithContext(named.spec);
  const names = new Set(named.names);
  if (model === null || !isPlain(model, context, names)) return null;
  const found = collect(model, context, names);
  if (found === null || movesElsewhere(context, names, found.paths)) return null;
  // A place that is no expression of the language is not worked out as one.
  if (named.fresh.some((name) => !found.read.has(name))) return null;
  return { model, context, ...found };
}

/** Nothing but tables of rates can move: no broods with a size each, no attributes that are worked out. */
function isPlain(model: Model, { spec, attributes }: Context, names: ReadonlySet<string>): boolean {
  if ([...names].some((name) => spec.parameters?.[name] === undefined)) return false;
  if (attributes.some((own) => [...own.values()].some((value) => typeof value !== 'number'))) return false;
  return model.phases.every(
    (phase) =>
      !(phase.kind === 'breeding' && (phase.offspring !== undefined || phase.mating !== undefined)) &&
      phase.kind !== 'demography',
  );
}

interface Collected {
  readonly rates: readonly MovingRate[];
  readonly sources: number;
  readonly paths: ReadonlySet<string>;
  /** Names that the rates read. */
  readonly read: ReadonlySet<string>;
  readonly ratesAt: MovingRates['ratesAt'];
}

interface Source {
  readonly ast: Ast;
  readonly attributes: ReadonlyMap<string, unknown> | undefined;
  readonly scale: number;
  readonly mostOne: boolean;
}

function collect(model: Model, context: Context, names: ReadonlySet<string>): Collected | null {
  const sources = new Map<string, { readonly source: Source; readonly at: number }>();
  const rates: MovingRate[] = [];
  const paths = new Set<string>();
  const read = new Set<string>();
  for (const [phase, own] of model.phases.entries()) {
    const table = tableOf(own);
    if (table === null || table.table.written === undefined) continue;
    const size = (table.table.epochs[0]?.length ?? 0) / model.patches.length;
    for (const [index, written] of table.table.written.entries()) {
      const patch = Math.floor(index / size);
      const attributes = context.attributes[patch];
      const ast =
        written === null
          ? null
          : context.numbers.expanded(written.expression, [...written.path], { keep: names, attributes });
      if (written === null || ast === null || !namesIn(ast).some((name) => names.has(name))) continue;
      if (table.table.epochs.length !== 1 || namesIn(ast).includes('year')) return null;
      const scale = scaleOf(own, context);
      const local = namesIn(ast).some((name) => attributes?.has(name) === true);
      const key = JSON.stringify([written.expression, scale, local ? patch : -1, table.field === 'births']);
      const known = sources.get(key) ?? {
        source: { ast, attributes, scale, mostOne: table.field !== 'births' },
        at: sources.size,
      };
      sources.set(key, known);
      rates.push({ phase, field: table.field, index, source: known.at });
      paths.add(written.path.join('\0'));
      for (const name of namesIn(ast)) read.add(name);
    }
  }
  const order = [...sources.values()].map(({ source }) => source);
  const places = new Map([...names].map((name, k) => [name, k]));
  const ratesAt: MovingRates['ratesAt'] = (columns, count) => ratesIn(order, places, { columns, count });
  const base = ratesOf(
    { ratesAt },
    [...names].map((name) => valueOf(context.spec, name)),
  );
  const same = rates.every(
    (rate) => base?.[rate.source] === tableOf(model.phases[rate.phase])?.table.epochs[0]?.[rate.index],
  );
  return base !== null && same ? { rates, sources: order.length, paths, read, ratesAt } : null;
}

function valueOf(spec: Spec, name: string): number {
  const written = spec.parameters?.[name];
  const value = typeof written === 'object' ? written.value : written;
  return typeof value === 'number' ? value : NaN;
}

function ratesIn(
  sources: readonly Source[],
  places: ReadonlyMap<string, number>,
  { columns, count }: { readonly columns: Columns; readonly count: number },
): RateColumns {
  const numbers = columns.map((column) =>
    column instanceof Float64Array ? column : Float64Array.from(column, Number),
  );
  const fine = new Uint8Array(count).fill(1);
  const rates = sources.map(({ ast, attributes, scale, mostOne }) => {
    const lookUp = (name: string): Float64Array | number | undefined => {
      const own = attributes?.get(name);
      return typeof own === 'number' ? own : numbers[places.get(name) ?? -1];
    };
    const found = evaluateColumns(ast, lookUp, pinned, count);
    for (let row = 0; row < count; row++) {
      const value = found[row] ?? NaN;
      if (!(value >= 0) || (mostOne && value > 1)) fine[row] = 0;
      found[row] = value * scale;
    }
    return found;
  });
  return { columns: rates, fine };
}

function tableOf(phase: Phase | undefined): { readonly table: RateTable; readonly field: RateField } | null {
  switch (phase?.kind) {
    case 'breeding':
      return { table: phase.births, field: 'births' };
    case 'survival':
      return { table: phase.survival, field: 'survival' };
    case 'dispersal':
      return { table: phase.leaving, field: 'leaving' };
    default:
      return null;
  }
}

/** Births of one sex are written as young of both. */
function scaleOf(phase: Phase, { spec, sexes }: Context): number {
  if (phase.kind !== 'breeding' || sexes !== null) return 1;
  const named = spec.named[phase.name];
  const births = phase.name === 'breeding' ? spec.births : named?.kind === 'breeding' ? named.births : undefined;
  const share = births?.['female-share'];
  return typeof share === 'number' ? share : share === undefined ? 1 : NaN;
}

/** Whether a place that is no such table reads what is swept. */
function movesElsewhere({ numbers }: Context, names: ReadonlySet<string>, paths: ReadonlySet<string>): boolean {
  return numbers.uses().some((use) => {
    if (use.path[0] === 'parameters' || paths.has(use.path.join('\0'))) return false;
    return numbers.behind(use).some((name) => names.has(name));
  });
}

/** The model with the rates of one point. */
export function withRates(model: Model, rates: readonly MovingRate[], values: Float64Array): Model {
  const tables = new Map<number, Float64Array>();
  for (const { phase, index, source } of rates) {
    const table = tables.get(phase) ?? (tableOf(model.phases[phase])?.table.epochs[0] ?? new Float64Array(0)).slice();
    table[index] = values[source] ?? NaN;
    tables.set(phase, table);
  }
  const phases = model.phases.map((phase, p): Phase => {
    const own = tables.get(p);
    return own === undefined ? phase : withTable(phase, own);
  });
  return { ...model, phases };
}

function withTable(phase: Phase, epoch: Float64Array): Phase {
  const changed = (table: RateTable): RateTable => ({ ...table, epochs: [epoch] });
  switch (phase.kind) {
    case 'breeding':
      return { ...phase, births: changed(phase.births) };
    case 'survival':
      return { ...phase, survival: changed(phase.survival) };
    case 'dispersal':
      return { ...phase, leaving: changed(phase.leaving) };
    default:
      return phase;
  }
}
