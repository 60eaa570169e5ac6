// Results as tidy tables: one row an observation, each column with its unit and meaning in the dictionary.
import type { Model } from '../model/model.ts';
import type { PathResults, RunResults, YearSummary } from '../results/results.ts';

export type Cell = string | number | null;

export interface Column {
  readonly name: string;
  readonly unit: string;
  readonly meaning: string;
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
    inUseTable(results),
    parameterTable(model),
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
  const row = (name: string | null, s: YearSummary): readonly Cell[] => {
    const q = s.quantiles;
    return [s.year, name, s.mean, s.sd, q['0.05'], q['0.25'], q['0.5'], q['0.75'], q['0.95']];
  };
  return {
    name: 'abundance',
    columns: [
      year,
      patch,
      animals('mean', 'Mean over the runs.'),
      animals('sd', 'Standard deviation between the runs.'),
      ...['0.05', '0.25', '0.5', '0.75', '0.95'].map((q) =>
        animals(`quantile_${q}`, `Count that a share of ${q} of the runs does not exceed.`),
      ),
    ],
    rows: [
      ...abundance.whole.map((summary) => row(null, summary)),
      ...abundance.patches.flatMap((one) => one.byYear.map((summary) => row(one.patch, summary))),
    ],
  };
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
    ],
    rows: outcomes.flatMap(({ name, definition, ever, atEnd }) => [
      [name, definition, 'ever', ever.probability, ever.interval.lower, ever.interval.upper],
      [name, definition, 'at end', atEnd.probability, atEnd.interval.lower, atEnd.interval.upper],
    ]),
  };
}

function chanceTable({ outcomes }: RunResults): Table {
  return {
    name: 'chances_by_year',
    columns: [
      outcome,
      year,
      share('ever_below', 'Share of the runs that have fallen below by this year.'),
      share('lower', 'Lower edge of a band that holds for the whole curve with 95 %.'),
      share('upper', 'Upper edge of that band.'),
      share('below', 'Share of the runs that are below in this year.'),
    ],
    rows: outcomes.flatMap(({ name, byYear }) =>
      byYear.map((one) => [name, one.year, one.everBelow, one.lower, one.upper, one.below]),
    ),
  };
}

function inUseTable({ patchesInUse }: RunResults): Table {
  return {
    name: 'patches_in_use',
    columns: [year, { name: 'mean', unit: 'patches', meaning: 'Mean number of patches with at least one animal.' }],
    rows: patchesInUse.map((one) => [one.year, one.mean]),
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

/** RFC 4180, with a line feed; what is missing is empty. */
export function csvText({ columns, rows }: Pick<Table, 'columns' | 'rows'>): string {
  return [columns.map((column) => column.name), ...rows].map((row) => `${row.map(csvCell).join(',')}\n`).join('');
}

export function dictionaryText(tables: readonly Table[]): string {
  const names = ['table', 'column', 'unit', 'meaning'].map((name) => ({ name, unit: '', meaning: '' }));
  const rows = tables.flatMap((table) =>
    table.columns.map((column) => [table.name, column.name, column.unit, column.meaning]),
  );
  return csvText({ columns: names, rows });
}

function csvCell(cell: Cell): string {
  if (cell === null) return '';
  const text = String(cell);
  return /[",\n\r]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
