import * as Type from 'typebox';
import type { Static } from 'typebox';
import { Source } from './source.ts';
import { Uncertain } from './uncertainty.ts';
import { fileName, Name, quantity, text, timed } from './values.ts';

const Place = Type.Tuple([Type.Number(), Type.Number()], { title: 'two numbers, x and y' });

/** Polygons, each of an outer ring and rings of holes, as in GeoJSON's MultiPolygon. */
const PatchOutline = Type.Array(Type.Array(Type.Array(Place, { title: 'a ring: a list of places' })), {
  minItems: 1,
  title: 'a list of polygons, each a list of rings, each a list of places',
  description:
    'The edge of the patch: polygons, each an outer ring and the rings of its holes. It gives the area and, without `at`, the place.',
  examples: ['[[[[0, 0], [2, 0], [2, 1], [0, 1]]]]'],
});

const Exists = Type.Object(
  {
    from: Type.Optional(
      Type.Integer({ description: 'The first year in which there is this patch.', examples: [2031] }),
    ),
    until: Type.Optional(
      Type.Integer({ description: 'The last year in which there is this patch.', examples: [2040] }),
    ),
  },
  {
    additionalProperties: false,
    title: '{ from: …, until: … }',
    description:
      'In which years there is this patch. Before and after them nobody goes there; who is there when it is lost dies at the start of the next year.',
    examples: ['{ from: 2031 }'],
  },
);

export const PatchAttribute = timed({
  description: 'Any other key is an attribute of the patch that expressions may use by its name.',
  examples: [0.4],
});

export const InlinePatch = Type.Object(
  {
    name: Type.String({ ...Name, description: 'What the patch is called.', examples: ['North fen'] }),
    at: Type.Optional(
      Type.Tuple([Type.Number(), Type.Number()], {
        title: 'two numbers, x and y',
        description:
          'Where the middle of the patch lies: x to the east and y to the north in the `unit` of the plane, or longitude and latitude in degrees.',
        examples: ['[3.2, 9.1]'],
        'x-unit': 'the `unit` of the plane, or degrees',
      }),
    ),
    outline: Type.Optional(PatchOutline),
    area: Type.Optional(quantity('area', { description: 'Size of the patch.', examples: ['140 ha'] })),
    capacity: Type.Optional(
      timed({
        description: 'How many animals the patch has room for, in the count of the crowding or ceiling that uses it.',
        examples: [260],
        'x-unit': 'animals',
      }),
    ),
    exists: Type.Optional(Exists),
  },
  {
    additionalProperties: PatchAttribute,
    propertyNames: { format: 'identifier' },
    'x-key': 'ATTRIBUTE',
    title: 'a patch: { name: …, at: […], … }',
  },
);

const InlinePatches = Type.Array(InlinePatch, { minItems: 1, title: 'a list of patches' });

/** Features of a GeoJSON file. */
const PatchFile = Type.Object(
  {
    file: Type.String({
      minLength: 1,
      format: 'file',
      description: 'A GeoJSON file beside the spec.',
      examples: ['fens.geojson'],
    }),
    name: Type.Optional(
      text({
        description: 'The property of the features that is the name of the patch.',
        examples: ['site'],
        default: 'name',
      }),
    ),
  },
  { additionalProperties: false, title: '{ file: FILE, name: PROPERTY }' },
);
export type PatchFileRef = Static<typeof PatchFile>;

export const Patches = Type.Union([InlinePatches, fileName(), PatchFile], {
  title: 'a list of patches, or the name of a GeoJSON file',
  description:
    'The habitat patches, or the GeoJSON file (points, polygons, multipolygons) that holds them; numbers among the properties of a feature are attributes of its patch. Their order changes nothing.',
  examples: ['- { name: North fen, at: [3.2, 9.1], area: 140 ha, capacity: 260 }'],
});

export const Parameter = Type.Union([
  timed({ description: 'A number of its own name.', examples: [0.22] }),
  Type.Object(
    {
      value: timed({ description: 'The number, or an expression over other parameters.', examples: [0.74] }),
      uncertainty: Type.Optional(Uncertain),
      source: Type.Optional(Source),
    },
    { additionalProperties: false, title: 'a number with its source: { value: …, source: … }' },
  ),
]);

export const Parameters = Type.Record(Type.String(), Parameter, {
  title: 'names with a number or an expression',
  description: 'Named numbers. Expressions use them; sweeps and sensitivities go over them.',
  examples: ['litter: { value: 4.6, source: { text: "three fens, 2021", basis: measured elsewhere } }'],
  propertyNames: { format: 'identifier' },
  'x-key': 'PARAMETER',
});
