// The counts of all counted patches together over their fan, as the report and its page both draw it.
import type { ObservedView, ReportView, Size } from './contract.ts';
import { drawFan } from './fan.ts';
import type { Markup } from './markup.ts';
import { plain } from './number.ts';

export function drawObserved(view: ReportView, observed: ObservedView, marked: number | null, size: Size): Markup {
  const { together, classes } = observed;
  const { fan, counts } = together;
  const words = {
    title: `${together.name}: counts over ${plain(view.futures)} futures`,
    description: `${plain(counts.length)} counts of ${classes} are drawn over the futures; the numbers stand in the table below.`,
  };
  return drawFan({ words, years: view.years, fan, axis: `${classes} in the counted patches`, marked, counts }, size);
}
