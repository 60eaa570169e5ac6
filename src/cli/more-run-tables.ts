// Tables that only some runs have: what people did, counts of the past, and draws of what is not known.
import type { Draws, ObservedResult, RunResults, YearSummary } from '../results/results.ts';
import { animals, levels, outcome, patch, quantileCells, quantileColumns, share, year } from './columns.ts';
import type { Cell, Column, Table } from './tables.ts';

export function handledTable({ handled }: RunResults): Table {
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

export function observedTable({ counts, abundance }: ObservedResult): Table {
  const courses = new Map(
    abundance.map(({ patch: name, byYear }) => [name, new Map(byYear.map((one) => [one.year, one]))]),
  );
  return {
    name: 'observed',
    columns: [
      { ...patch, meaning: 'Name of the patch; empty for all counted patches together.' },
      { ...year, meaning: 'Calendar year of the count of the past.' },
      animals('counted', 'Animals that were counted.'),
      {
        name: 'lies',
        unit: '',
        meaning:
          'below, within or above the band from the 0.05 to the 0.95 quantile; empty where the model does not run through the year.',
      },
      {
        name: 'beyond_error',
        unit: '',
        meaning:
          'true where the 95 % interval of the count itself lies outside, too; empty where its error is not known.',
      },
      ...quantileColumns('animals', 'Count of the same classes'),
    ],
    rows: counts.map((one) => {
      const course = courses.get(one.patch)?.get(one.year);
      const beyond = one.beyondError === null ? null : String(one.beyondError);
      const quantiles = course === undefined ? levels.map(() => null) : quantileCells(course.quantiles);
      return [one.patch, one.year, one.animals, one.lies, beyond, ...quantiles];
    }),
  };
}

/** One row a draw and outcome; draws that no model can have are rows with their reason. */
export function drawTable({ outcomes }: RunResults, { rows }: Draws): Table {
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
