// What an analysis says, as data: the published schema, from which the types come.
import * as Type from 'typebox';
import type { Static, TSchema } from 'typebox';

const orNull = <T extends TSchema>(schema: T) => Type.Union([schema, Type.Null()]);
const closed = <T extends Record<string, TSchema>>(properties: T, description?: string) =>
  Type.Object(properties, { additionalProperties: false, ...(description === undefined ? {} : { description }) });
const number = (description: string) => Type.Number({ description });
const maybe = (description: string) => Type.Union([Type.Number(), Type.Null()], { description });

const patch = Type.String({ description: 'Name of the patch.' });
const className = Type.String({ description: 'Name of the class.' });
const State = closed({ patch, class: className });
const Extreme = closed({
  times: number('Size against steady growth from the same number.'),
  step: Type.Integer({ minimum: 0, description: 'Steps from the start.' }),
});

export const BlockSchema = closed(
  {
    states: Type.Array(State),
    growthRate: number('0 where no state of the block ever comes back.'),
    imprimitivity: Type.Integer({ minimum: 0 }),
    feeds: Type.Array(Type.Integer({ minimum: 0 }), {
      description: 'Blocks that this one sends to, by place in the list.',
    }),
  },
  'States that can all reach one another.',
);

export const EntrySchema = closed({
  from: State,
  to: State,
  value: number('Animals next year for each animal now.'),
  sensitivity: number('Growth per unit of the entry.'),
  elasticity: number('Share of growth per share of the entry; these sum to 1.'),
});

export const ParameterSchema = closed({
  name: Type.String(),
  value: Type.Number(),
  sensitivity: number('Growth per unit of the parameter; the strength of crowding stays what was solved for.'),
  elasticity: number('Share of growth per share of the parameter; these need not sum to 1.'),
  sensitivitySolvedAnew: number('The same where the strength of crowding is solved anew, so that capacities stay.'),
  exact: Type.Boolean({ description: 'By exact derivatives, or by differences where a number is beyond them.' }),
});

export const PatchSchema = closed({
  patch,
  share: maybe('Share of the stable distribution.'),
  growthAlone: number('Growth rate when whoever leaves is lost and nobody comes.'),
  contribution: maybe(
    'Animals next year anywhere for each animal in the patch, made up as in the stable distribution.',
  ),
  contributionNow: maybe('The same, made up as at the start.'),
  selfRecruitment: maybe('As `contribution`, counting only those in the patch itself.'),
  role: orNull(Type.Union([Type.Literal('source'), Type.Literal('sink'), Type.Literal('undecided')])),
  removalLoss: maybe('Growth lost when the patch and its animals are taken away.'),
});

export const LinkSchema = closed({
  phase: Type.String(),
  from: patch,
  to: patch,
  class: className,
  share: number('Share of the animals present that arrives over the link.'),
  sensitivity: number('Growth per unit of the share, nothing else changed.'),
  sensitivityInsteadOfStaying: number('The same where those who go would otherwise have stayed.'),
  removalLoss: number('Growth lost when those who would have arrived are lost.'),
  exact: Type.Boolean({ description: 'Recomputed whole, or share times sensitivity.' }),
});

export const TransientsSchema = closed({
  reactivity: number('Largest that any start can be after one step, against steady growth.'),
  firstStepAttenuation: number('Smallest that any start can be after one step.'),
  stepsFollowed: Type.Integer({ minimum: 1, description: 'Steps over which highest and lowest were looked for.' }),
  highest: Extreme,
  lowest: Extreme,
  lasting: orNull(
    closed({ gain: Type.Number(), loss: Type.Number() }, 'What the best and the worst start keep for good.'),
  ),
  kreiss: orNull(closed({ atLeast: Type.Number(), atMost: Type.Number() }, 'Kreiss bounds of highest and lowest.')),
  fromStart: orNull(
    closed({
      times: Type.Array(Type.Number(), { description: 'At each count, against steady growth from the same number.' }),
      lasting: maybe('Where it comes to in the long run.'),
      stepsToSettle: maybe('First count from which it stays within 5 % of that.'),
    }),
  ),
});

