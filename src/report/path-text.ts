// What the path without chance says in a terminal.
import type { PathGrowth, PathResults } from '../results/results.ts';
import { plain, whole } from '../view/number.ts';
import { fixed } from './rounded.ts';
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
  const warning = 'No single future follows this path.';
  const rows = patches.map((patch, i) => row(patch, byPatch[i] ?? [], style));
  const blocks = [
    bold(printable(results.model), style),
    wrap(`${lead} ${warning}`, style),
    wrap(growthWords(results.growth), style),
    columnsOf(['patch', 'start', `${last}`, 'course'], [...rows, row('all patches', all, style)], style),
    cautionList(results.cautions, style),
    dim(`${first} to ${last}, hash ${results.hash.slice(0, 16)}, skein ${results.tool.version}`, style),
  ];
  return joinBlocks(blocks);
}

/** Growth near zero, without chance and in the long run with it. */
export function growthWords({ withoutChance, withChance, reason }: PathGrowth): string {
  const without = `Near zero an average year changes numbers by ${change(withoutChance)} (growth rate ${fixed(withoutChance, 4)})`;
  if (withChance === null)
    return `${without}. Growth in the long run with chance is not told apart: ${lowered(reason ?? '')}`;
  const { growthRate, standardError, logGrowth, years } = withChance;
  const against =
    logGrowth < 0 !== withoutChance < 1 ? ' This is of the other sign: bad years cost more than good years bring.' : '';
  const unsure =
    Math.abs(logGrowth) < 2.13 * standardError
      ? ' Whether numbers grow or decline in the long run is within its error.'
      : '';
  return `${without}; in the long run, with years that differ by chance, numbers change by ${change(growthRate)} a year (growth rate ${fixed(growthRate, 4)}, standard error ${fixed(standardError * growthRate, 4)}, from ${plain(years)} simulated years).${against}${unsure} Both are those of many animals: the luck of single animals comes on top.`;
}

function change(growthRate: number): string {
  return `${fixed((growthRate - 1) * 100, 2)} %`;
}

function lowered(sentence: string): string {
  return sentence.charAt(0).toLowerCase() + sentence.slice(1);
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
