// Exact slopes of the matrix by every named number, against central differences of the compiled matrix.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { differenceTangent } from '../../src/analysis/parameter-differences.ts';
import { parameterTangents } from '../../src/analysis/parameter-tangents.ts';
import { buildBlock } from '../../src/compile/block.ts';
import { dependsOnMakeUp } from '../../src/compile/make-up.ts';
import { nearZero } from '../../src/compile/year-map.ts';
import { compileSpec, type CompiledModel } from '../../src/pipeline.ts';
import { toDense, type SparseMatrix } from '../../src/numeric/sparse.ts';
import { compileModel, modelNames } from '../golden/models.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { probed } from './probe.ts';

function withProbe(compiled: CompiledModel): CompiledModel {
  const { compiled: found, findings } = compileSpec(probed(compiled.spec));
  if (!found) throw new Error(JSON.stringify(findings.filter(({ severity }) => severity === 'error')));
  return found;
}

function apart(a: SparseMatrix, b: SparseMatrix | null): number {
  const [x, y] = [toDense(a).values, b ? toDense(b).values : new Float64Array(a.rows * a.columns)];
  const size = x.reduce((most, value) => Math.max(most, Math.abs(value)), 1e-2);
  return x.reduce((most, value, i) => Math.max(most, Math.abs(value - y[i]!)), 0) / size;
}

/** Names of the numbers that were compared. `held` tangents move with the capacity itself, which differences hold too. */
function compare(compiled: CompiledModel, state: Float64Array, capacities: readonly string[] = []): string[] {
  const block = buildBlock(compiled, 'start', state);
  return parameterTangents(compiled, block, state).parameterTangents.map(
    ({ name, value, matrixTangent, solvedAnew, exact }) => {
      // What a crowding is solved for while another has an Allee factor, or sexes must meet, is left to differences.
      const { crowding } = compiled.model;
      const nested = state.some((animals) => animals > 0) && (crowding.length > 1 || dependsOnMakeUp(compiled.model));
      // Amounts that people take, move and release are left to differences too.
      const handled = compiled.model.phases.some(({ kind }) => kind === 'take' || kind === 'move' || kind === 'add');
      if (!nested && !handled) expect({ name, exact }).toEqual({ name, exact: true });
      const around = { base: compiled, block, state };
      if (!capacities.includes(name)) {
        expect(apart(matrixTangent, differenceTangent(around, { name, value, rule: 'held' })), name).toBeLessThan(5e-7);
      }
      if (solvedAnew) {
        const anew = differenceTangent(around, { name, value, rule: 'solved anew' });
        expect(apart(solvedAnew, anew), `${name}, solved anew`).toBeLessThan(5e-7);
      }
      return name;
    },
  );
}

/** Away from every kink: the start with a part more of each state. */
function moved({ startAnimals }: CompiledModel, times = 1): Float64Array {
  return startAnimals.map((animals, i) => (animals * (1 + 0.1 * Math.sin(i + 1)) + (animals > 0 ? 0.37 : 0)) * times);
}

describe.each(modelNames)('%s', (name) => {
  const compiled = withProbe(compileModel(name));

  test('with nobody there', () => {
    compare(compiled, nearZero(compiled));
  });

  test('near the start', () => {
    const names = compare(compiled, moved(compiled), ['probe']);
    // A model without rates has nothing to multiply.
    if (name !== 'ageing-only') expect(names).toContain('probe');
  });
});

const frame = (more: string): string => `
skein: 1
study: { title: Slopes, invented: true }
years: 3
position: plane
unit: km
patches:
  - { name: A, at: [0, 0], area: 90 ha, capacity: 60, room: 3 }
  - { name: B, at: [2, 1], area: 60 ha, capacity: 40, room: 2 }
  - { name: C, at: [5, 3], area: 120 ha, capacity: 90, room: 5 }
counts: both sexes
classes: [born, young, old]
oldest: open-ended
survival: { born: s0 ^ 0.5, young: s0, old: "min(s1, 0.9)" }
births: { old: f * room / 3, female-share: 1 - males }
in: { B: { survival: { young: s0 * 0.9 } } }
start: { table: { A: { young: 70, old: 60 }, B: { young: 20, old: 18 }, C: { young: 90, old: 100 } } }
${more}`;
const rates = 's0: 0.5, s1: 0.7, f: 3 * g, g: 0.9, males: 0.45';