export const EquilibriumSchema = closed({
  invasionGrowth: number('Growth rate when almost nobody is there.'),
  states: Type.Array(
    closed({
      animals: Type.Array(closed({ patch, class: className, animals: Type.Number() })),
      total: Type.Number(),
      leadingModulus: number('By this factor a year small disturbances fade.'),
      stable: Type.Boolean(),
    }),
  ),
  startThreshold: orNull(
    closed({ diesBelow: Type.Number(), lastsAbove: Type.Number() }, 'Total animals, made up as at the start.'),
  ),
});

export const StochasticGrowthSchema = closed({
  approximation: orNull(
    closed({
      growthRate: number('e to the mean yearly change of ln numbers.'),
      logGrowth: Type.Number(),
      yearlyVariance: number('Variance that a year adds to ln numbers in the long run.'),
      method: Type.String(),
      leftOut: Type.Array(Type.String(), { description: 'What acts in the mean year only.' }),
    }),
  ),
  simulated: orNull(
    closed({
      growthRate: number('e to the mean yearly change of ln numbers.'),
      logGrowth: Type.Number(),
      standardError: number('Of `logGrowth`, from independent courses.'),
      yearlyVariance: number('Variance that a year adds to ln numbers in the long run.'),
      years: number('That were simulated, all courses together.'),
    }),
  ),
});

export const FallingSchema = closed(
  {
    outcome: Type.String({ description: "The author's name." }),
    definition: Type.String({ description: 'In words, from the rule itself.' }),
    threshold: number('Below so many of those that are counted it has come.'),
    logDistance: number(
      'ln of the count at the start over the threshold, with each animal of the start counted by its worth.',
    ),
    drift: number('Mean yearly change of ln numbers, simulated (as in stochasticGrowth).'),
    variance: number('Variance that a year adds to ln numbers, simulated.'),
    replicates: Type.Integer({ minimum: 1, description: 'Runs that the simulated shares are of.' }),
    years: Type.Array(
      closed({
        year: Type.Integer({ description: 'Calendar year of the count.' }),
        diffusion: number('Chance of having fallen by then, for numbers that are counted once a year.'),
        simulated: number('Share of the runs that had fallen by then.'),
        lower: number('Of a band that holds for the whole simulated curve at once (95 %).'),
        upper: number('Of the same band.'),
      }),
    ),
  },
  'An outcome that comes when freely drifting numbers fall.',
);

export const InvasionSchema = closed(
  {
    growthRate: number('Growth rate of a few animals: above 1 the species can come in.'),
    factors: Type.Array(
      closed({
        crowding: Type.String({ description: 'Name of the condition.' }),
        least: number('Of its factors over the patches, near zero.'),
        most: number('Of the same.'),
      }),
      { description: 'What conditions leave of the rates they act on where almost nobody is.' },
    ),
    patches: Type.Array(
      closed({ patch, growthAlone: number('Growth rate if all that leave were lost and nobody came.') }),
    ),
    makeUp: orNull(
      Type.Array(closed({ patch, class: className, share: Type.Number() }), {
        description: 'What few animals come to be made up of; null where there is no single such make-up.',
      }),
    ),
    entries: Type.Array(closed({ from: State, to: State, value: number('Animals next year for each animal now.') }), {
      description: 'Of the matrix near zero; of many, those with the largest values.',
    }),
  },
  'The matrix that a few newcomers grow by.',
);

export const SpreadSchema = closed(
  {
    patch,
    speedKm: number('Kilometres a step that a front comes to over empty land like that of the patch.'),
    theta: number('Steepness of the front, per km.'),
    parameters: Type.Array(
      closed({
        name: Type.String(),
        sensitivity: number('Kilometres a step per unit of the parameter.'),
        elasticity: number('Share of the speed per share of the parameter.'),
      }),
    ),
  },
  'Only patches where a population grows.',
);

