// What `skein run --json` and `skein path --json` print.
import * as Type from 'typebox';
import * as part from './parts.ts';

export const Interval = Type.Object({
  lower: part.share('Lower end.'),
  upper: part.share('Upper end.'),
  level: part.share('Such as 0.95.'),
  method: part.text('How it was found, with the published source.'),
  from: Type.Union([Type.Literal('the number of runs'), Type.Literal('what is not known')]),
});

export const NoUnknown = Type.Optional(
  Type.Union([Type.Literal('too few draws'), Type.Literal('nothing unknown'), Type.Literal('within the noise')], {
    description:
      'Why there is no interval from what is not known although it was drawn: fewer than 39 draws; no such number enters; the draws differ by no more than their numbers of runs explain.',
  }),
);

export const Chance = Type.Object({
  probability: part.maybeShare('Share of the finished runs.'),
  interval: Interval,
  intervalFromUnknown: Type.Union([Interval, Type.Null()], {
    description: 'From what is not known; null where it was not drawn, or says nothing.',
  }),
  noUnknown: NoUnknown,
});

const YearSummary = Type.Object({
  year: part.year,
  mean: part.maybe('Over the finished runs.'),
  sd: part.maybe('Between the finished runs; null where there are fewer than two.'),
  quantiles: part.Quantiles,
});

const maybeYear = part.orNull(part.year);

const Outcome = Type.Object({
  name: part.text("The author's name."),
  ...part.outcomeRule,
  words: Type.Object({
    happened: part.text("To be put behind 'having' or 'have'."),
    now: part.text("To be put behind 'being' or 'are'."),
  }),
  ever: Chance,
  atEnd: Chance,
  whenFirst: Type.Object({
    quantiles: Type.Object(
      { '0.05': maybeYear, '0.25': maybeYear, '0.5': maybeYear, '0.75': maybeYear, '0.95': maybeYear },
      { description: 'Year by which this share of the runs has come to it; null where fewer ever do.' },
    ),
    meanYears: part.maybe('Years from the start to it, the mean over the runs that come to it; null where none does.'),
  }),
  byYear: Type.Array(
    Type.Object({
      year: part.year,
      ever: part.maybeShare('Chance of having come to it by this year.'),
      lower: part.maybeShare('Lower edge of a band that holds for the whole curve with 95 %.'),
      upper: part.maybeShare('Upper edge of that band.'),
      now: part.maybeShare('Chance that it is so in this year.'),
    }),
  ),
});

const Sketched = Type.Object({
  quantilesOf: Type.Union([
    Type.Literal('abundance.whole'),
    Type.Literal('abundance.patches'),
    Type.Literal('patchesInUse'),
    Type.Literal('observed.abundance'),
  ]),
  exactBelow: part.whole('Counts below this are exact all the same.'),
  relativeError: part.share('How far a quantile of larger counts can be off, as a share of itself.'),
});

const Amounts = Type.Object({
  mean: part.maybe('Animals, over the finished runs.'),
  sd: part.maybe('Between the finished runs.'),
  quantiles: part.Quantiles,
});

const amounts = { handled: Amounts, died: Amounts, shortfall: Amounts };

export const Handled = Type.Object({
  phase: part.text('Name of the phase.'),
  does: Type.Union([Type.Literal('take'), Type.Literal('move'), Type.Literal('add')]),
  byYear: Type.Array(Type.Object({ year: part.year, ...amounts })),
  inAll: Type.Object(amounts, { description: 'Over all years.' }),
});

const maybePatch = part.maybeText('Name of the patch; null for all counted patches together.');

const Observed = Type.Object({
  classes: Type.Array(part.className, { description: 'That the counts hold.' }),
  error: part.maybe('Standard error of a count as a share of it; null where it is not known.'),
  abundance: Type.Array(Type.Object({ patch: maybePatch, byYear: Type.Array(YearSummary) }), {
    description: 'Of these classes in the runs: first all counted patches together, then each.',
  }),
  counts: Type.Array(
    Type.Object({
      patch: maybePatch,
      year: part.year,
      animals: part.number('That were counted.'),
      lies: Type.Union([Type.Literal('below'), Type.Literal('within'), Type.Literal('above'), Type.Null()], {
        description:
          'Against the band from the 0.05 to the 0.95 quantile of the runs; null where the model does not run through the year.',
      }),
      beyondError: Type.Union([Type.Boolean(), Type.Null()], {
        description:
          'Whether the 95 % interval of the count itself lies outside, too; null where its error is not known.',
      }),
    }),
  ),
  compared: part.whole('Counts of single patches in years of the model.'),
  outside: part.whole('Those of them that lie outside the band.'),
  beyondError: part.maybe(
    'Those that lie outside with all of their own 95 % interval; null where errors are not known.',
  ),
});

const Draws = Type.Object({
  number: part.whole('Draws of what is not known that were asked for.'),
  failed: part.whole('Draws that no model can have.'),
  replicatesEach: part.whole('Runs of each draw.'),
  rows: Type.Array(
    Type.Object({
      draw: part.whole('From 1.'),
      values: Type.Record(Type.String(), Type.Number()),
      failure: Type.Union([Type.String(), Type.Null()], {
        description: 'Why no model can have these values; null where it was run.',
      }),
      ever: Type.Array(part.maybeShare('By outcome; null where it was not run.')),
    }),
  ),
});

