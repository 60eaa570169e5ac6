// What the path without chance says in a terminal.
import type { PathResults } from '../results/results.ts';
import { whole } from '../view/number.ts';
import { sparkLine } from './spark-line.ts';
import { bold, columnsOf, dim, joinBlocks, printable, room, wrap } from './terminal.ts';
import { cautionList, type RunTextStyle } from './text.ts';

export function pathText(results: PathResults, style: RunTextStyle): string {
  const animals = style.animals ?? 'animals';
  const years = [...new Set(results.abundance.map((row) => row.year))].sort((a, b) => a - b);
  const patches = [...new Set(results.abundance.map((row) => row.patch))];
  const byPatch = patches.map((patch) => course(results, years, (row) => row.patch === patch));
  const all = course(results, years, () => true);
  const [first, last] = [years[0] ?? 0, years[years.length - 1] ?? 0];
  const lead = `Without chance, ${whole(all[0] ?? 0)} ${animals} at the start become ${whole(all[all.length - 1] ?? 0)} by ${last}.`;
  const warning = 'No single future follows this path, and growth with chance can have the other sign.';
  const rows = patches.map((patch, i) => row(patch, byPatch[i] ?? [], style));
  const blocks = [
    bold(printable(results.model), style),
    wrap(`${lead} ${warning}`, style),
    columnsOf(['patch', 'start', `${last}`, 'course'], [...rows, row('all patches', all, style)], style),
    cautionList(results.cautions, style),
    dim(`${first} to ${last}, hash ${results.hash.slice(0, 16)}, skein ${results.tool.version}`, style),
  ];
  return joinBlocks(blocks);
}

type Row = PathResults['abundance'][number];

function course(results: PathResults, years: readonly number[], chosen: (row: Row) => boolean): readonly number[] {
  const sums = new Map(years.map((year) => [year, 0]));
  for (const row of results.abundance) if (chosen(row)) sums.set(row.year, (sums.get(row.year) ?? 0) + row.animals);
  return years.map((year) => sums.get(year) ?? 0);
}

function row(name: string, values: readonly number[], style: RunTextStyle): readonly string[] {
  const line = sparkLine(values, Math.max(10, Math.floor(room(style) / 2.5)));
  return [name, whole(values[0] ?? 0), whole(values[values.length - 1] ?? 0), line];
}
