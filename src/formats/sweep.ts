// The manifest of a sweep, and what a sweep says.
import * as Type from 'typebox';
import { designNames } from '../spec/schema/sweep.ts';
import * as part from './parts.ts';

const Value = Type.Union([Type.Number(), Type.String()], { description: 'A number in its base unit, or a name.' });

const Range = Type.Union([
  Type.Object({
    by: Type.Literal('from to'),
    from: Type.Number(),
    to: Type.Number(),
    scale: Type.Union([Type.Literal('even'), Type.Literal('ratio')]),
    steps: Type.Integer({ minimum: 1 }),
  }),
  Type.Object({ by: Type.Literal('values'), values: Type.Array(Value) }),
  Type.Object({
    by: Type.Literal('how sure it is'),
    distribution: Type.Record(Type.String(), Type.Unknown()),
    steps: Type.Integer({ minimum: 1 }),
  }),
]);

const Factor = Type.Object({
  name: part.text('A named parameter, or a place of the model.'),
  base: Value,
  range: Range,
});

const designName = Type.Union([...designNames]);

const Design = Type.Object({
  design: designName,
  factors: Type.Array(Factor),
  points: Type.Optional(part.whole('Points, rows of shares of variance, or walks.')),
  seed: Type.Optional(part.whole('Decides where sampled points lie.')),
  scrambled: Type.Optional(Type.Boolean()),
  rows: Type.Optional(Type.Array(Type.Array(Value), { description: 'Points of a list, in the order of the factors.' })),
});

const runs = part.orNull(
  Type.Object(
    { replicates: part.whole('At each point.'), years: part.years, seed: part.seed },
    { description: 'Null where no measure asks for runs.' },
  ),
);

const Column = Type.Object({
  name: Type.String(),
  type: Type.Union([Type.Literal('integer'), Type.Literal('number'), Type.Literal('text')]),
  unit: Type.String(),
  meaning: Type.String(),
});

export const SweepSchema = Type.Object({
  format: Type.Literal('skein-sweep/1'),
  ...part.provenance,
  design: Design,
  measures: Type.Array(Type.String()),
  scenarios: Type.Array(Type.String(), { description: 'Set beside each other at every point; empty for none.' }),
  quantities: Type.Array(
    Type.Object({
      name: Type.String(),
      scenario: part.maybeText('Null where none are compared.'),
      better: Type.Union([Type.Literal('less'), Type.Literal('more'), Type.Null()], {
        description: 'What makes one scenario better than another by it.',
      }),
    }),
  ),
  points: part.whole('Of the whole design.'),
  pointsInPart: Type.Integer({ minimum: 1, description: 'Each part holds so many points, the last perhaps fewer.' }),
  parts: Type.Integer({ minimum: 1 }),
  runs,
  columns: Type.Array(Column, { description: 'Of the parts and of points.csv, in their order.' }),
  spec: Type.Object({}, { description: 'The model with all its inputs, as the language has it.' }),
});

const Band = Type.Object({ lower: part.maybe('95 %.'), upper: part.maybe('95 %.') });

const FactorSummary = Type.Object({
  name: Type.String(),
  response: Type.Object({
    groups: Type.Array(
      Type.Object({
        from: Value,
        to: Value,
        points: part.whole('At this value, or in this slice of the values.'),
        mean: part.maybe('Of the measure.'),
        lower: part.maybe('Value that 5 % of the points do not exceed.'),
        upper: part.maybe('Value that 95 % of the points do not exceed.'),
        told: Type.Optional(
          part.maybe('Of a difference from runs, the share of these points that tell it from 0; absent of all else.'),
        ),
      }),
    ),
    explained: part.maybe('Share of the variance of the measure between the values of the number.'),
  }),
  throughOne: part.orNull(
    Type.Array(Type.Number(), { description: 'Where the mean growth over the other numbers goes through 1.' }),
  ),
  shares: part.orNull(
    Type.Object({
      first: part.maybe('Share of the variance by the number alone (Saltelli et al. 2010).'),
      firstBand: Band,
      firstByDifferences: part.maybe('The same by differences (Jansen 1999).'),
      total: part.maybe('Share with all that it does together with others (Jansen 1999).'),
      totalBand: Band,
    }),
  ),
  screen: part.orNull(
    Type.Object({
      meanSize: part.maybe('Mean size of the effects over the whole range (Campolongo et al. 2007).'),
      mean: part.maybe('Mean effect, with its sign.'),
      spread: part.maybe('Standard deviation of the effects.'),
      standardError: part.maybe('Of the mean size.'),
      noise: part.maybe('Size of effects from the number of replicates alone.'),
      effects: part.whole('That were whole.'),
    }),
  ),
  rankCorrelation: part.orNull(Type.Object({ correlation: part.maybe('Partial, of ranks.'), band: Band })),
});