export const Criterion = Type.Object(
  {
    outcome: part.text('The outcome that nobody is left anywhere.'),
    generationLength: part.number('Mean age of mothers in the stable population near zero, in years.'),
    windows: Type.Array(
      Type.Object({
        category: part.text('Whose threshold it is.'),
        years: part.whole('Within these.'),
        chance: part.share('Of extinction, at least.'),
        found: part.orNull(
          Type.Object({
            probability: part.maybeShare('Of extinction within these years.'),
            lower: part.maybeShare('Lower edge of the band.'),
            upper: part.maybeShare('Upper edge.'),
          }),
        ),
        says: Type.Union([
          Type.Literal('consistent with'),
          Type.Literal('not consistent with'),
          Type.Literal('undecided'),
          Type.Literal('looks less far ahead'),
        ]),
      }),
    ),
  },
  {
    description: 'Windows of criterion E of the IUCN Red List; never a listing. Absent where no outcome is extinction.',
  },
);

const Rare = Type.Object({
  outcome: part.text("The author's name."),
  definition: part.text('In words, from the rule itself.'),
  reason: part.maybeText('Why there is no estimate; null where there is one.'),
  probability: part.orNull(part.share('Of having ever come to it.')),
  standardError: part.maybe('From how far the repeats lie apart.'),
  interval: part.orNull(Interval),
  levels: Type.Array(
    Type.Object({
      below: Type.Optional(part.number('A level of a fall; the last is the threshold of the outcome.')),
      above: Type.Optional(part.number('A level of a rise.')),
      passed: part.share('Of the trials from the level before, in the mean over the repeats.'),
    }),
  ),
  repeats: part.whole('Independent ones of the whole.'),
  trials: part.whole('Of each level in each repeat.'),
  replicateYears: part.whole('Years of replicates that it took.'),
});

export const Precision = Type.Object(
  {
    asked: part.share('Half the width of a 95 % interval from the number of runs that was asked for.'),
    halfWidth: part.share('The widest of any outcome.'),
    reached: Type.Boolean(),
    atMost: part.whole('Replicates at which the run would have ended without.'),
  },
  { description: 'Of a run that goes on until it is precise; absent where that was not asked for.' },
);

export const RunSchema = Type.Object({
  format: Type.Literal('skein-run/1'),
  ...part.provenance,
  seed: part.seed,
  replicates: part.whole('Runs that were made, the stopped ones among them.'),
  years: part.years,
  firstYear: part.firstYear,
  abundance: Type.Object({
    whole: Type.Array(YearSummary),
    patches: Type.Array(
      Type.Object({
        patch: part.patch,
        byYear: Type.Array(YearSummary),
        empty: Type.Optional(
          Type.Array(part.maybeShare('Share of the runs in which nobody is there.'), {
            description: 'In the order of `byYear`.',
          }),
        ),
      }),
    ),
  }),
  outcomes: Type.Array(Outcome),
  handled: Type.Array(Handled, { description: 'What takes, moves and releases came to, in the order of the year.' }),
  meanLowestCount: Type.Object({
    mean: part.maybe('Over the finished runs.'),
    sd: part.maybe('Between the finished runs.'),
    standardError: part.maybe('Of the mean, from the number of runs; null where that cannot be told.'),
  }),
  patchesInUse: Type.Array(Type.Object({ year: part.year, mean: Type.Number(), quantiles: part.Quantiles })),
  observed: Type.Optional(Observed),
  sketched: Type.Array(Sketched, { description: 'Empty where every quantile is a count that some run had.' }),
  notDrawn: Type.Optional(
    Type.Literal(true, { description: 'The model says how sure its numbers are, but no draws were asked for.' }),
  ),
  precision: Type.Optional(Precision),
  criterionE: Type.Optional(Criterion),
  rare: Type.Optional(Type.Array(Rare, { description: 'By splitting; absent where it was not asked for.' })),
  draws: Type.Optional(Draws),
  stopped: Type.Object({
    runs: part.whole('Runs that had to be stopped; they are in no other number.'),
    reasons: Type.Array(Type.String()),
  }),
  places: part.places,
  cautions: part.cautions,
});

export const PathSchema = Type.Object({
  format: Type.Literal('skein-path/1'),
  ...part.provenance,
  years: part.years,
  firstYear: part.firstYear,
  abundance: Type.Array(
    Type.Object({
      year: part.year,
      patch: part.patch,
      class: part.className,
      animals: Type.Number({ minimum: 0, description: 'On the path without chance.' }),
    }),
  ),
  growth: Type.Object(
    {
      withoutChance: part.number('Growth rate of a year in which everything that varies is at its mean.'),
      withChance: part.orNull(
        Type.Object(
          {
            growthRate: part.number('exp of the mean yearly change of the logarithm.'),
            logGrowth: part.number('Mean yearly change of the natural logarithm of numbers.'),
            standardError: part.number('Of that mean.'),
            yearlyVariance: part.number('Variance that a year adds to the logarithm in the long run.'),
            years: part.whole('That were simulated, all courses together.'),
          },
          { description: 'Growth in the long run where years differ by chance.' },
        ),
      ),
      reason: part.maybeText('Why there is none; null where there is one.'),
    },
    { description: 'Near zero, where neither crowding nor ceilings matter, with the rates of the first year.' },
  ),
  places: part.places,
  cautions: part.cautions,
});