const kernels = [
  '{ shape: exponential, mean: far km }',
  '{ shape: exponential, scale: far * 500 m }',
  '{ shape: gaussian, mean: far km, reach: far * 10 km }',
  '{ shape: 2Dt, mean: far km, shape-number: b }',
  '{ shape: 2Dt, scale: far km, shape-number: b }',
  '{ shape: exponential power, mean: far km, shape-number: b / 4 }',
  '{ shape: exponential power, scale: far km, shape-number: b / 3 }',
];

describe.each(kernels)('kernel %s', (kernel) => {
  test.each(['all arrive', 'may miss'])('%s', (leavers) => {
    const compiled = compileText(
      frame(`
parameters: { ${rates}, far: 2.2, b: 2.5, power: 0.7, danger: 0.08, d: 0.3 }
year: [count, breeding, survival, natal, ageing]
natal:
  kind: dispersal
  classes: [born]
  leaving: d
  kernel: ${kernel}
  leavers: ${leavers}
  attraction: room ^ power
  hazard: danger per km
  links: [{ between: [A, B], distance: far * 1.5 km, turn-back: d / 2, crossing-death: danger * 2 }]
`),
    );
    const names = compare(compiled, new Float64Array(9));
    for (const name of ['far', 'power', 'danger', 'd', 'g', 'males']) expect(names).toContain(name);
  });
});

test('rates and attributes over drivers whose years are drawn', () => {
  const compiled = compileText(`
skein: 1
study: { title: Slopes over drawn years, invented: true }
first-year: 2027
years: 3
patches:
  - { name: A, cover: "0.4 + wet * rain" }
  - { name: B, cover: "0.9 - wet * rain ^ 2" }
counts: females
classes: [adult]
oldest: open-ended
parameters: { wet: 0.2, s: 0.7 }
drivers: { values: { rain: { 2020: 0.6, 2021: 1.1, 2022: 1.5 } }, future: resample-years }
survival: { adult: "s ^ rain * cover" }
births: { adult: 2 * cover * rain }
year: [count, breeding, survival, ageing]
start: { table: { A: { adult: 100 }, B: { adult: 100 } } }
`);
  expect(compare(compiled, new Float64Array(2))).toEqual(['wet', 's']);
});

test('a table of shares, a survival on the way, and nested phases', () => {
  const compiled = compileText(
    frame(`
parameters: { ${rates}, d: 0.3, way: 0.8 }
year: [autumn, count, breeding, survival, moves, ageing, back]
autumn: { kind: survival, survival: { born: 1, young: s0 ^ 0.2, old: 1 - d / 3 } }
moves: { kind: dispersal, classes: all, shares: { A: { B: d / 2, C: d ^ 2 }, B: { A: 0.1 } }, links: [{ between: [A, C], turn-back: d }] }
back:
  kind: dispersal
  classes: [old]
  leaving: { old: if d > 0.2 then d else 0 }
  kernel: { shape: exponential, mean: 3 km }
  leavers: all arrive
  survival-on-the-way: way
`),
  );
  expect(compare(compiled, new Float64Array(9))).toContain('way');
});

const forms = ['beverton-holt', 'ricker', 'theta\n  shape-number: k', 'hassell\n  shape-number: k'];

describe.each(forms)('crowding %s', (form) => {
  test('of survival and births, with an Allee factor, and a sink like another patch', () => {
    const compiled = compileText(
      frame(`
parameters: { ${rates}, k: 1.7, half: 3, fill: 1.1, low: 0.35 }
year: [count, breeding, survival, ageing]
crowding:
  form: ${form}
  changes: { survival: [young], births: [old] }
  counted: { young: 0.2, old: 1 }
  capacity: capacity * fill
  allee-half: half * room / 4
  where-declining: { as: C }
`).replace('s0 * 0.9', 's0 * low'),
    );
    const names = compare(compiled, moved(compiled), ['fill', 'half', 'k']);
    for (const name of ['s0', 'g', 'half', 'fill', 'low']) expect(names).toContain(name);
  });
});

