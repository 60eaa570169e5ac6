import Ajv from 'ajv/dist/2020.js';
import { describe, expect, test } from 'vitest';
import { analyse } from '../../src/analysis/analyse.ts';
import { cautionsFor, corridorParadox } from '../../src/analysis/cautions.ts';
import type { AnalysisInput } from '../../src/analysis/input.ts';
import { analysisText } from '../../src/report/analysis/analysis-text.ts';
import { AnalysisSchema, analysisJsonSchema, type Analysis } from '../../src/analysis/schema.ts';
import type { YearMap } from '../../src/analysis/year-map.ts';
import type { BlockMatrix } from '../../src/compile/block-matrix.ts';
import { product } from '../../src/numeric/sparse-product.ts';
import { multiply, weightedSum } from '../../src/numeric/sparse-product.ts';
import { sparseFromRows } from '../../src/numeric/sparse.ts';
import { ageingOnly, bernardelli } from '../numeric/published.ts';
import { ringBlock } from './landscape-block.ts';

const fits = new Ajv({ strict: false, allErrors: true }).compile(analysisJsonSchema);

function textOf(analysis: Analysis): string {
  return analysisText(analysis, { colour: false, width: 100 });
}

function onePatch(rows: number[][]): BlockMatrix {
  const matrix = sparseFromRows(rows);
  const states = rows.map((_, c) => ({ patch: 0, class: c }));
  const classes = rows.map((_, c) => `age ${c}`);
  return { matrix, states, patches: ['Fen'], classes, at: 'zero', phaseMaps: [{ phase: 'demography', map: matrix }] };
}

function everything(): AnalysisInput {
  const { block, split } = ringBlock({ patches: 5, classes: 3, reach: 1, seed: 3 });
  const crowded = (n: Float64Array): number => 1 / (1 + n.reduce((sum, value) => sum + value, 0) / 500);
  const yearMap: YearMap = {
    states: block.states.length,
    apply: (n) => multiply(block.matrix, n).map((value) => 1.2 * crowded(n) * value),
    matrixAt: (n) => weightedSum([1.2 * crowded(n), block.matrix], [0, block.matrix]),
  };
  const births = product(
    block.phaseMaps[1]!.map,
    weightedSum([1, block.phaseMaps[0]!.map], [0, block.phaseMaps[0]!.map]),
  );
  return {
    block,
    split,
    yearMap,
    start: new Float64Array(block.states.length).fill(4),
    parameterTangents: [{ name: 'everything', value: 1, matrixTangent: births }],
    noise: { value: { logGrowth: 0.05, lost: 0.005, yearlyVariance: 0.01 } },
    simulatedGrowth: {
      value: { growthRate: 1.05, logGrowth: Math.log(1.05), standardError: 0.001, yearlyVariance: 0.04, years: 4000 },
    },
    falls: {
      value: [
        {
          ...{ outcome: 'few', definition: 'fewer than 5 animals', threshold: 5, replicates: 200 },
          counted: new Float64Array(block.states.length).fill(1),
          byYear: [2030, 2031, 2032].map((year) => ({ year, ever: 0.1, lower: 0.05, upper: 0.15 })),
        },
      ],
    },
    uncertainty: {
      value: { names: ['everything'], covariance: { rows: 1, columns: 1, values: Float64Array.of(0.0004) } },
    },
    network: {
      value: {
        areasKm2: [1, 2, 3, 4, 5],
        reach: Array.from({ length: 25 }, (_, k) => Math.exp(-0.75 * Math.abs(Math.floor(k / 5) - (k % 5)))),
      },
    },
    spread: { value: [{ patch: 'patch 001', speedKm: 2, theta: 0.3, parameters: [] }] },
    against: {
      value: {
        name: 'a poor year',
        matrix: weightedSum([0.9, block.matrix], [0, block.matrix]),
        parameters: { value: [{ name: 'everything', value: 1, reference: 0.9, contribution: 0.1 }] },
      },
    },
    losslessDispersal: true,
    wantEigenvalues: true,
  };
}

