// What `skein show STAGE --json` and `skein compile` print of the stages of the work.
import * as Type from 'typebox';
import * as part from './parts.ts';

const Named = Type.Object({ name: Type.String() });

export const ModelSchema = Type.Object({
  format: Type.Literal('skein-model/1'),
  title: part.text('Title of the study.'),
  question: part.maybeText('The decision question.'),
  by: part.maybeText('Who made it.'),
  madeFor: part.maybeText('Whom it was made for.'),
  date: part.maybeText('As its author wrote it.'),
  status: part.maybeText('Such as draft.'),
  invented: Type.Boolean({ description: 'Nothing in it is of a real place.' }),
  firstYear: part.firstYear,
  steps: part.years,
  counts: Type.Union([Type.Literal('females'), Type.Literal('both sexes')]),
  oldest: Type.Union([Type.Literal('open-ended'), Type.Literal('terminal'), Type.Null()]),
  classes: Type.Array(Type.String()),
  year: Type.Array(Type.String(), { description: 'The phases as the author ordered them.' }),
  parameters: Type.Array(
    Type.Object({
      name: Type.String(),
      value: Type.Number(),
      expression: Type.String(),
      source: part.maybeText('Where the number is from.'),
      basis: part.maybeText('How it is known.'),
    }),
  ),
  replicates: part.whole('Runs that it asks for.'),
  seed: part.seed,
  defaults: Type.Array(Type.String(), { description: 'Every default that was used, in words.' }),
  patches: Type.Array(
    Type.Object({
      name: part.patch,
      at: part.orNull(Type.Array(Type.Number(), { minItems: 2, maxItems: 2, description: 'Kilometres on the plane.' })),
      areaKm2: part.maybe('Area.'),
      capacity: part.maybe('Capacity.'),
    }),
  ),
  phases: Type.Array(Type.Object({ kind: Type.String(), name: Type.String() }), {
    description: 'From one count to the next, each with what its kind has.',
  }),
  crowding: Type.Array(Named),
  start: Type.Object({}),
  outcomes: Type.Array(Type.Object({ name: Type.String(), ...part.outcomeRule, in: Type.Array(part.patch) })),
});

export const LandscapeSchema = Type.Object({
  format: Type.Literal('skein-landscape/1'),
  patches: Type.Array(
    Type.Object({ patch: part.patch, at: part.orNull(Type.Array(Type.Number())), areaKm2: part.maybe('Area.') }),
  ),
  dispersals: Type.Array(
    Type.Object({
      phase: part.text('Dispersal by its name.'),
      ways: Type.Array(
        Type.Object({
          from: part.patch,
          to: part.patch,
          km: part.maybe('Length of the way; null where it has none.'),
          chance: part.share('Of arriving there alive, for an animal that left.'),
        }),
      ),
    }),
  ),
});

export const MatrixSchema = Type.Object({
  format: Type.Literal('skein-matrix/1'),
  at: Type.Union([Type.Literal('zero'), Type.Literal('equilibrium'), Type.Literal('start')]),
  growthRate: part.number('Leading eigenvalue.'),
  stableDistribution: part.orNull(
    Type.Array(Type.Object({ patch: part.patch, class: part.className, share: Type.Number() })),
  ),
  reproductiveValue: part.orNull(
    Type.Array(Type.Object({ patch: part.patch, class: part.className, value: Type.Number() })),
  ),
  reason: part.maybeText('Why there is no single stable distribution; null where there is one.'),
  irreducible: Type.Boolean(),
  primitive: Type.Boolean(),
  states: Type.Array(part.State, { description: 'Of the rows and columns, in their order.' }),
  entries: Type.Array(
    Type.Object({ from: part.State, to: part.State, value: part.number('Next year for each animal now.') }),
  ),
});

const Program = Type.Array(
  Type.Object({
    opcode: Type.String(),
    name: part.text('Of the phase or condition.'),
    key: Type.String({ pattern: '^[0-9a-f]{8}$', description: 'Of its random streams.' }),
    operands: Type.Record(Type.String(), Type.Integer()),
  }),
);

export const PackedSchema = Type.Object({
  format: Type.Literal('skein-packed/1'),
  version: part.text('Of the image.'),
  bytes: part.whole('Size of the image.'),
  patches: part.whole('Number of patches.'),
  classes: part.whole('Number of classes.'),
  steps: part.years,
  yearProgram: Program,
  phaseProgram: Program,
  sections: Type.Array(
    Type.Object({
      row: part.whole('What operands name.'),
      kind: Type.String(),
      offset: part.whole('Bytes from the start of the image.'),
      columns: part.whole('Entries of one epoch or record.'),
      epochOf: part.maybe('Row that says which epoch holds; null where there is one.'),
      values: Type.Array(part.orNull(Type.Number())),
    }),
  ),
});

/** The custom section of the module that `skein compile -o FILE.wasm` writes. */
export const ModuleSchema = Type.Object({
  format: Type.Literal('skein-module/1'),
  ...part.provenance,
  seed: part.seed,
  replicates: part.whole('Runs that the model asks for.'),
  years: part.years,
  firstYear: part.firstYear,
  image: Type.Object({ address: part.whole('In the memory of the module.'), size: part.whole('Bytes.') }),
  lanes: part.whole('Replicates that run side by side.'),
  patches: Type.Array(part.patch),
  classes: Type.Array(part.className),
  outcomes: Type.Array(Type.Object({ name: Type.String(), ...part.outcomeRule })),
  columns: Type.Array(Type.String(), { description: 'What is counted, in the order of `observed()`.' }),
});
