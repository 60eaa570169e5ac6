// The published JSON Schema (2020-12) of the language, for editors and other programs: made from the schema that the reader uses.
import { CoreSchema, namedSchemas } from './schema/spec.ts';
import { unsure, unsureFormats } from './schema/unsure.ts';
import { sectionOf } from './text/value.ts';
import { isSeveral, knownKeys, shapeOfOthers, sortOf, type Shape } from './shape/shape.ts';

/** A published schema: keys of JSON Schema only, and our units and sorts of names under `x-`. */
type Published = Readonly<Record<string, unknown>>;

/** The text of `skein-schema.json`. */
export function writeSchema(): string {
  const core: Shape = CoreSchema;
  const published = sectionOf([
    ['$schema', 'https://json-schema.org/draft/2020-12/schema'],
    ['title', 'A skein model'],
    [
      'description',
      'Age classes in habitat patches that dispersal links. Sections of your own names each have a kind.',
    ],
    ...Object.entries(publish(core)).filter(([key]) => key !== 'additionalProperties'),
    ['additionalProperties', ownSections()],
    ['$defs', Object.fromEntries(unsureFormats.map((format) => [shared(format), publishHere(unsure(format))]))],
  ]);
  return `${JSON.stringify(published, null, 2)}\n`;
}

/** What an author names at the top: one of the kinds, told apart by `kind`. */
function ownSections(): Published {
  const kinds = Object.entries<Shape>(namedSchemas);
  return {
    type: 'object',
    required: ['kind'],
    properties: { kind: { enum: kinds.map(([kind]) => kind) } },
    allOf: kinds.map(([kind, shape]) => ({
      if: { required: ['kind'], properties: { kind: { const: kind } } },
      then: publish(shape),
    })),
  };
}

const copied = ['title', 'description', 'default', 'examples', 'const', 'format'] as const;
const limits = ['minItems', 'maxItems', 'uniqueItems', 'minLength', 'minimum', 'maximum'] as const;
const others = ['exclusiveMinimum', 'exclusiveMaximum', 'x-unit', 'x-key'] as const;

/** What stands under very many keys is published once. */
function publish(shape: Shape): Published {
  const format = shape['x-unsure'];
  return format === undefined ? publishHere(shape) : { $ref: `#/$defs/${shared(format)}` };
}

function shared(format: string): string {
  return `unsure-${format}`;
}

function publishHere(shape: Shape): Published {
  const kept = [...copied, ...limits, ...others].flatMap((key) =>
    shape[key] === undefined ? [] : [[key, shape[key]]],
  );
  return {
    ...(shape.type === undefined || shape.const !== undefined ? {} : { type: shape.type }),
    ...Object.fromEntries(kept),
    ...(shape.anyOf === undefined ? {} : { anyOf: shape.anyOf.map(publish) }),
    ...(sortOf(shape) === 'map' ? publishSection(shape) : {}),
    ...(sortOf(shape) === 'list' ? publishList(shape) : {}),
  };
}

function publishSection(shape: Shape): Published {
  const known = Object.entries(knownKeys(shape)).map(([key, value]) => [key, publish(value)]);
  const own = shapeOfOthers(shape);
  const required = shape.required ?? [];
  return {
    ...(required.length === 0 ? {} : { required }),
    ...(known.length === 0 ? {} : { properties: Object.fromEntries(known) }),
    ...(shape.propertyNames === undefined ? {} : { propertyNames: shape.propertyNames }),
    additionalProperties: own === undefined ? false : publish(own),
  };
}

/** A list whose items have each their shape is written the new way, with `prefixItems`. */
function publishList({ items }: Shape): Published {
  if (items === undefined) return {};
  if (!isSeveral(items)) return { items: publish(items) };
  return { prefixItems: items.map(publish), items: false, minItems: items.length };
}