export const AnalysisSchema = closed({
  format: Type.Literal('skein-analysis/1'),
  tool: Type.Optional(closed({ name: Type.Literal('skein'), version: Type.String(), kernel: Type.String() })),
  model: Type.Optional(Type.String({ description: 'Title of the study.' })),
  hash: Type.Optional(Type.String({ description: 'SHA-256 of everything that decides the result.' })),
  at: Type.Union([Type.Literal('zero'), Type.Literal('equilibrium'), Type.Literal('start')], {
    description: 'Where the matrix was taken: with nobody there, where numbers stand still, or at the start.',
  }),
  growthRate: number('Factor by which numbers change in a year, in the long run at mean rates.'),
  dampingRatio: maybe('By this factor a year what is not in stable proportion fades.'),
  period: maybe('Years from wave to wave of what fades slowest.'),
  eigenvalues: orNull(Type.Array(closed({ re: Type.Number(), im: Type.Number() }))),
  irreducible: Type.Boolean({ description: 'Every state can reach every other.' }),
  primitive: Type.Boolean({ description: 'Irreducible, and numbers settle.' }),
  imprimitivity: Type.Integer({
    minimum: 0,
    description: 'Common divisor of the lengths of all loops: 1 where numbers settle, 0 without a loop.',
  }),
  blocks: Type.Array(BlockSchema),
  netReproductiveRate: maybe('Young of a newborn in its life.'),
  generationTime: orNull(
    closed({
      cohort: maybe('Mean age of mothers in one cohort, steps.'),
      stable: maybe('Mean age of mothers in the stable population, steps.'),
      replacement: maybe('Steps in which numbers multiply by the net reproductive rate.'),
    }),
  ),
  lifetimes: orNull(
    Type.Array(
      closed({
        patch,
        class: className,
        expectancy: number('Steps until death, the present one included.'),
        variance: Type.Number(),
      }),
    ),
  ),
  stableDistribution: orNull(Type.Array(closed({ patch, class: className, share: Type.Number() }))),
  reproductiveValue: orNull(Type.Array(closed({ patch, class: className, value: Type.Number() }))),
  entries: orNull(Type.Array(EntrySchema)),
  parameters: orNull(Type.Array(ParameterSchema)),
  patches: orNull(Type.Array(PatchSchema)),
  links: orNull(Type.Array(LinkSchema)),
  transients: orNull(TransientsSchema),
  stochasticGrowth: orNull(StochasticGrowthSchema),
  fallingBelow: orNull(Type.Array(FallingSchema)),
  growthStandardError: maybe('Standard error of the growth rate from those of the parameters.'),
  invasion: orNull(InvasionSchema),
  equilibrium: orNull(EquilibriumSchema),
  metapopulationCapacity: orNull(
    closed({
      capacity: Type.Number(),
      patchValues: orNull(Type.Array(closed({ patch, value: Type.Number() }))),
    }),
  ),
  spread: orNull(Type.Array(SpreadSchema)),
  ltre: orNull(
    closed({
      against: Type.String({ description: 'Title of the model, or name of the scenario, that it is compared with.' }),
      difference: number('Growth rate less that of the reference.'),
      unexplained: number('What the entries leave of the difference.'),
      parameters: orNull(
        Type.Array(
          closed({
            name: Type.String(),
            value: Type.Number(),
            reference: Type.Number(),
            contribution: number('What the difference of this number adds to that of the growth rate.'),
          }),
        ),
      ),
      unexplainedByParameters: maybe('What the named numbers leave of the difference.'),
      whyNoParameters: orNull(Type.String()),
      contributions: Type.Array(
        closed({ from: State, to: State, difference: Type.Number(), contribution: Type.Number() }),
      ),
    }),
  ),
  cautions: Type.Array(Type.String()),
  reasons: Type.Record(Type.String(), Type.String(), { description: 'Why a field is null.' }),
});

export type Analysis = Static<typeof AnalysisSchema>;

/** The published JSON Schema of `skein analyse --json`. */
export const analysisJsonSchema: TSchema = Type.Object(AnalysisSchema.properties, {
  additionalProperties: false,
  $schema: 'https://json-schema.org/draft/2020-12/schema',
  title: 'Analysis of a block projection matrix',
});
