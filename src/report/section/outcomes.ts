// The outcomes with their definitions and both intervals, and the few other numbers of the whole run.
import type { Model } from '../../model/model.ts';
import type { Chance, Interval, RunResults } from '../../results/results.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { decimal, percent, plain, whole } from '../../view/number.ts';
import { finished, lastYear } from '../answer.ts';

export function outcomesSection(model: Model, results: RunResults): Markup {
  const rows = results.outcomes.map((outcome) => {
    const name = mark`<th scope="rowgroup" rowspan="2"><bdi>${outcome.name}</bdi><small><bdi>${outcome.definition}</bdi></small></th>`;
    const ever = chanceCells('having fallen below', outcome.ever);
    const end = chanceCells(`being below in ${lastYear(results)}`, outcome.atEnd);
    return mark`<tbody><tr>${name}${ever}</tr><tr>${end}</tr></tbody>`;
  });
  const table =
    results.outcomes.length === 0
      ? mark`<p>The model names no outcome.</p>`
      : mark`<div class="scroll" tabindex="0" role="region" aria-label="Outcomes"><table class="outcomes"><caption>Chances over ${plain(finished(results))} futures, from ${results.firstYear} to ${lastYear(results)}</caption><thead><tr><th scope="col">outcome and what it means</th><th scope="col">chance of</th><th scope="col">is</th><th scope="col">interval from the number of runs</th><th scope="col">interval from what is not known</th></tr></thead>${rows}</table></div>`;
  return mark`<section id="outcomes" aria-labelledby="outcomes-title"><h2 id="outcomes-title">Outcomes</h2>${table}${others(model, results)}</section>`;
}

function chanceCells(of: string, chance: Chance): Markup {
  return mark`<th scope="row" class="words">${of}</th><td><strong>${percent(chance.probability)}</strong></td><td>${interval(chance.interval, chance.probability)}</td><td class="words">${chance.intervalFromUnknown === null ? 'no uncertainty was given' : interval(chance.intervalFromUnknown, null)}</td>`;
}

function interval({ lower, upper, level }: Interval, probability: number | null): string {
  const sure = `(${plain(level * 100)} %)`;
  if (probability === 0) return `no case; at most ${percent(upper)} ${sure}`;
  return `${percent(lower)} to ${percent(upper)} ${sure}`;
}

function others(model: Model, results: RunResults): Markup {
  const animals = model.counts === 'females' ? 'females' : 'animals';
  const { mean, standardError } = results.meanLowestCount;
  const end = results.patchesInUse[results.patchesInUse.length - 1];
  const inUse =
    end === undefined
      ? null
      : mark`<div><dt>patches in use in ${String(end.year)}</dt><dd>${decimal(end.mean)} of ${plain(model.patches.length)} in the mean, ${plain(end.quantiles['0.05'])} to ${plain(end.quantiles['0.95'])} in 90 of 100 futures</dd></div>`;
  return mark`<dl class="numbers"><div><dt>mean lowest count</dt><dd>${whole(mean)} ${animals}, give or take ${whole(1.96 * standardError)} from the number of runs; it is the mean, over the futures, of the lowest count that each one sees</dd></div>${inUse}${stopped(results)}</dl>`;
}

function stopped({ stopped: { runs, reasons } }: RunResults): Markup | null {
  if (runs === 0) return null;
  return mark`<div><dt>runs that had to be stopped</dt><dd>${plain(runs)}, which are in no other number here: ${reasons.join('; ')}</dd></div>`;
}
