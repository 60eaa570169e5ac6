// Results as tidy tables: one row an observation, each column with its unit and meaning in the dictionary.
import type { Model } from '../model/model.ts';
import type { Chance, Draws, PathResults, Quantiles, RunResults, YearSummary } from '../results/results.ts';
import { inFileOrder } from '../results/summarise.ts';

export type Cell = string | number | null;

type ColumnType = 'text' | 'integer' | 'number';

export interface Column {
  readonly name: string;
  readonly unit: string;
  readonly meaning: string;
  /** Where it is not said: text without a unit, an integer for a year, a number with any other unit. */
  readonly type?: ColumnType;
}

export interface Table {
  readonly name: string;
  readonly columns: readonly Column[];
  readonly rows: readonly (readonly Cell[])[];
}

const year: Column = { name: 'year', unit: 'year', meaning: 'Calendar year of the count; the first is the start.' };
const patch: Column = { name: 'patch', unit: '', meaning: 'Name of the patch; empty for all patches together.' };
const animals = (name: string, meaning: string): Column => ({ name, unit: 'animals', meaning });
const share = (name: string, meaning: string): Column => ({ name, unit: 'share', meaning });

export function runTables(model: Model, results: RunResults): readonly Table[] {
  return [
    abundanceTable(results),
    outcomeTable(results),
    chanceTable(results),
    firstTable(results),
    ...(results.handled.length === 0 ? [] : [handledTable(results)]),
    inUseTable(results),
    lowestTable(results),
    patchTable(model, results),
    parameterTable(model),
    ...(results.draws === undefined ? [] : [drawTable(results, results.draws)]),
  ];
}

export function pathTables({ abundance }: PathResults): readonly Table[] {
  return [
    {
      name: 'path',
      columns: [
        year,
        patch,
        { name: 'class', unit: '', meaning: 'Name of the class.' },
        animals('animals', 'Animals on the path without chance.'),
      ],
      rows: abundance.map((row) => [row.year, row.patch, row.class, row.animals]),
    },
  ];
}

function abundanceTable({ abundance }: RunResults): Table {
  const row = (name: string | null, s: YearSummary, empty: number | null): readonly Cell[] => [
    ...[s.year, name, s.mean, s.sd],
    ...quantileCells(s.quantiles),
    empty,
  ];
  return {
    name: 'abundance',
    columns: [
      year,
      patch,
      animals('mean', 'Mean over the runs.'),
      animals('sd', 'Standard deviation between the runs.'),
      ...quantileColumns('animals', 'Count'),
      share('empty', 'Share of the runs in which nobody is in the patch; missing for all patches together.'),
    ],
    rows: [
      ...abundance.whole.map((summary) => row(null, summary, null)),
      ...abundance.patches.flatMap((one) =>
        one.byYear.map((summary, t) => row(one.patch, summary, one.empty?.[t] ?? null)),
      ),
    ],
  };
}

const levels = ['0.05', '0.25', '0.5', '0.75', '0.95'] as const;

function quantileColumns(unit: string, what: string): readonly Column[] {
  return levels.map((level) => ({
    name: `quantile_${level}`,
    unit,
    meaning: `${what} that a share of ${level} of the runs does not exceed.`,
  }));
}

function quantileCells(quantiles: Quantiles): readonly Cell[] {
  return levels.map((level) => quantiles[level]);
}

const outcome: Column = { name: 'outcome', unit: '', meaning: "The author's name of the outcome." };

function outcomeTable({ outcomes }: RunResults): Table {
  return {
    name: 'outcomes',
    columns: [
      outcome,
      { name: 'definition', unit: '', meaning: 'The outcome in words.' },
      { name: 'when', unit: '', meaning: '`ever`: at some yearly count; `at end`: at the last count.' },
      share('probability', 'Share of the runs.'),
      share('lower', 'Lower end of the 95 % interval from the number of runs.'),
      share('upper', 'Upper end of the 95 % interval from the number of runs.'),
      share('lower_unknown', 'Lower end of the 95 % interval from what is not known; empty where it was not drawn.'),
      share('upper_unknown', 'Upper end of the 95 % interval from what is not known; empty where it was not drawn.'),
    ],
    rows: outcomes.flatMap(({ name, definition, ever, atEnd }) => [
      [name, definition, 'ever', ...chanceCells(ever)],
      [name, definition, 'at end', ...chanceCells(atEnd)],
    ]),
  };
}

