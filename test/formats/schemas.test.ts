// Everything that is printed or written as JSON fits its published schema, and the schema leaves no field out.
import { Ajv2020, type ValidateFunction } from 'ajv/dist/2020.js';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { formatNames, schemaText } from '../../src/formats/schemas.ts';
import { modelModule, sectionName } from '../../src/export/model-module.ts';
import { folder, skein } from '../cli/skein.ts';
import { compileModel } from '../golden/models.ts';

const ajv = new Ajv2020({ allErrors: true, strict: false, validateFormats: false });
const loose = new Set(['model', 'check', 'spec']);

/** The published schema, in which objects with named fields may have no others: unless what they hold varies with the model. */
function strictly(name: string): ValidateFunction {
  const schema: unknown = JSON.parse(schemaText(name) ?? 'null');
  return ajv.compile((loose.has(name) ? schema : closed(schema)) as object);
}

function closed(schema: unknown): unknown {
  if (Array.isArray(schema)) return schema.map(closed);
  if (typeof schema !== 'object' || schema === null) return schema;
  const inner = Object.fromEntries(Object.entries(schema).map(([key, value]) => [key, closed(value)]));
  const fields = inner['properties'];
  const has = typeof fields === 'object' && fields !== null && Object.keys(fields).length > 0;
  return inner['type'] === 'object' && has ? { additionalProperties: false, ...inner } : inner;
}

function expectFits(name: string, value: unknown): void {
  const fits = strictly(name);
  fits(value);
  expect(fits.errors ?? []).toEqual([]);
}

const models = ['models/reed-hare.yaml', 'models/dune-toad.yaml'];
const outputs: readonly (readonly [string, readonly string[]])[] = [
  ['run', ['run', '--replicates', '20', '--years', '5']],
  ['path', ['path', '--years', '5']],
  ['check', ['check']],
  ['analysis', ['analyse']],
  ['spec', ['show', 'spec']],
  ...['model', 'landscape', 'matrix', 'packed'].map((stage) => [stage, ['show', stage]] as const),
];

describe.each(models)('of %s', (model) => {
  test.each(outputs)('the output %s fits its schema', (name, [command = '', ...more]) => {
    const words = command === 'show' ? ['show', model, ...more] : [command, model, ...more];
    const { code, out } = skein([...words, '--json']);
    expect(code).toBe(0);
    expectFits(name, JSON.parse(out));
  });
});

test('mistakes fit the schema of check', () => {
  const { code, out } = skein(['check', '-', '--json'], { input: 'skein: 1\npatches: [a, a]\nyear: [cont]\n' });
  expect(code).toBe(1);
  const found = JSON.parse(out) as { readonly diagnostics: readonly unknown[] };
  expect(found.diagnostics.length).toBeGreaterThan(0);
  expectFits('check', found);
});

test.each(['run', 'path', 'analyse'])('what %s --out writes fits the schemas', (command) => {
  const cwd = folder();
  expect(skein([command, 'models/two-ponds.yaml', '--quiet', '--out', 'out'], { cwd }).code).toBe(0);
  const read = (name: string): unknown => JSON.parse(readFileSync(join(cwd, 'out', name), 'utf8'));
  expectFits('inputs', read('run.json'));
  expectFits('log', read('log.json'));
  expectFits(command === 'analyse' ? 'analysis' : command, read('results.json'));
});

test.each(['grid', 'latin hypercube', 'sobol indices', 'morris', 'one at a time'])(
  'a sweep fits its schemas: %s',
  (design) => {
    const cwd = folder();
    const over = ['--over', 'survival.adult=0.5:0.8:4', '--over', 'wandering.leaving=0.1,0.2'];
    const runs = ['--measure', 'growth,chance', '--replicates', '8', '--years', '5'];
    const points = design === 'grid' || design === 'one at a time' ? [] : ['--points', '8'];
    const words = ['sweep', 'models/two-ponds.yaml', ...over, '--design', design, ...points, ...runs];
    const { code, out } = skein([...words, '--quiet', '--json', '--out', 'out'], { cwd });
    expect(code).toBe(0);
    const read = (name: string): unknown => JSON.parse(readFileSync(join(cwd, 'out', name), 'utf8'));
    expectFits('sweep', read('manifest.json'));
    expectFits('sweep-summary', read('summary.json'));
    expectFits('sweep-summary', JSON.parse(out));
    expectFits('log', read('log.json'));
  },
);

test('a sweep of plans fits its schemas', () => {
  const cwd = folder();
  const words = [
    'sweep',
    'models/which-plan-where.yaml',
    '--replicates',
    '8',
    '--years',
    '5',
    '--quiet',
    '--out',
    'out',
  ];
  expect(skein(words, { cwd }).code).toBe(0);
  const read = (name: string): unknown => JSON.parse(readFileSync(join(cwd, 'out', name), 'utf8'));
  expectFits('sweep', read('manifest.json'));
  expectFits('sweep-summary', read('summary.json'));
});

test('a comparison with draws and other models fits its schema, and what it writes', () => {
  const words = ['compare', 'models/reed-hare.yaml', '--replicates', '8', '--years', '6', '--draws', '4', '--robust'];
  const cwd = folder();
  const { code, out } = skein([...words, '--json', '--quiet', '--out', 'out'], { cwd });
  expect(code).toBe(0);
  expectFits('compare', JSON.parse(out));
  expectFits('compare', JSON.parse(skein([...words.slice(0, 6), '--replicates', '1', '--json', '--quiet']).out));
  const read = (name: string): unknown => JSON.parse(readFileSync(join(cwd, 'out', name), 'utf8'));
  expectFits('inputs', read('run.json'));
  expectFits('log', read('log.json'));
});

test('the section of a module fits its schema', () => {
  const made = new WebAssembly.Module(modelModule(compileModel('reed-hare')));
  const [section] = WebAssembly.Module.customSections(made, sectionName);
  expectFits('module', JSON.parse(new TextDecoder().decode(section)));
});

describe('a schema', () => {
  test.each(formatNames)('%s is valid, and refuses what is of another format', (name) => {
    const schema = JSON.parse(schemaText(name) ?? 'null') as object;
    expect(ajv.validateSchema(schema)).toBe(true);
    const fits = ajv.compile(schema);
    expect(fits({ format: 'skein-other/1' })).toBe(false);
  });

  test('is printed by its name, and a wrong name lists all', () => {
    expect(skein(['schema', 'run']).out).toBe(schemaText('run'));
    const { code, err } = skein(['schema', 'runs']);
    expect(code).toBe(2);
    expect(err).toBe(`There is no schema \`runs\`. There are: ${formatNames.join(', ')}.\n`);
  });
});
