import Ajv from 'ajv/dist/2020.js';
import { describe, expect, test } from 'vitest';
import { analyseModel } from '../../src/analysis/analyse-model.ts';
import { analysisInputOf } from '../../src/analysis/model-input.ts';
import { analysisText } from '../../src/report/analysis/analysis-text.ts';
import { analysisJsonSchema } from '../../src/analysis/schema.ts';
import { weightedSum } from '../../src/numeric/sparse-product.ts';
import { toDense } from '../../src/numeric/sparse.ts';
import { compileModel, modelNames } from '../golden/models.ts';
import { compileText } from '../pipeline/compile-text.ts';

const fits = new Ajv({ strict: false, allErrors: true }).compile(analysisJsonSchema);

const oneFen = (survival: number): string => `
skein: 1
study: { title: One fen, invented: true }
years: 10
patches: [{ name: Fen }]
counts: females
classes: [young, adult]
parameters: { s: ${survival}, s0: 0.3, f: 1.5, unused: 4 }
demography: { fates: [[0, 0], [s0, s]], births: [[0, s * f], [0, 0]] }
year: [count, demography]
start: { table: { Fen: { young: 10, adult: 10 } } }
`;

describe.each(modelNames)('%s', (name) => {
  const compiled = compileModel(name);
  const { value: input } = analysisInputOf(compiled, 'start');

  test('births and fates add up to the matrix', () => {
    const { fates, births } = input!.split!;
    const sum = toDense(weightedSum([1, fates], [1, births])).values;
    toDense(input!.block.matrix).values.forEach((value, k) => expect(sum[k]).toBeCloseTo(value, 13));
  });

  test('its analysis fits the schema and prints in words', () => {
    const { value: analysis } = analyseModel(compiled, { at: 'start', wantEigenvalues: true });
    expect(fits(JSON.parse(JSON.stringify(analysis)))).toBe(true);
    const text = analysisText(analysis!, { colour: false, width: 100 });
    expect(text).toMatch(/^.*\n\nAt the numbers of the start/);
    expect(text).not.toMatch(/NaN|undefined|Infinity|\[object/);
  });
});

describe('named numbers', () => {
  test('have the sensitivities of the two-stage closed form, written as a spec (derived)', () => {
    const { value: analysis } = analyseModel(compileText(oneFen(0.8)), { at: 'zero' });
    expect(analysis!.growthRate).toBeCloseTo(1.1211102550927978, 12);
    const found = new Map(analysis!.parameters!.map((one) => [one.name, one]));
    expect([...found.keys()].sort()).toEqual(['f', 's', 's0']);
    const expected = { s: 1.089369, f: 0.1664101, s0: 0.8320503 };
    Object.entries(expected).forEach(([name, value]) => expect(found.get(name)!.sensitivity).toBeCloseTo(value, 7));
    const sum = [...found.values()].reduce((total, one) => total + one.elasticity, 0);
    expect(sum).toBeCloseTo(1.2226499, 7);
  });

  test('at the edge of what they may be are moved to one side', () => {
    const { value: analysis } = analyseModel(compileText(oneFen(1)), { at: 'zero' });
    expect(analysis!.parameters!.find((one) => one.name === 's')!.sensitivity).toBeGreaterThan(0.5);
    expect(analysis!.netReproductiveRate).toBeNull();
    expect(analysis!.reasons['netReproductiveRate']).toMatch(/never dies/);
  });
});

test.each([60, 80, 100])(
  'in %d columns no name is cut, no line runs on, and no number is parted from its percent sign',
  (width) => {
    const { value } = analyseModel(compileModel('reed-hare'), { at: 'zero' });
    const text = analysisText(value!, { colour: false, width });
    expect(text).not.toContain('…');
    expect(text).not.toMatch(/\d\n\s*%/u);
    for (const line of text.split('\n')) expect([...line].length, line).toBeLessThanOrEqual(width);
    expect(text).toContain('Mill reach → North fen');
  },
);

test('where numbers stand still, the growth rate is 1', () => {
  const { value: analysis } = analyseModel(compileModel('two-ponds'), { at: 'equilibrium' });
  expect(analysis!.growthRate).toBeCloseTo(1, 9);
  expect(analysis!.equilibrium!.states[0]!.stable).toBe(true);
});

test('a model without crowding has nowhere to stand still, and says so', () => {
  expect(analyseModel(compileText(oneFen(0.8)), { at: 'equilibrium' })).toEqual({
    value: null,
    reason: 'Numbers do not come to stand still from the start of this model.',
  });
});