export const SweepSummarySchema = Type.Object({
  format: Type.Literal('skein-sweep-summary/1'),
  ...part.provenance,
  design: designName,
  points: part.whole('Of the design.'),
  runs,
  failed: Type.Object({
    points: part.whole('Points that no model can have.'),
    reasons: Type.Array(Type.Object({ reason: Type.String(), points: part.whole('With this reason.') })),
  }),
  factors: Type.Array(
    Type.Object({
      name: Type.String(),
      base: Value,
      unit: Type.String({ description: 'Empty where the language has none for it.' }),
    }),
  ),
  quantities: Type.Array(
    Type.Object({
      name: Type.String(),
      unit: Type.String(),
      meaning: Type.String(),
      least: part.maybe('Over the points.'),
      greatest: part.maybe('Over the points.'),
      mean: part.maybe('Over the points.'),
      noise: part.maybe('Share of the variance over the points that comes from the number of replicates.'),
      variance: part.maybe('Over the points, without that noise; of shares of variance only.'),
      told: part.orNull(
        Type.Object(
          {
            above: part.whole('Points at which its 95 % interval lies above 0.'),
            below: part.whole('Points at which it lies below.'),
            not: part.whole('Points at which it holds 0.'),
          },
          { description: 'Null but for a difference from runs.' },
        ),
      ),
      factors: Type.Array(FactorSummary, { description: 'What matters most first.' }),
      orderedBy: Type.String(),
    }),
  ),
  rankings: Type.Array(
    Type.Object({
      quantity: Type.String(),
      better: Type.Union([Type.Literal('less'), Type.Literal('more')]),
      scenarios: Type.Array(
        Type.Object({
          name: Type.String(),
          best: part.maybe('Share of the points at which it is best.'),
          toldBest: part.maybe('Share of the points at which it is best, and told apart from all others.'),
        }),
      ),
      points: part.whole('Points at which every scenario has a number.'),
      told: part.whole('Of them, points at which the best scenario is told apart from all others.'),
      agree: part.maybe('Share of the points at which both halves of the replicates name the same scenario.'),
      factors: Type.Array(
        Type.Object({
          name: Type.String(),
          groups: Type.Array(
            Type.Object({
              from: Value,
              to: Value,
              points: part.whole('At this value, or in this slice of the values.'),
              best: Type.Array(part.maybe('By scenario, the share of these points at which it is best.')),
              preferred: part.text('Best in the mean over these points.'),
              told: part.maybe('Share of these points at which the best scenario is told apart from all others.'),
            }),
          ),
          switches: Type.Array(
            Type.Object({
              at: part.maybe('Between two neighbouring values; null where they are no numbers.'),
              from: Type.String(),
              to: Type.String(),
              untold: part.orNull(
                Type.Object(
                  { from: Value, to: Value },
                  {
                    description:
                      'Values around it at which at half of the points or more the best scenario is not told apart; null where both neighbours are.',
                  },
                ),
              ),
            }),
          ),
          decides: part.maybe('How much of which scenario is best the number decides by itself, 0 to 1.'),
        }),
        { description: 'What decides most first.' },
      ),
    }),
    { description: 'Which scenario is best where; empty where none are compared.' },
  ),
  assumptions: Type.Array(Type.String(), { description: 'What each number of sensitivity takes for granted.' }),
});
