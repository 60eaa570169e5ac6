// Year-to-year variation in the image: the records of the year program and the sections that they name.
import * as layout from '../../../assembly/layout.ts';
import type { Landscape } from '../../landscape/landscape.ts';
import type { Varied } from '../../model/chance.ts';
import type { Model } from '../../model/model.ts';
import { distributionOf, type Distribution } from '../../model/variation/distribution.ts';
import { betaTable, gammaTable, quantileReach, type QuantileTable } from '../../numeric/chance/quantile-table.ts';
import { factorOf, type Factor } from '../weather/factor.ts';
import type { SlotPlan } from '../weather/slots.ts';
import { keyOfName, keysOfNames } from './keys.ts';
import { record } from './record.ts';
import { plain, type SectionList } from './section.ts';

export interface WeatherRequest {
  readonly list: SectionList;
  readonly model: Model;
  readonly landscape: Landscape;
  readonly slots: SlotPlan;
  /** The first of the lasting numbers that is free. */
  readonly weather: number;
}

export interface WeatherRecords {
  readonly records: readonly Int32Array[];
  /** Numbers of each replicate that last, and those for work. */
  readonly weather: number;
  readonly work: number;
}

/** Key of what all patches, or all quantities, share. */
export const sharedPatch = keyOfName('patch of the landscape') | 0;
const sharedQuantity = keyOfName('quantity of the year') | 0;

export function variationRecords(request: WeatherRequest): WeatherRecords {
  const { list, model, landscape, slots, weather } = request;
  const { variation } = model;
  if (variation === null || variation.varied.length === 0) return { records: [], weather: 0, work: 0 };
  const patchNames = model.patches.map(({ name }) => name);
  const quantityNames = variation.varied.map(({ name }) => name);
  const overPatches = factorOf(landscape.weather ?? { of: 0, repaired: 0 }, patchNames);
  const overRates = factorOf(variation.betweenRates, quantityNames);
  const tables = new Tables();
  const quantities = variation.varied.flatMap((varied, k) => [
    slots.varied[k] ?? layout.none,
    addDistributions(list, varied, tables),
  ]);
  const carry = Float64Array.of(
    variation.autocorrelation,
    Math.sqrt(1 - variation.autocorrelation * variation.autocorrelation),
  );
  const vary = record(layout.opVariation, keyOfName('condition:variation') | 0, layout.none, [
    addKeys(list, overPatches, 'patch', sharedPatch),
    addFactor(list, overPatches, 'correlation between patches'),
    addKeys(list, overRates, 'quantity', sharedQuantity),
    addFactor(list, overRates, 'correlation between rates'),
    list.add(plain(layout.kindCarry, carry, 'autocorrelation')),
    list.add({
      ...plain(layout.kindQuantities, Int32Array.from(quantities), 'variation'),
      columns: layout.quantityWords,
    }),
    list.add(plain(layout.kindQuantileTables, tables.numbers(), 'variation')),
    weather,
  ]);
  const columns = overPatches.columns.length;
  return {
    records: [vary],
    weather: columns * overRates.columns.length,
    work: columns * quantityNames.length,
  };
}

function addKeys(list: SectionList, { columns }: Factor, what: string, shared: number): number {
  const own = columns.filter((name) => name !== null);
  const keys = keysOfNames(what, own);
  const all = columns.map((name) => (name === null ? shared : (keys[own.indexOf(name)] ?? 0)));
  return list.add(plain(layout.kindColumnKeys, Int32Array.from(all), 'names'));
}

/** The row of the starts; columns and weights stand in the next two. */
function addFactor(list: SectionList, { start, column, weight }: Factor, reads: string): number {
  const row = list.add(plain(layout.kindFactorStart, start, reads));
  list.add(plain(layout.kindFactorColumn, column, reads));
  list.add(plain(layout.kindFactorWeight, weight, reads));
  return row;
}

/** Plans and points of a sweep ask for the same tables one after the other, and each takes long. */
const recent = new Map<string, QuantileTable>();
const mostRecent = 256;

function recentTable(key: string, make: () => QuantileTable): QuantileTable {
  const before = recent.get(key);
  if (before !== undefined) return before;
  const table = make();
  if (recent.size >= mostRecent) recent.clear();
  recent.set(key, table);
  return table;
}

/** Quantile tables, each once however many patches have it. */
class Tables {
  readonly #known = new Map<string, { readonly first: number; readonly table: QuantileTable }>();
  #size = 0;

  place(key: string, sd: number, make: () => QuantileTable): readonly [number, number] {
    const known = this.#known.get(key);
    if (known !== undefined) return [known.first, known.table.perUnit];
    const table = recentTable(`${key} ${sd}`, make);
    if (quantileReach !== layout.tableReach) throw new Error('Quantile tables have another reach than the kernel.');
    const first = this.#size;
    this.#size += table.nodes.length;
    this.#known.set(key, { first, table });
    return [first, table.perUnit];
  }

  numbers(): Float64Array {
    const numbers = new Float64Array(this.#size);
    for (const { first, table } of this.#known.values()) numbers.set(table.nodes, first);
    return numbers;
  }
}

/** Rates are written as shares of their mean, parameters as they are. */
function addDistributions(list: SectionList, varied: Varied, tables: Tables): number {
  const { epochs, epochOf } = varied.mean;
  const rows = epochs.map((means, e) =>
    Float64Array.from(
      Array.from(means).flatMap((mean, p) => {
        const sd = varied.sd.epochs[e]?.[p] ?? 0;
        const found = distributionOf(varied.shape, { mean, sd });
        if (found === null) throw new Error(`${varied.name} was not found impossible before it was compiled.`);
        return coded(found, { sd, scale: varied.of.kind === 'parameter' ? 1 : mean === 0 ? 1 : 1 / mean, tables });
      }),
    ),
  );
  return addEpochs(list, rows, { kind: layout.kindDistributions, epochOf, reads: `variation of ${varied.name}` });
}

interface Coding {
  readonly sd: number;
  readonly scale: number;
  readonly tables: Tables;
}

function coded(found: Distribution, { sd, scale, tables }: Coding): readonly number[] {
  switch (found.shape) {
    case 'constant':
      return [layout.distributionConstant, 0, 0, found.value === 0 ? 1 : found.value * scale];
    case 'lognormal':
      return [layout.distributionLognormal, found.mu, found.sigma, scale];
    case 'logit-normal':
      return [layout.distributionLogit, found.mu, found.sigma, scale];
    case 'beta': {
      const place = tables.place(`beta ${found.a} ${found.b}`, sd, () => betaTable(found, sd));
      return [layout.distributionShareTable, ...place, scale];
    }
    case 'gamma': {
      const shape = { shape: found.k, scale: found.scale };
      const place = tables.place(`gamma ${found.k} ${found.scale}`, sd, () => gammaTable(shape, sd));
      return [layout.distributionPositiveTable, ...place, scale];
    }
  }
}

interface EpochSection {
  readonly kind: number;
  readonly epochOf: Int32Array;
  readonly reads: string;
}

export function addEpochs(
  list: SectionList,
  rows: readonly Float64Array[],
  { kind, epochOf, reads }: EpochSection,
): number {
  const columns = rows[0]?.length ?? 0;
  const data = new Float64Array(columns * rows.length);
  rows.forEach((row, i) => data.set(row, i * columns));
  const epochs = rows.length > 1 ? list.add(plain(layout.kindEpochOf, epochOf, reads)) : layout.none;
  return list.add({ kind, data, columns, epochOf: epochs, reads });
}