describe.each(['at random', 'youngest first', 'nobody'])('a ceiling that takes %s', (takes) => {
  test('where there are more than it holds', () => {
    const compiled = compileText(
      frame(`
parameters: { ${rates}, fill: 0.9 }
year: [count, survival, room_for, breeding, ageing]
room_for: { kind: ceiling, counted: all, capacity: capacity * fill, takes: ${takes} }
`),
    );
    const names = compare(compiled, moved(compiled, 2));
    for (const name of ['fill', 's0', 'males']) expect(names).toContain(name);
  });
});

test('on random rates', () => {
  const share = fc.double({ min: 0.05, max: 0.95, noNaN: true });
  const numbers = fc.record({
    s0: share,
    s1: fc.double({ min: 0.05, max: 0.85, noNaN: true }),
    f: fc.double({ min: 2, max: 9, noNaN: true }),
    males: share,
    far: fc.double({ min: 0.6, max: 5, noNaN: true }),
    b: fc.double({ min: 1.8, max: 5, noNaN: true }),
    power: fc.double({ min: -1, max: 2, noNaN: true }),
    danger: fc.double({ min: 0.01, max: 0.3, noNaN: true }),
    d: share,
  });
  const year = `
year: [count, breeding, survival, natal, ageing]
natal:
  kind: dispersal
  classes: [born, young]
  leaving: { born: d, young: d ^ 2 }
  kernel: { shape: 2Dt, mean: far km, shape-number: b }
  leavers: all arrive
  attraction: room ^ power
  hazard: danger per km
crowding: { form: ricker, changes: { survival: [young] }, counted: [young, old], capacity: capacity, where-declining: ceiling }
`;
  fc.assert(
    fc.property(numbers, (drawn) => {
      const compiled = compileText(frame(`parameters: ${JSON.stringify(drawn)}\n${year}`));
      expect(compare(compiled, moved(compiled)).length).toBe(9);
    }),
    { seed: 77, numRuns: 25 },
  );
});

describe('a patch alone at its capacity (derived from what a capacity is)', () => {
  const compiled = compileText(`
skein: 1
study: { title: Alone, invented: true }
years: 3
patches: [{ name: A, capacity: 50 }]
counts: females
classes: [all]
oldest: open-ended
parameters: { s: 0.6, f: 1.2, fill: 1 }
survival: { all: s }
births: { all: f }
year: [count, breeding, survival]
crowding: { form: beverton-holt, changes: { births: [all] }, counted: all, capacity: 50 * fill }
start: { total: 50 }
`);
  const { model, coefficients, landscape } = compiled;
  const block = buildBlock({ model, coefficients, landscape }, 'start', Float64Array.of(50));
  const tangents = parameterTangents(compiled, block, Float64Array.of(50)).parameterTangents;
  const of = (name: string) => tangents.find((one) => one.name === name)!;

  test('grows neither more nor less with another survival if its capacity is what it is', () => {
    expect(block.matrix.values[0]).toBeCloseTo(1, 12);
    for (const name of ['s', 'f']) expect(toDense(of(name).solvedAnew!).values[0]).toBeCloseTo(0, 12);
  });

  test('grows more where the strength of crowding stays', () => {
    // A = s (1 + f g) with g = (1/s − 1)/f at the capacity: ∂A/∂s = 1/s, ∂A/∂f = 1 − s over f.
    expect(toDense(of('s').matrixTangent).values[0]).toBeCloseTo(1 / 0.6, 12);
    expect(toDense(of('f').matrixTangent).values[0]).toBeCloseTo(0.4 / 1.2, 12);
  });

  test('grows more with more room, whichever way the strength is solved', () => {
    // g = 1/(1 + aN), a = (1/g* − 1)/K: ∂g/∂K = g² a N / K = g*(1 − g*)/K at N = K; with K = 50 fill.
    const g = (1 / 0.6 - 1) / 1.2;
    for (const tangent of [of('fill').matrixTangent, of('fill').solvedAnew!]) {
      expect(toDense(tangent).values[0]).toBeCloseTo(0.6 * 1.2 * g * (1 - g), 12);
    }
  });
});