function chanceCells({ probability, interval, intervalFromUnknown }: Chance): readonly Cell[] {
  const unknown = [intervalFromUnknown?.lower ?? null, intervalFromUnknown?.upper ?? null];
  return [probability, interval.lower, interval.upper, ...unknown];
}

function chanceTable({ outcomes }: RunResults): Table {
  return {
    name: 'chances_by_year',
    columns: [
      outcome,
      year,
      share('ever', 'Share of the runs that have come to it by this year.'),
      share('lower', 'Lower edge of a band that holds for the whole curve with 95 %.'),
      share('upper', 'Upper edge of that band.'),
      share('now', 'Share of the runs in which it is so in this year.'),
    ],
    rows: outcomes.flatMap(({ name, byYear }) =>
      byYear.map((one) => [name, one.year, one.ever, one.lower, one.upper, one.now]),
    ),
  };
}

function firstTable({ outcomes }: RunResults): Table {
  return {
    name: 'when_first',
    columns: [
      outcome,
      ...levels.map((level): Column => ({
        name: `year_${level}`,
        unit: 'year',
        meaning: `Calendar year by which a share of ${level} of the runs has come to it; empty where fewer ever do.`,
      })),
      {
        name: 'mean_years',
        unit: 'years',
        meaning: 'Years from the start to it, the mean over the runs that come to it; empty where none does.',
      },
    ],
    rows: outcomes.map(({ name, whenFirst: { quantiles, meanYears } }) => [
      name,
      ...levels.map((level) => quantiles[level]),
      meanYears,
    ]),
  };
}

function handledTable({ handled }: RunResults): Table {
  const part = (name: string, meaning: string): readonly Column[] => [
    animals(`${name}_mean`, meaning),
    animals(`${name}_quantile_0.05`, 'Number that a share of 0.05 of the runs does not exceed.'),
    animals(`${name}_quantile_0.95`, 'Number that a share of 0.95 of the runs does not exceed.'),
  ];
  const cells = (one: { readonly mean: number; readonly quantiles: YearSummary['quantiles'] }): readonly Cell[] => [
    one.mean,
    one.quantiles['0.05'],
    one.quantiles['0.95'],
  ];
  return {
    name: 'handled',
    columns: [
      { name: 'phase', unit: '', meaning: 'Name of the take, move or release.' },
      { name: 'does', unit: '', meaning: '`take`, `move` or `add`.' },
      { ...year, meaning: 'Calendar year; empty for all years together.' },
      ...part('handled', 'Animals taken, caught to be moved, or released; mean over the runs.'),
      ...part('died', 'Of those moved or released, the ones that did not live through it; mean over the runs.'),
      ...part('shortfall', 'Animals that were wanted and not there; mean over the runs.'),
    ],
    rows: handled.flatMap(({ phase, does, byYear, inAll }) =>
      [...byYear, { year: null, ...inAll }].map((one) => [
        phase,
        does,
        one.year,
        ...cells(one.handled),
        ...cells(one.died),
        ...cells(one.shortfall),
      ]),
    ),
  };
}

function inUseTable({ patchesInUse }: RunResults): Table {
  return {
    name: 'patches_in_use',
    columns: [
      year,
      { name: 'mean', unit: 'patches', meaning: 'Mean number of patches with at least one animal.' },
      ...quantileColumns('patches', 'Number of patches'),
    ],
    rows: patchesInUse.map((one) => [one.year, one.mean, ...quantileCells(one.quantiles)]),
  };
}

