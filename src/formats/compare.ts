// What `skein compare --json` prints.
import * as Type from 'typebox';
import * as part from './parts.ts';
import { Criterion, Chance, Handled, Interval, NoUnknown, Precision } from './results.ts';

const scenario = part.text('Name of the plan.');
const outcome = part.text('Name of the outcome or other objective.');
const of = Type.Union([Type.Literal('chance'), Type.Literal('animals'), Type.Literal('money')]);

const Ends = Type.Object({
  estimate: part.maybe('Best single number.'),
  lower: part.maybe('Lower end of its 95 % interval; null where a single run leaves it open.'),
  upper: part.maybe('Upper end of it.'),
});

const DifferenceInterval = Type.Object({
  lower: part.maybe('Lower end; null where a single run leaves it open.'),
  upper: part.maybe('Upper end.'),
  level: part.share('Such as 0.95.'),
  method: part.text('How it was found, with the published source.'),
  from: Type.Union([Type.Literal('the number of runs'), Type.Literal('what is not known')]),
});

const Amount = Type.Object({
  mean: part.maybe('Over the finished runs.'),
  sd: part.maybe('Between the finished runs; null where there are fewer than two.'),
});

const OverBoth = Type.Object({
  runs: part.maybeShare('With other futures of the same number.'),
  draws: part.maybeShare('Share of the draws of what is not known; null where nothing was drawn.'),
});

const Plan = Type.Object({
  name: scenario,
  actions: Type.Array(
    Type.Object({ name: Type.String(), kind: Type.String(), words: part.text('What is done, where and when.') }),
  ),
  cost: part.orNull(
    Type.Object(
      {
        presentValue: part.maybe('Discounted to the first year, the mean over the futures.'),
        presentValueSd: part.maybe('Between the futures.'),
        undiscounted: part.maybe('The plain sum, the mean over the futures.'),
        undiscountedSd: part.maybe('Between the futures.'),
        least: part.maybe('Present value at the lower ends of prices that are ranges.'),
        most: part.maybe('Present value at their upper ends.'),
      },
      { description: 'Null where the model knows no money.' },
    ),
  ),
  outcomes: Type.Array(
    Type.Object({
      name: outcome,
      definition: part.text('In words, from the rule itself.'),
      probability: part.maybeShare('Of having happened at some count.'),
      intervals: Type.Object({
        runs: Interval,
        unknown: part.orNull(Interval),
        noUnknown: NoUnknown,
      }),
      atEnd: Chance,
    }),
  ),
  animalsAtEnd: Type.Object({ ...Amount.properties, quantiles: part.Quantiles }),
  meanLowestCount: part.maybe('Mean over the runs of the lowest count of all animals.'),
  animalsTaken: part.orNull(Amount),
  changeAtEnd: part.maybe('How the mean count changes a year over the last fifth of the years.'),
  notBeaten: Type.Boolean({
    description: 'No other plan is at least as good in all risks and in cost and better in one of them.',
  }),
  beaten: OverBoth,
  prices: Type.Array(
    Type.Object({
      outcome,
      costPerRisk: part.orNull(Ends),
      why: Type.Union([Type.Literal('priced'), Type.Literal('no reliable gain'), Type.Literal('costs no more')]),
    }),
    {
      description:
        'Money for each unit of chance better than under the first plan (less of what is feared, more of what is hoped for); empty without money.',
    },
  ),
  handled: Type.Array(Handled),
  criterionE: Type.Optional(Criterion),
});

const Difference = Type.Object({
  outcome,
  of,
  from: scenario,
  to: scenario,
  estimate: part.maybe('Under `to` less under `from`, in the same futures.'),
  interval: DifferenceInterval,
  intervalFromUnknown: part.orNull(DifferenceInterval),
  noUnknown: NoUnknown,
  method: part.text('How the interval was found, with the published source.'),
  prices: part.orNull(
    Type.Object(
      { lower: Type.Number(), upper: Type.Number() },
      {
        description:
          'Of money, where prices are ranges: between which amounts the difference lies with every price anywhere in its range, and the same in both plans.',
      },
    ),
  ),
  futures: part.orNull(
    Type.Object(
      {
        both: part.whole('Futures in which it happens under both plans.'),
        onlyFrom: part.whole('Under `from` only.'),
        onlyTo: part.whole('Under `to` only.'),
        neither: part.whole('Under neither.'),
      },
      { description: 'Null for amounts.' },
    ),
  ),
  toldApart: Type.Boolean({ description: 'No interval holds 0.' }),
});

