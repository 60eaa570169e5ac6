// Tables of rates: one row where all patches agree, else one a patch; the first and the last value where they change.
import type { DemographyPhase, Model, RateTable } from '../../model/model.ts';
import { inFileOrder } from '../../results/summarise.ts';
import { mark, type Markup } from '../../view/markup.ts';

/** Four significant digits. */
export function digits(value: number): string {
  return String(Number(value.toPrecision(4)));
}

export function rateTable(model: Model, rates: RateTable, caption: string): Markup {
  const classes = model.classes.length;
  const row = (p: number) =>
    model.classes.map((_, c) => entry(rates.epochs.map((epoch) => epoch[p * classes + c] ?? 0)));
  const rows = inFileOrder(model).map((p) => ({ name: model.patches[p]?.name ?? '', cells: row(p) }));
  const alike = rows.every((one) => one.cells.join('|') === rows[0]?.cells.join('|'));
  const shown = alike ? rows.slice(0, 1).map((one) => ({ ...one, name: 'every patch' })) : rows;
  const body = shown.map(
    (one) =>
      mark`<tr><th scope="row"><bdi>${one.name}</bdi></th>${one.cells.map((cell) => mark`<td>${cell}</td>`)}</tr>`,
  );
  const head = model.classes.map((name) => mark`<th scope="col"><bdi>${name}</bdi></th>`);
  return mark`<div class="scroll" tabindex="0" role="region" aria-label="${caption}"><table><caption>${caption}</caption><thead><tr><th scope="col">patch</th>${head}</tr></thead><tbody>${body}</tbody></table></div>`;
}

export function matrixTables(model: Model, phase: DemographyPhase): Markup {
  const size = model.classes.length * model.classes.length;
  const matrices = inFileOrder(model).map((p) => ({
    name: model.patches[p]?.name ?? '',
    fates: first(phase.fates, p, size),
    births: first(phase.births, p, size),
  }));
  const text = (one: (typeof matrices)[number]) => `${one.fates.join()}|${one.births.join()}`;
  const alike = matrices.every((one) => matrices[0] !== undefined && text(one) === text(matrices[0]));
  const shown = alike ? matrices.slice(0, 1).map((one) => ({ ...one, name: 'every patch' })) : matrices;
  return mark`${shown.map((one) => mark`${matrix(model, one.fates, `Fates, ${one.name}`)}${matrix(model, one.births, `Births, ${one.name}`)}`)}`;
}

function matrix(model: Model, entries: readonly number[], caption: string): Markup {
  const classes = model.classes.length;
  const rows = model.classes.map((name, to) => {
    const cells = model.classes.map((_, from) => mark`<td>${digits(entries[to * classes + from] ?? 0)}</td>`);
    return mark`<tr><th scope="row"><bdi>${name}</bdi></th>${cells}</tr>`;
  });
  const head = model.classes.map((name) => mark`<th scope="col">from <bdi>${name}</bdi></th>`);
  return mark`<div class="scroll" tabindex="0" role="region" aria-label="${caption}"><table><caption>${caption}</caption><thead><tr><th scope="col">to</th>${head}</tr></thead><tbody>${rows}</tbody></table></div>`;
}

function first(rates: RateTable, p: number, size: number): readonly number[] {
  return Array.from((rates.epochs[0] ?? new Float64Array(0)).subarray(p * size, (p + 1) * size));
}

function entry(values: readonly number[]): string {
  const [from, to] = [values[0] ?? 0, values[values.length - 1] ?? 0];
  return values.every((value) => value === from) ? digits(from) : `${digits(from)}, at last ${digits(to)}`;
}
