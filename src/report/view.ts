// From results and model to what the figures are drawn from. Patches return to the order of their author's list.
import type { ComparedCount, OutcomeResult, YearSummary } from '../results/results.ts';
import { inFileOrder } from '../results/summarise.ts';
import type {
  CountedView,
  Fan,
  LinkView,
  OutcomeView,
  OutlineView,
  PatchView,
  ReportView,
  WorthView,
} from '../view/contract.ts';
import { thinOutlines } from '../view/map/thin.ts';
import { coarseMovement } from './hiding/coarse-movement.ts';
import type { ReportInput } from './input.ts';
import { worthAt } from './worth.ts';
import { estimateMovement, type LinkFlow } from './movement.ts';

/** More links than this would make the page heavy and the map grey; the strongest are kept. */
const mostLinks = 400;

export function summariseForView(input: ReportInput): ReportView {
  const { model, results } = input;
  const order = inFileOrder(model);
  const outlines = thinOutlines(model.patches.map((patch) => patch.outline ?? null));
  const exact = estimateMovement(input) ?? [];
  const flows = input.hiding === undefined ? exact : coarseMovement(exact);
  const links = strongest(flows, order);
  return {
    format: 'skein-view/1',
    title: model.title,
    hash: results.hash,
    animals: model.counts === 'females' ? 'females' : 'animals',
    futures: results.replicates - results.stopped.runs,
    years: results.abundance.whole.map((summary) => summary.year),
    whole: fan(results.abundance.whole),
    inUse: fan(results.patchesInUse),
    patches: order.flatMap((p) => patchView(input, p, outlines[p] ?? null)),
    links,
    linksLeftOut: exact.length - links.length,
    ...(input.hiding === undefined ? {} : { places: input.hiding.places }),
    outcomes: results.outcomes.map((outcome) => outcomeView(outcome, results.abundance.whole)),
    ...observedView(input),
    worthAt: (input.patchValues?.value ?? null) === null ? null : worthAt,
  };
}

/** Counts at which the outcome is not looked at, such as the start, have chance 0 and lie before `first`. */
function outcomeView(outcome: OutcomeResult, counts: readonly YearSummary[]): OutcomeView {
  const byYear = new Map(outcome.byYear.map((one) => [one.year, one]));
  const series = (part: 'ever' | 'lower' | 'upper' | 'now') =>
    counts.map(({ year }) => short(byYear.get(year)?.[part] ?? 0));
  return {
    name: outcome.name,
    definition: outcome.definition,
    first: Math.max(
      0,
      counts.findIndex(({ year }) => byYear.has(year)),
    ),
    ever: series('ever'),
    lower: series('lower'),
    upper: series('upper'),
    now: series('now'),
    words: outcome.words,
  };
}

function patchView(input: ReportInput, p: number, outline: OutlineView | null): readonly PatchView[] {
  const { model, results } = input;
  const patch = model.patches[p];
  const found = results.abundance.patches.find((one) => one.patch === patch?.name);
  if (patch === undefined || found === undefined) return [];
  const { name, at, capacity, areaKm2 } = patch;
  const empty = found.empty === undefined ? null : found.empty.map(short);
  return [{ name, at, outline, capacity, areaKm2, fan: fan(found.byYear), empty, worth: worthView(input, p) }];
}

function worthView({ patchValues }: ReportInput, p: number): WorthView | null {
  const found = patchValues?.value?.patches[p];
  if (found === undefined || found.role === null || found.contribution === null) return null;
  return { role: found.role, contribution: short(found.contribution), growthAlone: short(found.growthAlone) };
}

function observedView({ results: { observed } }: ReportInput): Pick<ReportView, 'observed'> {
  if (observed === undefined) return {};
  const { classes, error, counts } = observed;
  const [together, ...patches] = observed.abundance.map(({ patch, byYear }) => ({
    name: patch ?? 'All counted patches',
    fan: fan(byYear),
    counts: counts.filter((one) => one.patch === patch).map((one) => countedView(one, error)),
  }));
  if (together === undefined) return {};
  return { observed: { classes: classes.join(', '), together, patches } };
}

function countedView({ year, animals, lies }: ComparedCount, error: number | null): CountedView {
  const reach = 1.96 * (error ?? 0) * animals;
  return {
    year,
    animals,
    bar: error === null ? null : [short(Math.max(0, animals - reach)), short(animals + reach)],
    lies,
  };
}

function fan(byYear: readonly Pick<YearSummary, 'mean' | 'quantiles'>[]): Fan {
  const quantile = (level: keyof YearSummary['quantiles']) => byYear.map((one) => short(one.quantiles[level]));
  return {
    mean: byYear.map((one) => short(one.mean)),
    p05: quantile('0.05'),
    p25: quantile('0.25'),
    median: quantile('0.5'),
    p75: quantile('0.75'),
    p95: quantile('0.95'),
  };
}

function strongest(flows: readonly LinkFlow[], order: readonly number[]): readonly LinkView[] {
  const place = new Map(order.map((p, index) => [p, index]));
  return flows
    .map((flow) => ({ flow, total: flow.animals.reduce((sum, animals) => sum + animals, 0) }))
    .sort((a, b) => b.total - a.total)
    .slice(0, mostLinks)
    .map(({ flow }) => ({
      from: place.get(flow.from) ?? 0,
      to: place.get(flow.to) ?? 0,
      animals: Array.from(flow.animals, short),
    }));
}

/** Four digits are more than a reader can use. */
function short(value: number): number {
  return Number(value.toPrecision(4));
}
