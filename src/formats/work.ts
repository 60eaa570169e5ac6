// What `skein check --json` prints, and the run.json and log.json that `--out` writes.
import * as Type from 'typebox';
import * as part from './parts.ts';

const Place = Type.Object({
  file: Type.String(),
  line: Type.Integer({ minimum: 1 }),
  column: Type.Integer({ minimum: 1 }),
  length: part.whole('Stretch in UTF-16 code units.'),
  text: part.text('The whole first line.'),
});

const Diagnostic = Type.Object({
  severity: Type.Union([Type.Literal('error'), Type.Literal('warning'), Type.Literal('note')]),
  code: part.text('A stable word for the kind of mistake.'),
  message: Type.String(),
  place: Type.Optional(Place),
  found: Type.Optional(Type.String()),
  expected: Type.Optional(Type.String()),
  nearest: Type.Optional(part.text('The nearest known name.')),
  fix: Type.Optional(part.text('How to mend it.')),
  reason: Type.Optional(part.text('Why it matters.')),
});

export const CheckSchema = Type.Object({
  format: Type.Literal('skein-check/1'),
  diagnostics: Type.Array(Diagnostic),
  defaults: part.orNull(Type.Array(Type.String(), { description: 'Every default that was used, in words.' })),
  growthRate: part.maybe('Of the linked system near zero; null where there is an error.'),
  patches: part.orNull(
    Type.Array(
      Type.Object({
        patch: part.patch,
        growthAlone: part.number('Growth rate alone near zero, without dispersal.'),
        alone: part.maybe('Animals where the patch alone stands still; null where it never does.'),
        linked: part.maybe('The same in the linked system.'),
      }),
    ),
  ),
  dispersal: part.orNull(Type.Array(Type.Object({ phase: Type.String() }))),
  variation: part.orNull(Type.Object({})),
  catastrophes: part.orNull(
    Type.Array(
      Type.Object({
        name: Type.String(),
        patches: Type.Array(
          Type.Object({
            patch: part.patch,
            yearsStruck: part.number('Share of the years in which it is struck.'),
            yearsBegun: part.number('Share of the years in which it begins there.'),
          }),
        ),
      }),
    ),
  ),
});

const command = Type.Union([
  Type.Literal('run'),
  Type.Literal('path'),
  Type.Literal('analyse'),
  Type.Literal('compare'),
]);
const logged = Type.Union([...command.anyOf, Type.Literal('sweep'), Type.Literal('sweep merge')]);

export const InputsSchema = Type.Object({
  format: Type.Literal('skein-inputs/1'),
  command,
  ...part.provenance,
  places: part.places,
  robust: Type.Optional(Type.Literal(true, { description: 'Of a comparison: other sound models were asked, too.' })),
  spec: Type.Object({}, { description: 'The model with all its inputs, as the language has it.' }),
});

export const LogSchema = Type.Object({
  format: Type.Literal('skein-log/1'),
  command: logged,
  hash: part.provenance.hash,
  version: part.text('Of skein.'),
  started: Type.String({ description: 'ISO 8601, UTC.' }),
  seconds: Type.Number({ minimum: 0 }),
  threads: Type.Integer({ minimum: 1 }),
  host: Type.Object({
    node: Type.String(),
    platform: Type.String(),
    architecture: Type.String(),
    cores: Type.Integer(),
  }),
});
