// The published schema is what the reader goes by: fresh, complete, and of the same opinion as the reader.
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { writeSchema } from '../../src/spec/publish.ts';
import { readSpec } from '../../src/spec/read.ts';
import { writeReference } from '../../src/spec/reference.ts';
import { CoreSchema, namedSchemas } from '../../src/spec/schema/spec.ts';
import { branchesOf, knownKeys, shapeOfOthers, type Shape } from '../../src/spec/shape/shape.ts';
import type { Spec } from '../../src/spec/schema/spec.ts';
import { publishedValidator } from './published-validator.ts';
import { anySpec } from './spec-values.ts';
import { wholeText } from './whole.ts';

const validate = publishedValidator();

/** The spec as it stands in a file: sections of the author's own at the top. */
function flat({ named, ...core }: Spec): Record<string, unknown> {
  return { ...core, ...named };
}

test('the committed schema is fresh (run the tests with -u after a change of the language)', async () => {
  await expect(writeSchema()).toMatchFileSnapshot('../../src/spec/skein-schema.json');
});

test('the schema takes a spec that uses every key, and any spec', () => {
  const { document } = readSpec(wholeText, 'hare.yaml');
  if (document === undefined) throw new Error('The whole spec was not read.');
  expect(validate(JSON.parse(JSON.stringify(flat(document.spec)))) || validate.errors).toBe(true);
  fc.assert(
    fc.property(anySpec, (spec) => {
      expect(validate(JSON.parse(JSON.stringify(flat(spec)))) || validate.errors).toBe(true);
    }),
    { seed: 4204, numRuns: 200 },
  );
});

test('the schema takes numbers with how sure they are where an action stands in a file, and nothing half said', () => {
  const { document } = readSpec(wholeText, 'hare.yaml');
  const { actions, ...rest } = flat(document!.spec);
  const of = (add: unknown) => {
    const rewet = { kind: 'habitat', in: 'Saltmarsh', capacity: { add } };
    return validate(JSON.parse(JSON.stringify({ ...rest, scenarios: {}, actions: { rewet } })));
  };
  expect(actions).toMatchObject({ rewet: { capacity: { add: 'rewet_capacity_add' } } });
  expect(of({ value: 80, uncertainty: { interval: [60, 100] }, source: { basis: 'expert' } })).toBe(true);
  for (const wrong of [{ value: 80 }, { uncertainty: { interval: [60, 100] } }, { value: 80, uncertainty: { sd: 2 } }])
    expect(of(wrong)).toBe(false);
});

/** Mistakes that a schema cannot see: of the text, of names and of expressions. */
const beyondSchema =
  /^(?:expression-|data-missing|unusable-name|number-format|relative-change|wrong-unit|duplicate-key|division|not-a|inf)/u;

const strange: fc.Arbitrary<unknown> = fc.constantFrom(
  null,
  -1,
  0.5,
  'some',
  '',
  [],
  {},
  [1],
  ['a', 'a'],
  { a: 1 },
  true,
);

/** A copy in which the value at a random place was replaced, removed, or got a neighbour. */
function damaged(value: unknown, choices: readonly number[], replacement: unknown): unknown {
  const [choice = 0, ...rest] = choices;
  if (typeof value !== 'object' || value === null || rest.length === 0) return replacement;
  const entries = Object.entries(value);
  if (entries.length === 0 || choice % 7 === 6) return replacement;
  const picked = choice % entries.length;
  const [key, inner] = entries[picked]!;
  const changed = damaged(inner, rest, replacement);
  if (Array.isArray(value)) return value.map((item: unknown, i) => (i === picked ? changed : item));
  const others = entries.filter(([other]) => other !== key);
  if (choice % 5 === 4) return Object.fromEntries(others);
  return Object.fromEntries([...others, [choice % 11 === 10 ? 'strange' : key, changed]]);
}

test('reader and schema agree on damaged specs', () => {
  const choices = fc.array(fc.nat(1000), { minLength: 2, maxLength: 5 });
  let refused = 0;
  fc.assert(
    fc.property(anySpec, choices, strange, (spec, where, replacement) => {
      const value: unknown = JSON.parse(JSON.stringify(damaged(flat(spec), where, replacement)));
      const { diagnostics } = readSpec(JSON.stringify(value).replaceAll('\uFFFD', '?'), 'damaged.json');
      const errors = diagnostics.filter((one) => one.severity === 'error');
      const seen = errors.filter((one) => !beyondSchema.test(one.code));
      const fits = validate(value);
      if (!fits) refused++;
      if (fits) expect(seen.map((one) => one.message)).toEqual([]);
      else expect(errors, JSON.stringify(validate.errors)).not.toEqual([]);
    }),
    { seed: 4205, numRuns: 600 },
  );
  expect(refused).toBeGreaterThan(200);
});

/** Every key by its path, with its shape. */
function keysBelow(shape: Shape, path: string): readonly (readonly [string, Shape])[] {
  return branchesOf(shape).flatMap((branch) => {
    const known = Object.entries(knownKeys(branch));
    const own = shapeOfOthers(branch);
    const items =
      branch.items !== undefined && !Array.isArray(branch.items) ? keysBelow(branch.items as Shape, path) : [];
    const below = own === undefined ? [] : keysBelow(own, `${path}*.`);
    return [
      ...known.flatMap(([key, value]) => [[path + key, value] as const, ...keysBelow(value, `${path}${key}.`)]),
      ...items,
      ...below,
    ];
  });
}

const allKeys = [CoreSchema, ...Object.values(namedSchemas)].flatMap((shape) => keysBelow(shape, ''));

test('every key says what it is, and every single value has an example', () => {
  expect(allKeys.length).toBeGreaterThan(80);
  expect(allKeys.filter(([, shape]) => shape.description === undefined).map(([key]) => key)).toEqual([]);
  const single = allKeys.filter(([, shape]) => branchesOf(shape).every((branch) => branch.type !== 'object'));
  expect(single.filter(([, shape]) => shape.examples === undefined).map(([key]) => key)).toEqual([]);
});

test('the reference holds every key with an example and is a table', () => {
  const reference = writeReference();
  const missing = allKeys.map(([key]) => key.split('.').at(-1) ?? '').filter((key) => !reference.includes(key));
  expect(missing).toEqual([]);
  const rows = reference.split('\n').filter((line) => line.startsWith('|'));
  expect(rows.filter((row) => row.replaceAll('\\|', '').split('|').length !== 8)).toEqual([]);
  const cells = (row: string) =>
    row
      .replaceAll('\\|', '')
      .split('|')
      .map((cell) => cell.trim());
  expect(rows.filter((row) => cells(row)[6] === '').map((row) => cells(row)[1])).toEqual([]);
});