function lowestTable({ meanLowestCount, replicates, stopped }: RunResults): Table {
  return {
    name: 'lowest_count',
    columns: [
      animals('mean', 'Mean over the runs of the lowest count of all animals, the start included.'),
      animals('sd', 'Standard deviation between the runs.'),
      animals('standard_error', 'How far the mean may be off from the number of runs.'),
      { name: 'runs', unit: 'runs', type: 'integer', meaning: 'Runs that every number of these tables is from.' },
      { name: 'stopped', unit: 'runs', type: 'integer', meaning: 'Runs that had to be stopped and are left out.' },
    ],
    rows: [
      [
        meanLowestCount.mean,
        meanLowestCount.sd,
        meanLowestCount.standardError,
        replicates - stopped.runs,
        stopped.runs,
      ],
    ],
  };
}

function patchTable(model: Model, { places }: RunResults): Table {
  const where = places === undefined ? 'missing where none was given' : `${places}, so that nobody finds the patch`;
  const size = places === undefined ? '' : ' to one digit';
  return {
    name: 'patches',
    columns: [
      { name: 'patch', unit: '', meaning: 'Name of the patch.' },
      { name: 'x', unit: 'km', meaning: `Position to the east; ${where}.` },
      { name: 'y', unit: 'km', meaning: `Position to the north; ${where}.` },
      { name: 'area', unit: 'km2', meaning: `Area${size}; missing where none was given.` },
      animals('capacity', 'Capacity; missing where none was given.'),
    ],
    rows: inFileOrder(model).flatMap((p) => {
      const patch = model.patches[p];
      if (patch === undefined) return [];
      return [[patch.name, patch.at?.[0] ?? null, patch.at?.[1] ?? null, patch.areaKm2, patch.capacity]];
    }),
  };
}

/** One row a draw and outcome; draws that no model can have are rows with their reason. */
function drawTable({ outcomes }: RunResults, { rows }: Draws): Table {
  const names = [...new Set(rows.flatMap(({ values }) => Object.keys(values)))];
  return {
    name: 'draws',
    columns: [
      { name: 'draw', unit: '', type: 'integer', meaning: 'Number of the draw of what is not known, from 1.' },
      ...names.map((name): Column => ({
        name,
        unit: 'as in the model',
        meaning: 'Value of this parameter in the draw.',
      })),
      outcome,
      share('ever', 'Share of the runs of this draw that came to it; empty where it was not run.'),
      { name: 'failure', unit: '', meaning: 'Why no model can have these values; empty where it was run.' },
    ],
    rows: rows.flatMap(({ draw, values, failure, ever }) =>
      outcomes.map(({ name }, k) => [draw, ...names.map((one) => values[one] ?? null), name, ever[k] ?? null, failure]),
    ),
  };
}

function parameterTable({ parameters }: Model): Table {
  return {
    name: 'parameters',
    columns: [
      { name: 'name', unit: '', meaning: 'Name of the parameter.' },
      { name: 'value', unit: 'as in the model', meaning: 'Value that was used.' },
      { name: 'source', unit: '', meaning: 'Where the number is from; empty where it was not said.' },
      { name: 'basis', unit: '', meaning: 'How the number is known; empty where it was not said.' },
    ],
    rows: parameters.map(({ name, value, source, basis }) => [name, value, source, basis]),
  };
}

export function typeOf({ type, unit }: Column): ColumnType {
  return type ?? (unit === '' ? 'text' : unit === 'year' ? 'integer' : 'number');
}

/** RFC 4180, with a line feed; what is missing is empty. */
export function csvText({ columns, rows }: Pick<Table, 'columns' | 'rows'>): string {
  return [columns.map((column) => column.name), ...rows].map((row) => `${row.map(csvCell).join(',')}\n`).join('');
}

export function dictionaryText(tables: readonly Table[]): string {
  const names = ['table', 'column', 'type', 'unit', 'meaning'].map((name) => ({ name, unit: '', meaning: '' }));
  const rows = tables.flatMap((table) =>
    table.columns.map((column) => [table.name, column.name, typeOf(column), column.unit, column.meaning]),
  );
  return csvText({ columns: names, rows });
}

/** What is not known, or is no number, such as a mean over no run. */
export function isMissing(cell: Cell): cell is null {
  return cell === null || (typeof cell === 'number' && !Number.isFinite(cell));
}

function csvCell(cell: Cell): string {
  if (isMissing(cell)) return '';
  const text = String(cell);
  return /[",\n\r]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
