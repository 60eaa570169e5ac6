// What comes into the model from outside: the files it names, what drives it year by year, and counts of the past.
import type { Model, ObservedCounts } from '../../model/model.ts';
import { mark, type Content, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import { drawTable } from '../../view/table.ts';
import type { InputData } from '../input.ts';
import { names } from '../section/section.ts';
import { classNames } from './phases.ts';
import { digits } from './rates.ts';

export function inputDataWords(model: Model, data: InputData | undefined): Markup {
  const parts: readonly Content[] = [
    fileWords(data?.files ?? []),
    driverWords(data?.drivers),
    model.observed === undefined ? null : observedWords(model, model.observed),
  ];
  return mark`${parts}`;
}

function fileWords(files: readonly string[]): Markup {
  if (files.length === 0) {
    return mark`<p>All numbers of the model stand in its text, which is printed below.</p>`;
  }
  const one = files.length === 1 ? 'the file' : 'the files';
  return mark`<p>Beside its text the model reads ${one} ${names(files)}. What they hold is part of all that decides the
result, and of its hash.</p>`;
}

const futures = {
  'as-dated': 'each year of the model has the value of its own year',
  repeat: 'the values come in their order, again and again',
  'resample-years': 'each year of the model has those of one given year, drawn anew with equal chances',
} as const;

function driverWords(drivers: InputData['drivers']): Markup {
  if (drivers === undefined) return mark`<p>No series of outside data drives the model.</p>`;
  const series = Object.entries(drivers.values);
  const years = [...new Set(series.flatMap(([, byYear]) => Object.keys(byYear).map(Number)))].sort((a, b) => a - b);
  const rows = years.map((year) => {
    const cells = series.map(([, byYear]) => {
      const value = byYear[String(year)];
      return value === undefined ? '' : digits(value);
    });
    return [String(year), ...cells] as const;
  });
  const named = series.map(([name]) => name);
  const table = drawTable({ caption: 'What drives the model from outside', head: ['year', ...named], rows });
  return mark`<p>Rates are driven from outside by ${names(named)}: ${futures[drivers.future]}.</p>${table}`;
}

function observedWords(model: Model, { counts, of, error }: ObservedCounts): Markup {
  const years = counts.map(({ year }) => year);
  const patches = new Set(counts.map(({ patch }) => patch)).size;
  const sure =
    error === null ? 'How exact they are was not said.' : `Their standard error is ${digits(error)} of a count.`;
  return mark`<p>${plain(counts.length)} counts of ${classNames(model, of)} in ${plain(patches)} ${patches === 1 ? 'patch' : 'patches'}, from
${String(Math.min(...years))} to ${String(Math.max(...years))}, are drawn beside what the model says; they decide nothing in it. ${sure}</p>`;
}
