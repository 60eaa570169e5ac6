// Tables of rates: one row where all patches agree, else one a patch; the first and the last value where they change.
import type { DemographyPhase, Model, RateTable } from '../../model/model.ts';
import { inFileOrder } from '../../results/summarise.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { drawTable, type Row } from '../../view/table.ts';

/** Four significant digits. */
export function digits(value: number): string {
  return String(Number(value.toPrecision(4)));
}

export function rateTable(model: Model, rates: RateTable, caption: string): Markup {
  const classes = model.classes.length;
  const rows = inFileOrder(model).map((p): Row => {
    const cells = model.classes.map((_, c) => entry(rates.epochs.map((epoch) => epoch[p * classes + c] ?? 0)));
    return [model.patches[p]?.name ?? '', ...cells];
  });
  const cells = rows.map(([, ...rest]) => rest.join('|'));
  const [top] = rows;
  const alike = top !== undefined && cells.every((text) => text === cells[0]);
  const shown: readonly Row[] = alike ? [['every patch', ...top.slice(1)]] : rows;
  return drawTable({ caption, head: ['patch', ...model.classes], rows: shown });
}

export function matrixTables(model: Model, phase: DemographyPhase): Markup {
  const size = model.classes.length * model.classes.length;
  const matrices = inFileOrder(model).map((p) => ({
    name: model.patches[p]?.name ?? '',
    fates: first(phase.fates, p, size),
    births: first(phase.births, p, size),
  }));
  const text = (one: (typeof matrices)[number]) => `${one.fates.join()}|${one.births.join()}`;
  const alike = new Set(matrices.map(text)).size === 1;
  const shown = alike ? matrices.slice(0, 1).map((one) => ({ ...one, name: 'every patch' })) : matrices;
  const tables = shown.map(({ name, fates, births }) => [
    matrix(model, fates, `Fates, ${name}`),
    matrix(model, births, `Births, ${name}`),
  ]);
  return mark`${tables}`;
}

function matrix({ classes }: Model, entries: readonly number[], caption: string): Markup {
  const n = classes.length;
  const rows = classes.map((name, to): Row => [name, ...entries.slice(to * n, (to + 1) * n).map(digits)]);
  return drawTable({ caption, head: ['to', ...classes.map((name) => `from ${name}`)], rows });
}

function first(rates: RateTable, p: number, size: number): readonly number[] {
  return Array.from((rates.epochs[0] ?? new Float64Array(0)).subarray(p * size, (p + 1) * size));
}

function entry(values: readonly number[]): string {
  const [from, to] = [values[0] ?? 0, values[values.length - 1] ?? 0];
  return values.every((value) => value === from) ? digits(from) : `${digits(from)}, at last ${digits(to)}`;
}
