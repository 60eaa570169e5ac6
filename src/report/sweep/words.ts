// Numbers and names of a sweep as readers meet them, the same in a terminal and on the page.
import type { FactorRanking, Switch } from '../../sweep/summary/ranking.ts';
import { differenceOfShares } from '../../sweep/summary/columns.ts';
import type { QuantitySummary, SweepSummary } from '../../sweep/summary/summarise.ts';
import { wilson } from '../../results/wilson.ts';
import { percent } from '../../view/number.ts';

type Runs = Omit<NonNullable<SweepSummary['runs']>, 'seed'>;

/** A swept number as readers meet it, such as `patches.Pond.capacity (animals)`. */
export function withUnit(name: string, { factors }: SweepSummary): string {
  const unit = factors.find((one) => one.name === name)?.unit ?? '';
  return unit === '' ? name : `${name} (${unit})`;
}

/** A number of things by their name, which takes an s where it is not one. */
export function counted(n: number, one: string): string {
  return `${n.toLocaleString('en')} ${n === 1 ? one : `${one}s`}`;
}

/** How much is run at each point, such as `200 runs of 50 years each`; without the years where they are swept. */
export function runsWords({ replicates, years }: Runs, swept: readonly string[]): string {
  const length = swept.includes('years') ? '' : ` of ${counted(years, 'year')}`;
  return `${counted(replicates, 'run')}${length} each`;
}

/** The same behind what else a sweep is; empty without chance. */
export function andRuns({ runs, factors }: SweepSummary): string {
  return runs === null
    ? ''
    : `, ${runsWords(
        runs,
        factors.map(({ name }) => name),
      )}`;
}

/** What a chance of nothing seen may still be. */
export function noneSeen({ unit, least }: QuantitySummary, { runs }: SweepSummary): string {
  if (unit !== 'share' || least !== 0 || runs === null) return '';
  const most = percent(wilson(0, runs.replicates).upper);
  return `; 0\u00a0% of ${counted(runs.replicates, 'run')} of a point means at most ${most} (95\u00a0%)`;
}

/** A number of a measure, for readers. */
export function numberText(value: number, unit: string): string {
  if (unit === differenceOfShares) return `${(100 * value).toFixed(1).replace(/^-0\.0$/u, '0.0')} points`;
  return unit === 'share'
    ? percent(value)
    : Math.abs(value) >= 100
      ? Math.round(value).toLocaleString('en')
      : three(value);
}

/** Four digits that count. */
export function three(value: number): string {
  return String(Number(value.toPrecision(4)));
}

/** Which scenario is best in the mean, from the least value of a number to its greatest, and how closely it is known where that changes. */
export function preferredWords({ groups, switches }: FactorRanking): string {
  const [first] = groups;
  if (first === undefined) return '';
  if (switches.length === 0) return `${preferredName(first.preferred)} all along`;
  const changed = groups.filter(({ preferred }, i) => i > 0 && groups[i - 1]?.preferred !== preferred);
  const later = changed.map(({ from, preferred }, i) => {
    const { at = null, untold = null } = switches[i] ?? {};
    const where = at === null ? `at ${String(from)}` : `from ${three(at)}`;
    return `${where} ${preferredName(preferred)}${untoldWords(untold)}`;
  });
  return `first ${[preferredName(first.preferred), ...later].join('; ')}`;
}

function untoldWords(untold: Switch['untold']): string {
  if (untold === null) return '';
  const { from, to } = untold;
  const short = (value: number | string): string => (typeof value === 'number' ? three(value) : value);
  return from === to ? ` (not told apart at ${short(from)})` : ` (not told apart from ${short(from)} to ${short(to)})`;
}

function preferredName(preferred: string): string {
  return preferred === 'equal' ? 'several alike' : `“${preferred}”`;
}