const PatchChange = Type.Object({
  patch: part.patch,
  scenario,
  animals: Ends,
  everEmpty: Type.Object({
    before: part.maybeShare('Chance of standing empty at some count under the first plan.'),
    after: part.maybeShare('The same under this plan.'),
  }),
  everEmptyChange: Ends,
});

const Source = Type.Object({
  scenario,
  action: part.text('Name of the move.'),
  source: part.patch,
  change: PatchChange,
  stopBelow: part.number('Animals that 95 of 100 futures without the plan still count there in the year.'),
  year: part.year,
});

const Robust = Type.Object({
  variant: part.text('What is different.'),
  what: part.text('In a sentence.'),
  notRun: part.maybeText('Why it was not run; null where it was.'),
  order: Type.Array(scenario, { description: 'Plans by the first objective, the best first.' }),
  supports: Type.Array(scenario, { description: 'Plans that the rule of the statement leaves here.' }),
  holds: part.orNull(Type.Boolean({ description: 'Every pair that the model tells apart stands the same way round.' })),
  reversed: Type.Array(
    Type.Object({ better: scenario, worse: scenario, toldApart: Type.Boolean(), equal: Type.Boolean() }),
    { description: 'Pairs that do not.' },
  ),
});

export const CompareSchema = Type.Object({
  format: Type.Literal('skein-compare/1'),
  ...part.provenance,
  seed: part.seed,
  replicates: part.whole('Futures of each plan.'),
  years: part.years,
  firstYear: part.firstYear,
  money: part.orNull(
    Type.Object({
      currency: Type.String(),
      priceYear: part.maybe('Of whose prices all costs are; null where it was not said.'),
      discount: part.number('Share a year.'),
    }),
  ),
  objectives: Type.Array(
    Type.Object({
      name: outcome,
      definition: Type.String(),
      of,
      better: part.orNull(Type.Union([Type.Literal('less'), Type.Literal('more')])),
      decides: Type.Boolean({ description: 'It counts for being beaten: in all risks and in cost.' }),
    }),
    { description: 'The first one decides the order of the plans.' },
  ),
  scenarios: Type.Array(Plan, { description: 'The first one is `as now`.' }),
  differences: Type.Array(Difference, { description: 'Between any two plans, in every objective.' }),
  best: Type.Array(
    Type.Object({
      outcome,
      scenario,
      probability: part.maybeShare('Of being best with other futures of the same number; ties are shared.'),
      probabilityOverDraws: part.maybeShare('Share of the draws in which it is best; null where nothing was drawn.'),
    }),
  ),
  patches: Type.Array(PatchChange, { description: 'What each patch gains or loses under each plan but the first.' }),
  sources: Type.Array(Source, { description: 'What each move does to the patch that it takes from.' }),
  robustness: Type.Array(Robust, { description: 'Empty where it was not asked for.' }),
  statement: Type.Object({
    text: part.text('What the results support, in one sentence.'),
    reservations: Type.Array(Type.String(), { description: 'What stands against it, in sentences.' }),
    rule: part.text('Under which rule.'),
    strength: Type.Union([Type.Literal('clear'), Type.Literal('limited'), Type.Literal('none')]),
    plans: Type.Array(scenario, { description: 'Plans that the rule leaves.' }),
  }),
  afterHorizon: part.text('What is and is not said of the time after the last year.'),
  notDrawn: Type.Optional(
    Type.Literal(true, { description: 'The model says how sure its numbers are, but no draws were asked for.' }),
  ),
  draws: Type.Optional(
    Type.Object({
      number: part.whole('Draws of what is not known.'),
      failed: part.whole('Draws that some plan cannot have; they are left out of all.'),
      replicatesEach: part.whole('Futures of each draw.'),
    }),
  ),
  precision: Type.Optional(Precision),
  stopped: Type.Object({
    runs: part.whole('Runs that had to be stopped under the first plan.'),
    reasons: Type.Array(Type.String()),
  }),
  cautions: part.cautions,
});
