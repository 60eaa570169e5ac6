// A comparison as tidy tables.
import type { Comparison } from '../compare/results.ts';
import { noUnknownColumn, type Column, type Table } from './tables.ts';

const text = (name: string, meaning: string): Column => ({ name, unit: '', meaning });
const share = (name: string, meaning: string): Column => ({ name, unit: 'share', meaning });
const animals = (name: string, meaning: string): Column => ({ name, unit: 'animals', meaning });
const plan = text('plan', 'Name of the plan; `as now` is the model without any action.');
const outcome = text('outcome', 'Outcome or other objective.');

export function compareTables(comparison: Comparison): readonly Table[] {
  return [
    plansTable(comparison),
    chancesTable(comparison),
    differencesTable(comparison),
    bestTable(comparison),
    patchesTable(comparison),
    ...(comparison.robustness.length === 0 ? [] : [robustnessTable(comparison)]),
  ];
}

function plansTable({ scenarios, money }: Comparison): Table {
  const unit = money?.currency ?? 'money';
  return {
    name: 'plans',
    columns: [
      plan,
      text('actions', 'What is done.'),
      { name: 'cost', unit, meaning: 'Present value, mean over the futures; empty where the model knows no money.' },
      { name: 'cost_least', unit, meaning: 'The same at the lower ends of prices that are ranges.' },
      { name: 'cost_most', unit, meaning: 'The same at their upper ends.' },
      { name: 'cost_undiscounted', unit, meaning: 'Plain sum, mean over the futures.' },
      animals('animals_at_end', 'Mean count at the end.'),
      animals('lowest_count', 'Mean over the futures of the lowest count.'),
      animals('animals_taken', 'Mean number taken over all years; empty where nobody is taken.'),
      {
        name: 'change_at_end',
        unit: 'animals a year',
        meaning: 'Change of the mean count over the last fifth of the years.',
      },
      text(
        'beaten',
        '`yes` where another plan is at least as good in all risks (outcomes) and in cost, and better in one of them, else `no`; where there are no outcomes, animals at the end stand for them.',
      ),
      share('chance_beaten', 'Chance of being beaten so, with other futures of the same number.'),
      share(
        'chance_beaten_draws',
        'The same as a share of the draws of what is not known; empty where nothing was drawn.',
      ),
    ],
    rows: scenarios.map((one) => [
      one.name,
      one.actions.map(({ words }) => words).join('; '),
      one.cost?.presentValue ?? null,
      one.cost?.least ?? null,
      one.cost?.most ?? null,
      one.cost?.undiscounted ?? null,
      one.animalsAtEnd.mean,
      one.meanLowestCount,
      one.animalsTaken?.mean ?? null,
      one.changeAtEnd,
      one.notBeaten ? 'no' : 'yes',
      one.beaten.runs,
      one.beaten.draws,
    ]),
  };
}

function chancesTable({ scenarios }: Comparison): Table {
  return {
    name: 'plan_chances',
    columns: [
      plan,
      outcome,
      text('definition', 'The outcome in words.'),
      share('probability', 'Share of the futures in which it happens at some count.'),
      share('lower', 'Lower end of the 95 % interval from the number of runs.'),
      share('upper', 'Upper end of it.'),
      share('lower_unknown', 'Lower end of the 95 % interval from what is not known; empty where there is none.'),
      share('upper_unknown', 'Upper end of it.'),
      noUnknownColumn,
      share('at_end', 'Share of the futures in which it is so at the last count.'),
      {
        name: 'cost_per_chance',
        unit: 'money',
        meaning:
          'Money for a chance better by 1 than under the first plan (less of what is feared, more of what is hoped for); empty where nothing is gained for sure.',
      },
      {
        name: 'cost_per_chance_lower',
        unit: 'money',
        meaning: 'Lower end, from the interval of the difference and the range of prices.',
      },
      { name: 'cost_per_chance_upper', unit: 'money', meaning: 'Upper end.' },
    ],
    rows: scenarios.flatMap(({ name, outcomes, prices }) =>
      outcomes.map((one) => {
        const price = prices.find((own) => own.outcome === one.name)?.costPerRisk ?? null;
        const { runs, unknown, noUnknown } = one.intervals;
        return [
          name,
          one.name,
          one.definition,
          one.probability,
          runs.lower,
          runs.upper,
          unknown?.lower ?? null,
          unknown?.upper ?? null,
          noUnknown ?? null,
          one.atEnd.probability,
          price?.estimate ?? null,
          price?.lower ?? null,
          price?.upper ?? null,
        ];
      }),
    ),
  };
}

