// One sentence on what the results support, under which rule, and how strongly. The rule is told, since it is not the only one.
import { enoughDraws } from '../results/draws/intervals.ts';
import type {
  ComparedPlan,
  Comparison,
  ObjectiveWords,
  PlanDifference,
  Robustness,
  Statement,
  Strength,
} from './results.ts';
import { costWords, namesWords, percentWords, pointsWords } from './words.ts';

export interface ToState {
  readonly objectives: readonly ObjectiveWords[];
  readonly plans: readonly ComparedPlan[];
  readonly differences: readonly PlanDifference[];
  readonly robustness: readonly Robustness[];
  readonly money: Comparison['money'];
  /** Of what is not known; 0 where it was not drawn. */
  readonly draws: number;
}

export function statementOf(to: ToState): Statement {
  const [objective] = to.objectives;
  const order = objective === undefined ? [] : planOrder(to, objective);
  const [best] = order;
  if (objective === undefined || best === undefined) {
    return {
      text: 'There is nothing to decide between.',
      reservations: [],
      rule: ruleOf(to, ''),
      strength: 'none',
      plans: [],
    };
  }
  const apart = (other: ComparedPlan): boolean => between(to, objective, best, other)?.toldApart === true;
  const close = order.filter((plan) => plan === best || !apart(plan));
  const now = to.plans[0];
  const gaining = close.filter((plan) => now !== undefined && between(to, objective, now, plan)?.toldApart === true);
  const left = to.money === null ? gaining : cheapest(gaining);
  const nothing = nothingSeen(to, objective);
  const dearer = maybeCheaper(to, gaining, left);
  const strength = strengthOf(to, { gains: now !== undefined && now !== best && apart(now), left, dearer });
  const text = nothing ?? textOf(to, { objective, best, close, left });
  const reservations = reservationsOf(to, { together: nothing === null ? [best, ...close] : [], left, dearer });
  return { text, reservations, rule: ruleOf(to, objective.name), strength, plans: left.map(({ name }) => name) };
}

/** The best first; plans that are equally good in the order of the text. */
export function planOrder(to: Pick<ToState, 'plans'>, objective: ObjectiveWords): readonly ComparedPlan[] {
  const sign = objective.better === 'more' ? -1 : 1;
  return to.plans.toSorted((a, b) => sign * (valueOf(a, objective) - valueOf(b, objective)));
}

function valueOf(plan: ComparedPlan, { name, of }: ObjectiveWords): number {
  if (of === 'chance') return plan.outcomes.find((one) => one.name === name)?.probability ?? NaN;
  return plan.animalsAtEnd.mean;
}

function between(
  { differences }: Pick<ToState, 'differences'>,
  { name }: ObjectiveWords,
  a: ComparedPlan,
  b: ComparedPlan,
): PlanDifference | undefined {
  return differences.find(
    (one) =>
      one.outcome === name &&
      ((one.from === a.name && one.to === b.name) || (one.from === b.name && one.to === a.name)),
  );
}

function cheapest(plans: readonly ComparedPlan[]): readonly ComparedPlan[] {
  const cost = (plan: ComparedPlan): number => plan.cost?.presentValue ?? 0;
  const least = Math.min(...plans.map(cost));
  return plans.filter((plan) => cost(plan) === least);
}

function ruleOf({ money, plans }: ToState, outcome: string): string {
  const now = plans[0]?.name ?? '';
  const rule = `the plan that does best in “${outcome}”, with those that the 95 % interval of the paired difference cannot tell from it
and can tell from “${now}”${money === null ? '' : '; of these, the one that costs least'}`;
  return rule.replaceAll('\n', ' ');
}

/** Where no future of any plan came to an outcome, or every one did, it cannot tell plans apart. */
function nothingSeen({ plans }: ToState, objective: ObjectiveWords): string | null {
  if (objective.of !== 'chance') return null;
  const values = plans.map((plan) => valueOf(plan, objective));
  const [none, all] = [values.every((value) => value === 0), values.every((value) => value === 1)];
  if (!none && !all) return null;
  const seen = none ? 'No future of any plan came to' : 'Every future of every plan came to';
  const height = none === (objective.better === 'less') ? 'higher' : 'lower';
  const ask = `Ask for a ${height} threshold or ${none ? 'more' : 'fewer'} years (\`--years\`), or go by the other numbers`;
  return `${seen} “${objective.name}”, so that it tells nothing of which plan is better. ${ask}.`;
}

/** Plans that would be left, too, if prices came to lie elsewhere in their ranges. */
function maybeCheaper(
  { differences }: ToState,
  gaining: readonly ComparedPlan[],
  left: readonly ComparedPlan[],
): readonly ComparedPlan[] {
  const [chosen] = left;
  return gaining.filter(
    (plan) =>
      chosen !== undefined &&
      !left.includes(plan) &&
      differences.some(
        ({ of, prices, from, to }) =>
          of === 'money' &&
          prices !== null &&
          [from, to].includes(plan.name) &&
          [from, to].includes(chosen.name) &&
          !(prices.lower > 0 || prices.upper < 0),
      ),
  );
}

