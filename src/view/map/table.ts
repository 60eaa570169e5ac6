// The numbers of the map as two tables: patches, and the links between them.
import type { PatchView, ReportView } from '../contract.ts';
import { mark, type Markup } from '../markup.ts';
import { decimal, percent, whole } from '../number.ts';
import { pick } from '../series.ts';
import { drawTable, type Row } from '../table.ts';
import { arriving, flow, leaving } from './words.ts';

export function mapTables(view: ReportView, count: number): Markup {
  const moved = view.links.length > 0 && count > 0;
  return mark`${patchTable(view, count, moved)}${moved ? linkTable(view, count) : null}`;
}

function patchTable(view: ReportView, count: number, moved: boolean): Markup {
  const empty = view.patches.some((patch) => patch.empty !== null);
  const told = view.worthAt !== null;
  const rows = view.patches.map((patch, p): Row => {
    const { p05, median, p95, mean } = patch.fan;
    const animals = [median, p05, p95, mean].map((series) => whole(pick(series, count)));
    const chance = patch.empty === null ? '' : percent(pick(patch.empty, count));
    const moves = moved ? [flow(arriving(view, p, count)), flow(leaving(view, p, count))] : [];
    const holds = patch.capacity === null ? '' : whole(patch.capacity);
    const worth = told ? worthCells(patch) : [];
    return [patch.name, ...animals, ...(empty ? [chance] : []), ...moves, holds, ...worth];
  });
  const head = ['patch', 'middle future', '5 of 100 futures at or under', '95 of 100 at or under', 'mean'];
  if (empty) head.push('chance of being empty');
  if (moved) head.push('arriving a year', 'leaving for another patch a year');
  head.push('can hold');
  if (told) head.push('source or sink', 'contribution', 'growth alone');
  return drawTable({ caption: `Patches in ${pick(view.years, count)} (${view.animals})`, head, rows });
}

function worthCells({ worth }: PatchView): readonly string[] {
  if (worth === null) return ['not known', '', ''];
  return [worth.role, decimal(worth.contribution, 3), decimal(worth.growthAlone, 3)];
}

function linkTable(view: ReportView, count: number): Markup {
  const rows = view.links
    .map((link) => ({ link, animals: pick(link.animals, count) }))
    .sort((a, b) => b.animals - a.animals)
    .map(({ link, animals }): Row => {
      const [from, to] = [pick(view.patches, link.from).name, pick(view.patches, link.to).name];
      return [from, mark`<bdi>${to}</bdi>`, flow(animals)];
    });
  const year = pick(view.years, count);
  const caption = `Movement in the year to the count of ${year} (${view.animals} that arrive)`;
  return drawTable({ caption, head: ['from', 'to', 'a year'], rows, words: [1] });
}