function differencesTable({ differences }: Comparison): Table {
  const futures = (name: string, meaning: string): Column => ({ name, unit: 'futures', type: 'integer', meaning });
  return {
    name: 'plan_differences',
    columns: [
      outcome,
      text('from', 'Plan that the other is set beside.'),
      text('to', 'The other plan.'),
      { name: 'difference', unit: 'as the outcome', meaning: 'Under `to` less under `from`, in the same futures.' },
      { name: 'lower', unit: 'as the outcome', meaning: 'Lower end of the 95 % interval from the number of runs.' },
      { name: 'upper', unit: 'as the outcome', meaning: 'Upper end of it.' },
      {
        name: 'lower_unknown',
        unit: 'as the outcome',
        meaning: 'Lower end of the 95 % interval from what is not known; empty where there is none.',
      },
      { name: 'upper_unknown', unit: 'as the outcome', meaning: 'Upper end of it.' },
      noUnknownColumn,
      {
        name: 'lower_prices',
        unit: 'as the outcome',
        meaning: 'Of cost where prices are ranges: the least that the difference can be.',
      },
      { name: 'upper_prices', unit: 'as the outcome', meaning: 'The most that it can be.' },
      text('told_apart', '`yes` where no interval holds 0, nor the range from prices.'),
      futures('both', 'Futures in which it happens under both plans; empty for amounts.'),
      futures('only_from', 'Under `from` only.'),
      futures('only_to', 'Under `to` only.'),
      futures('neither', 'Under neither.'),
      text('method', 'How the interval was found.'),
    ],
    rows: differences.map((one) => [
      one.outcome,
      one.from,
      one.to,
      one.estimate,
      one.interval.lower,
      one.interval.upper,
      one.intervalFromUnknown?.lower ?? null,
      one.intervalFromUnknown?.upper ?? null,
      one.noUnknown ?? null,
      one.prices?.lower ?? null,
      one.prices?.upper ?? null,
      one.toldApart ? 'yes' : 'no',
      one.futures?.both ?? null,
      one.futures?.onlyFrom ?? null,
      one.futures?.onlyTo ?? null,
      one.futures?.neither ?? null,
      one.method,
    ]),
  };
}

function bestTable({ best }: Comparison): Table {
  return {
    name: 'best_plans',
    columns: [
      outcome,
      plan,
      share('probability', 'Chance of being best with other futures of the same number; equals share.'),
      share(
        'probability_draws',
        'Share of the draws of what is not known in which it is best; empty where nothing was drawn.',
      ),
    ],
    rows: best.map((one) => [one.outcome, one.scenario, one.probability, one.probabilityOverDraws]),
  };
}

function patchesTable({ patches }: Comparison): Table {
  return {
    name: 'plan_patches',
    columns: [
      plan,
      text('patch', 'Name of the patch.'),
      animals('difference', 'Mean count at the end, more or less than under the first plan.'),
      animals('lower', 'Lower end of the 95 % interval from the number of runs.'),
      animals('upper', 'Upper end of it.'),
      share('ever_empty_before', 'Chance of standing empty at some count under the first plan.'),
      share('ever_empty', 'The same under this plan.'),
    ],
    rows: patches.map((one) => [
      one.scenario,
      one.patch,
      one.animals.estimate,
      one.animals.lower,
      one.animals.upper,
      one.everEmpty.before,
      one.everEmpty.after,
    ]),
  };
}

function robustnessTable({ robustness }: Comparison): Table {
  return {
    name: 'other_models',
    columns: [
      text('variant', 'What is different in the model.'),
      text('what', 'In a sentence; empty where it does not apply.'),
      text('not_run', 'Why it was not run; empty where it was.'),
      text('order_holds', '`yes` where every pair that the model tells apart stands the same way round.'),
      text('order', 'Plans, the best first.'),
      text('supports', 'Plans that the rule of the statement leaves; empty for none.'),
    ],
    rows: robustness.map((one) => [
      one.variant,
      one.what,
      one.notRun,
      one.holds === null ? null : one.holds ? 'yes' : 'no',
      one.order.join('; '),
      one.supports.join('; '),
    ]),
  };
}
