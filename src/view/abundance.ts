// The abundance of all patches together, as the report and its page both draw it.
import type { ReportView, Size } from './contract.ts';
import { drawFan } from './fan.ts';
import type { Markup } from './markup.ts';
import { plain, whole } from './number.ts';
import { pick } from './series.ts';

export function drawAbundance(view: ReportView, marked: number | null, size: Size): Markup {
  const last = view.years.length - 1;
  const fan = view.whole;
  const range = `between ${whole(pick(fan.p05, last))} and ${whole(pick(fan.p95, last))} ${view.animals}`;
  const middle = `the middle at ${whole(pick(fan.median, last))}`;
  const end = `In ${pick(view.years, last)} 90 of 100 futures lie ${range}, ${middle}`;
  const words = {
    title: `Abundance in all patches by year, over ${plain(view.futures)} futures`,
    description: `${end}; it starts from ${whole(pick(fan.median, 0))}. The numbers of each year stand in the table below.`,
  };
  return drawFan({ words, years: view.years, fan, axis: `${view.animals} in all patches`, marked }, size);
}
