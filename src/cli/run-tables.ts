// The results of a run, and of a path without chance, as tidy tables.
import type { Model } from '../model/model.ts';
import type { Chance, PathResults, RunResults, YearSummary } from '../results/results.ts';
import { inFileOrder } from '../results/summarise.ts';
import { animals, levels, outcome, patch, quantileCells, quantileColumns, share, year } from './columns.ts';
import { drawTable, handledTable, observedTable } from './more-run-tables.ts';
import { noUnknownColumn, type Cell, type Column, type Table } from './tables.ts';

export function runTables(model: Model, results: RunResults): readonly Table[] {
  return [
    abundanceTable(results),
    outcomeTable(results),
    chanceTable(results),
    firstTable(results),
    ...(results.handled.length === 0 ? [] : [handledTable(results)]),
    inUseTable(results),
    ...(results.observed === undefined ? [] : [observedTable(results.observed)]),
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
      share('lower_unknown', 'Lower end of the 95 % interval from what is not known; empty where there is none.'),
      share('upper_unknown', 'Upper end of the 95 % interval from what is not known; empty where there is none.'),
      noUnknownColumn,
    ],
    rows: outcomes.flatMap(({ name, definition, ever, atEnd }) => [
      [name, definition, 'ever', ...chanceCells(ever)],
      [name, definition, 'at end', ...chanceCells(atEnd)],
    ]),
  };
}

function chanceCells({ probability, interval, intervalFromUnknown, noUnknown }: Chance): readonly Cell[] {
  const unknown = [intervalFromUnknown?.lower ?? null, intervalFromUnknown?.upper ?? null, noUnknown ?? null];
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