interface Standing {
  readonly dearer: readonly ComparedPlan[];
  /** The best plan is told apart from the first one. */
  readonly gains: boolean;
  readonly left: readonly ComparedPlan[];
}

function strengthOf({ plans, draws, robustness }: ToState, { gains, left, dearer }: Standing): Strength {
  const now = plans[0];
  const idle = now !== undefined && left.includes(now);
  if (!gains || idle) return 'none';
  const single = left.length === 1 && dearer.length === 0;
  const whole = draws >= enoughDraws && single && robustness.every(({ holds }) => holds !== false);
  return whole ? 'clear' : 'limited';
}

interface Told {
  readonly objective: ObjectiveWords;
  readonly best: ComparedPlan;
  readonly close: readonly ComparedPlan[];
  readonly left: readonly ComparedPlan[];
}

function textOf(to: ToState, { objective, best, close, left }: Told): string {
  const now = to.plans[0];
  if (now !== undefined && (best === now || close.includes(now))) return noneText(to, { objective, best, close, left });
  const names = namesWords(left.map(({ name }) => name));
  const gain = now === undefined ? '' : gainWords(to, { objective, now, chosen: left[0] ?? best });
  return `The results support ${names}: ${gain}.`;
}

/** No plan is told apart from doing nothing new. */
function noneText({ plans }: ToState, { objective, best, close }: Told): string {
  const now = plans[0]?.name ?? '';
  const all = close.length === plans.length;
  if (all) return `The results tell no plan apart from “${now}” in “${objective.name}”: they support none over it.`;
  if (best.name === now)
    return `No plan does better than “${now}” in “${objective.name}” for sure, and ${namesWords(plans.filter((plan) => !close.includes(plan)).map(({ name }) => name))} do worse.`;
  return `No plan is told apart from “${now}” in “${objective.name}”: the results support none over it.`;
}

interface Gain {
  readonly objective: ObjectiveWords;
  readonly now: ComparedPlan;
  readonly chosen: ComparedPlan;
}

function gainWords(to: ToState, { objective, now, chosen }: Gain): string {
  const found = between(to, objective, now, chosen);
  const [before, after] = [valueOf(now, objective), valueOf(chosen, objective)];
  const ends =
    found === undefined ? [0, 0] : [found.interval.lower, found.interval.upper].map(Math.abs).sort((a, b) => a - b);
  const [least = 0, most = 0] = ends;
  const cost = chosen.cost === null || to.money === null ? '' : `, for ${costWords(chosen.cost, to.money.currency)}`;
  if (objective.of !== 'chance') {
    const fewer = Math.round(Math.abs(after - before));
    return `${fewer} animals ${after > before ? 'more' : 'fewer'} at the end than under “${now.name}” (95 %: ${Math.round(least)} to ${Math.round(most)})${cost}`;
  }
  return `a chance of “${objective.name}” of ${percentWords(after)} against ${percentWords(before)} under “${now.name}”, ${pointsWords(after - before)} ${after < before ? 'less' : 'more'} (95 %: ${(least * 100).toFixed(1)} to ${(most * 100).toFixed(1)})${cost}`;
}

interface Reserved {
  /** Plans that are not told apart. */
  readonly together: readonly ComparedPlan[];
  readonly left: readonly ComparedPlan[];
  readonly dearer: readonly ComparedPlan[];
}

function reservationsOf(to: ToState, { together: alike, left, dearer }: Reserved): readonly string[] {
  const together = [...new Set(alike)].map(({ name }) => name);
  const reversed = to.robustness.filter(({ holds }) => holds === false).map(({ variant }) => variant);
  return [
    ...(together.length < 2 ? [] : [`${namesWords(together)} cannot be told apart.`]),
    ...(dearer.length === 0
      ? []
      : [
          `Within the ranges of prices ${namesWords(dearer.map(({ name }) => name))} may cost no more than ${namesWords(left.map(({ name }) => name))}.`,
        ]),
    ...unknownReservation(to.draws),
    ...(reversed.length === 0
      ? []
      : [`Another sound model would not keep the whole order of the plans: ${reversed.join('; ')}.`]),
  ];
}

function unknownReservation(draws: number): readonly string[] {
  if (draws >= enoughDraws) return [];
  if (draws === 0) return ['What is not known about the numbers of the model was not drawn and could change this.'];
  return [
    `What is not known was drawn ${draws} times only; from ${enoughDraws} draws on the interval from it can be relied on.`,
  ];
}