describe('a whole analysis', () => {
  const input = everything();
  const found = analyse(input);

  test('fits its published schema, as JSON', () => {
    expect(fits(JSON.parse(JSON.stringify(found)))).toBe(true);
    const required = Object.keys(AnalysisSchema.properties).filter((key) => !['tool', 'model', 'hash'].includes(key));
    expect(required.sort()).toEqual(Object.keys(found).sort());
  });

  test('the schema refuses what is not in it', () => {
    expect(fits({ ...found, more: 1 })).toBe(false);
    expect(fits({ ...found, growthRate: null })).toBe(false);
  });

  test('leaves nothing unanswered, and has no reason for what it answers', () => {
    const missing = Object.entries(found).flatMap(([field, value]) => (value === null ? [field] : []));
    expect(Object.keys(found.reasons).sort()).toEqual(missing.sort());
    expect(missing.filter((field) => field !== 'period')).toEqual([]);
  });

  test('contributions are told for the stable make-up and for that of the start', () => {
    const { matrix, states } = input.block;
    const starting = [0, 1, 2].map((s) => [...matrix.values].slice(matrix.columnStart[s], matrix.columnStart[s + 1]));
    const mean = starting.flat().reduce((sum, value) => sum + value, 0) / 3;
    expect(states.slice(0, 3).every(({ patch }) => patch === 0)).toBe(true);
    expect(found.patches![0]!.contributionNow).toBeCloseTo(mean, 12);
    expect(found.patches![0]!.contribution).not.toBeCloseTo(mean, 3);
  });

  test('a factor on everything has elasticity 1, and its noise comes through as it is', () => {
    expect(found.parameters![0]!.elasticity).toBeCloseTo(1, 12);
    expect(found.growthStandardError).toBeCloseTo(0.02 * found.growthRate, 12);
    expect(found.stochasticGrowth!.approximation!.growthRate).toBeCloseTo(Math.exp(0.05), 12);
  });

  test('a reference that is 0.9 of everything explains the difference whole', () => {
    expect(found.ltre!.difference).toBeCloseTo(0.1 * found.growthRate, 12);
    expect(found.ltre!.unexplained).toBeCloseTo(0, 12);
  });

  test('the equilibrium stands where crowding takes the growth to 1', () => {
    const total = found.equilibrium!.states[0]!.total;
    expect((1.2 * found.growthRate) / (1 + total / 500)).toBeCloseTo(1, 9);
    expect(found.equilibrium!.invasionGrowth).toBeCloseTo(1.2 * found.growthRate, 12);
  });

  test('the text begins with the answer in words and ends with what limits it', () => {
    const text = textOf(found);
    expect(text).toMatch(/^With almost nobody there and in mean years, the population (grows|declines) by/);
    expect(text.replace(/\n */g, ' ')).toContain(corridorParadox);
    expect(text).toContain('patch 001 → patch 002');
    expect(text).not.toMatch(/NaN|undefined|Infinity|null/);
    expect(text.endsWith('\n')).toBe(true);
  });
});

test('losses of links that were not taken away by themselves carry a caution that counts them', () => {
  const facts = {
    patches: 2,
    losslessDispersal: false,
    irreducible: true,
    period: 1,
    entries: 4,
    changesByYear: false,
  };
  const withLinks = (linksAbout: number): string =>
    cautionsFor({ ...facts, linearised: false, links: 2200, linksAbout }).join(' ');
  expect(withLinks(1700)).toContain('1700 of 2200 links');
  expect(withLinks(0)).not.toContain('2200');
});

describe('what does not apply', () => {
  test('a matrix alone gives reasons for all that needs more', () => {
    const found = analyse({
      block: onePatch([
        [0, 1.2],
        [0.3, 0.8],
      ]),
    });
    expect(fits(JSON.parse(JSON.stringify(found)))).toBe(true);
    expect(found.netReproductiveRate).toBeNull();
    expect(found.reasons).toMatchObject({
      netReproductiveRate: 'The matrix was given without telling births from fates.',
      spread: 'The matrix was given without kernels of movement.',
    });
    expect(textOf(found)).toMatch(/the population grows by 12.1 % a year \(growth rate\s1.121\)/);
  });

  test('nobody persists: no vectors, no division by 0, and the text says so', () => {
    const found = analyse({ block: onePatch(ageingOnly) });
    expect(fits(JSON.parse(JSON.stringify(found)))).toBe(true);
    expect([found.growthRate, found.stableDistribution, found.patches]).toEqual([0, null, null]);
    expect(found.reasons['stableDistribution']).toMatch(/nothing persists/);
    expect(textOf(found)).toContain('the population dies out');
  });

  test('numbers that swing for ever are told so', () => {
    const found = analyse({ block: onePatch(bernardelli), start: Float64Array.of(1, 0, 0) });
    expect(fits(JSON.parse(JSON.stringify(found)))).toBe(true);
    expect(found.transients!.fromStart).toMatchObject({ lasting: null, stepsToSettle: null });
    expect(found.cautions.join(' ')).toMatch(/period/);
    expect(textOf(found)).toContain('stays level');
  });

  test('two patches without exchange are listed as two groups', () => {
    const found = analyse({
      block: {
        ...onePatch([
          [1.1, 0],
          [0, 0.9],
        ]),
        patches: ['Fen', 'Moor'],
        classes: ['all'],
        states: [
          { patch: 0, class: 0 },
          { patch: 1, class: 0 },
        ],
      },
    });
    expect(found.blocks.map((block) => block.growthRate)).toEqual([0.9, 1.1]);
    expect(textOf(found)).toMatch(/all in Moor: growth rate 0.9, feeds no other/);
  });
});
