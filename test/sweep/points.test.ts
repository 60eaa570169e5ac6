// A point of a sweep says what the same model says with `--set`, and a failed point says why.
import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { analyseModel } from '../../src/analysis/analyse-model.ts';
import { compareSpec } from '../../src/compare/compare-spec.ts';
import { plansOf } from '../../src/compare/plans-of.ts';
import { compileSpec, followPath, runModel } from '../../src/pipeline.ts';
import { readSpec } from '../../src/spec/read.ts';
import type { Spec, SweepSpec } from '../../src/spec/schema/spec.ts';
import { applySettings, type Settings } from '../../src/spec/settings.ts';
import { openEvaluator } from '../../src/sweep/point/evaluate.ts';
import { buildBlock } from '../../src/compile/block.ts';
import type { Compiled } from '../../src/compile/year-map.ts';
import { batchesOf } from '../../src/kernel/batch.ts';
import { openRunner } from '../../src/kernel/run.ts';
import { buildLandscape } from '../../src/landscape/build.ts';
import { resolveModel } from '../../src/model/resolve.ts';
import { leading } from '../../src/numeric/leading.ts';
import { student95 } from '../../src/numeric/student.ts';
import { openDesign } from '../../src/sweep/design/design.ts';
import type { Factor } from '../../src/sweep/design/factor.ts';
import { manyPoints } from '../../src/sweep/point/many-points.ts';
import { columnsOf, pairColumnsOf, quantitiesOf } from '../../src/sweep/measures.ts';
import { planSweep } from '../../src/sweep/request.ts';
import { alone } from '../../src/threads/alone.ts';

function specOf(model: string, settings: Settings = {}): Spec {
  const { document } = readSpec(readFileSync(new URL(`../../models/${model}.yaml`, import.meta.url), 'utf8'), model);
  const applied = applySettings(document!.spec, settings);
  if (!applied.ok) throw new Error(applied.unknown.name);
  return applied.spec;
}

function evaluatorOf(spec: Spec, asked: SweepSpec) {
  const { plan, findings } = planSweep(asked, compileSpec(spec).compiled!);
  expect(findings).toEqual([]);
  const evaluator = openEvaluator(spec, plan!);
  const pairs = pairColumnsOf(quantitiesOf(plan!.measures, compileSpec(spec).compiled!.model), plan!.scenarios);
  const names = [...evaluator.quantities.flatMap(columnsOf), ...pairs].map(({ name }) => name);
  return (values: readonly (number | string)[]) => {
    const { numbers, failure } = evaluator.at(values);
    return { failure, numbers: Object.fromEntries(names.map((name, i) => [name, numbers[i] ?? NaN])) };
  };
}

function nobodyCrowds(model: Compiled['model']): Compiled['coefficients'] {
  const { length } = model.patches;
  return model.crowding.map(({ alleeHalf }) => ({
    form: new Array(length).fill('none'),
    coefficient: new Float64Array(length),
    alleeHalf,
  }));
}

const over = { adult_survival: { from: 0.4, to: 0.7 }, natal_leaving: [0.05, 0.3] };

test('answers without chance are those of the analysis and the path', () => {
  const spec = specOf('reed-hare', { years: 20 });
  const at = evaluatorOf(spec, { over, measures: ['growth', 'damping', 'standing', 'path-end'] });
  for (const [survival, leaving] of [
    [0.62, 0.3],
    [0.57, 0.05],
  ] as const) {
    const { numbers } = at([survival, leaving]);
    const set = [
      { name: 'adult_survival', value: String(survival) },
      { name: 'natal_leaving', value: String(leaving) },
    ];
    const { compiled } = compileSpec(specOf('reed-hare', { years: 20, set }));
    const analysis = analyseModel(compiled!, { at: 'zero' }).value!;
    expect(Math.abs((numbers['growth'] ?? 0) / analysis.growthRate - 1)).toBeLessThan(1e-12);
    expect(Math.abs((numbers['damping'] ?? 0) / analysis.dampingRatio! - 1)).toBeLessThan(1e-9);
    expect(
      Math.abs(
        (numbers['standing'] ?? 0) /
          analyseModel(compiled!, { at: 'equilibrium' }).value!.equilibrium!.states[0]!.total -
          1,
      ),
    ).toBeLessThan(1e-6);
    const last = followPath(compiled!).abundance.filter(({ year }) => year === 2046);
    expect(numbers['path-end']).toBe(last.reduce((sum, { animals }) => sum + animals, 0));
  }
});

test('answers with chance are those of a run with the same seed, one point after the other in one instance', () => {
  const spec = specOf('reed-hare', { years: 20, replicates: 50 });
  const at = evaluatorOf(spec, { over, measures: ['chance', 'chance-at-end', 'lowest', 'animals', 'patches-in-use'] });
  for (const survival of [0.57, 0.45, 0.57]) {
    const { numbers } = at([survival, 0.18]);
    const set = [{ name: 'adult_survival', value: String(survival) }];
    const run = runModel(compileSpec(specOf('reed-hare', { years: 20, replicates: 50, set })).compiled!);
    for (const { name, ever, atEnd } of run.outcomes) {
      expect(numbers[`chance: ${name}`]).toBe(ever.probability);
      expect(numbers[`chance-at-end: ${name}`]).toBe(atEnd.probability);
      const halves = [numbers[`chance: ${name} (first half)`], numbers[`chance: ${name} (second half)`]];
      expect(((halves[0] ?? 0) + (halves[1] ?? 0)) / 2).toBeCloseTo(ever.probability, 12);
      expect(numbers[`chance: ${name} (standard error)`]).toBeCloseTo(
        Math.sqrt((ever.probability * (1 - ever.probability)) / 50),
        12,
      );
    }
    expect(numbers['lowest']).toBeCloseTo(run.meanLowestCount.mean, 10);
    expect(numbers['animals']).toBeCloseTo(run.abundance.whole.at(-1)!.mean, 10);
    expect(numbers['patches-in-use']).toBeCloseTo(run.patchesInUse.at(-1)!.mean, 10);
  }
});

test('a point that is a whole comparison has the chances and the cost of every plan that the comparison has', async () => {
  const spec = specOf('reed-hare', { years: 12, replicates: 40 });
  const at = evaluatorOf(spec, { over: { adult_survival: { from: 0.5, to: 0.6 } }, compare: 'all' });
  const { numbers } = at([0.57]);
  const compared = await compareSpec(alone, { spec, plans: plansOf(spec).plans! });
  const { scenarios: plans } = compared!.comparison;
  expect(plans.map(({ name }) => name)).toHaveLength(5);
  for (const { name, cost, outcomes } of plans) {
    expect(numbers[`cost [${name}]`]).toBeCloseTo(cost!.presentValue, 6);
    for (const one of outcomes) expect(numbers[`chance: ${one.name} [${name}]`]).toBe(one.probability);
  }
  // Derived: 150,000 to 210,000 crowns once in the third year, at 3 % a year.
  expect(numbers['cost [rewet the wash]']).toBeCloseTo(180_000 / 1.03 ** 2, 6);
  expect(numbers['cost [as now]']).toBe(0);
});

test('what is the same in all futures has no error, and the error of a mean has n − 1', () => {
  const spec = specOf('reed-hare', { years: 12, replicates: 40 });
  const at = evaluatorOf(spec, { over: { adult_survival: [0.57] }, compare: 'all', measures: ['cost', 'animals'] });
  const { numbers } = at([0.57]);
  expect(numbers['cost [rewet the wash]']).toBeGreaterThan(100_000);
  expect(numbers['cost [rewet the wash] (standard error)']).toBe(0);
  // Derived from the ends of what every future came to: s / √n, s with n − 1.
  const { model, image } = compileSpec(specOf('reed-hare', { years: 12, replicates: 40 })).compiled!;
  const ends = batchesOf(40)
    .map(openRunner(image, { steps: 12, seed: model.seed }))
    .flatMap(({ counts, lanes }) => {
      const width = counts.length / 13;
      return Array.from({ length: lanes }, (_, lane) => counts[12 * width + lane]!);
    });
  const mean = ends.reduce((sum, end) => sum + end, 0) / 40;
  const variance = ends.reduce((sum, end) => sum + (end - mean) ** 2, 0) / 39;
  expect(numbers['animals [as now] (standard error)']).toBeCloseTo(Math.sqrt(variance / 40), 9);
});

test('plans are told apart at a point as a comparison tells them, and their differences have its intervals', async () => {
  const spec = specOf('reed-hare', { years: 12, replicates: 40 });
  const at = evaluatorOf(spec, {
    over: { adult_survival: [0.5, 0.57] },
    compare: 'all',
    measures: ['chance', 'animals', 'cost'],
  });
  const { numbers } = at([0.57]);
  const { comparison } = (await compareSpec(alone, { spec, plans: plansOf(spec).plans! }))!;
  const columns = comparison.objectives.flatMap(({ name, of, better }) => {
    const column = of === 'chance' ? `chance: ${name}` : name === 'animals at the end' ? 'animals' : name;
    return column === 'animals taken' || column === 'lowest count' ? [] : [{ name, column, better }];
  });
  expect(columns.map(({ column }) => column)).toEqual(expect.arrayContaining(['animals', 'cost']));
  const names = comparison.scenarios.map((plan) => plan.name);
  for (const { name, column, better } of columns) {
    const between = (a: string, b: string) =>
      comparison.differences.find((one) => one.outcome === name && [a, b].every((x) => [one.from, one.to].includes(x)));
    for (const plan of names.slice(1)) {
      const { estimate, interval, method, futures } = between(names[0]!, plan)!;
      const beside = `${column} [${plan}]`;
      expect(numbers[`${beside} (difference)`]).toBeCloseTo(estimate, 9);
      // Derived: differences are -1, 0 or 1, with the mean square (only under one + only under the other) / n.
      if (futures !== null) {
        const square = (futures.onlyFrom + futures.onlyTo) / 40;
        const error = Math.sqrt((square - estimate * estimate) / 40);
        expect(numbers[`${beside} (standard error of the difference)`]).toBeCloseTo(error, 12);
      }
      // Derived: Student's interval is t standard errors to each side.
      if (futures === null && method !== 'the two plans are one and the same model') {
        const half = student95(39) * numbers[`${beside} (standard error of the difference)`]!;
        expect(half).toBeCloseTo((interval.upper - interval.lower) / 2, 9);
      }
      if (method === 'the two plans are one and the same model') continue;
      expect(numbers[`${beside} (lower end of the difference)`]).toBeCloseTo(interval.lower, 9);
      expect(numbers[`${beside} (upper end of the difference)`]).toBeCloseTo(interval.upper, 9);
    }
    const sign = better === 'less' ? 1 : -1;
    const best = names.toSorted(
      (a, b) => sign * ((numbers[`${column} [${a}]`] ?? NaN) - (numbers[`${column} [${b}]`] ?? NaN)),
    )[0]!;
    for (const plan of names) {
      const may = plan === best || between(best, plan)?.toldApart === false;
      expect([plan, numbers[`${column} [${plan}] (perhaps best)`]]).toEqual([plan, may ? 1 : 0]);
    }
  }
});

test('a model without money has no cost', () => {
  const { findings } = planSweep(
    { over: { 'survival.adult': [0.5, 0.6] }, measures: ['cost'] },
    compileSpec(specOf('two-ponds')).compiled!,
  );
  expect(findings.map(({ message }) => message)).toEqual(['The model knows no money, so there is no cost']);
});

test('places of the model can be swept as well as named parameters', () => {
  const at = evaluatorOf(specOf('two-ponds'), {
    over: { 'wandering.kernel.mean': [0.5, 2], 'survival.adult': [0.6] },
    measures: ['growth'],
  });
  const [near, far] = [at([0.5, 0.65]), at([2, 0.65])];
  const spec = specOf('two-ponds');
  expect(far.numbers['growth']).not.toBe(NaN);
  expect(at([1, 0.65]).numbers['growth']).toBeCloseTo(
    analyseModel(compileSpec(spec).compiled!, { at: 'zero' }).value!.growthRate,
    12,
  );
  expect(near.failure + far.failure).toBe('');
  expect(at([1, 0.7]).numbers['growth']).toBeGreaterThan(at([1, 0.6]).numbers['growth'] ?? 9);
});

test('a point that no model can have has its reason, and no numbers', () => {
  const at = evaluatorOf(specOf('reed-hare'), { over: { adult_survival: { from: 0.5, to: 2 } }, measures: ['growth'] });
  expect(at([1.5])).toEqual({ failure: "The survival of adult in Abbot's wash is 1.5", numbers: { growth: NaN } });
  expect(at([0.5]).failure).toBe('');
});

test('many growth rates at a time are those of points compiled one by one', () => {
  const { variation, named: phases, ...hare } = specOf('reed-hare');
  const { flood, ...others } = phases;
  expect([variation, flood]).not.toContain(undefined);
  const spec: Spec = { ...hare, named: others };
  const named = ['adult_survival', 'newborn_survival', 'litter', 'natal_leaving'] as const;
  const ranges = { adult_survival: [0.3, 0.8], newborn_survival: [0.2, 0.6], litter: [1, 4], natal_leaving: [0, 0.5] };
  const factors = named.map((name): Factor => {
    const [from = 0, to = 1] = ranges[name];
    const base = spec.parameters![name];
    return {
      name,
      base: (base as { readonly value: number }).value,
      range: { by: 'from to', from, to, scale: 'even', steps: 2 },
    };
  });
  const design = openDesign({ design: 'sobol', factors, points: 300, seed: 1, scrambled: true });
  const many = manyPoints(spec, factors, nobodyCrowds)!;
  expect(many).not.toBeNull();
  const points = Array.from({ length: design.size }, (_, i) => design.at(i));
  const columns = design.columns(0, design.size);
  const growth = many.growthAt(columns, design.size);
  expect(
    many.growthAt(
      [1.2, 0.4, 2, 0.1].map((value) => Float64Array.of(value)),
      1,
    )[0],
  ).toBeNaN();
  points
    .filter((_, i) => i % 10 === 0)
    .forEach((values, i) => {
      const set = named.map((name, k) => ({ name, value: String(values[k]) }));
      const applied = applySettings(spec, { set });
      const model = resolveModel((applied as { readonly spec: Spec }).spec).model!;
      const { landscape } = buildLandscape(model);
      const alone = leading(
        buildBlock({ model, landscape, coefficients: nobodyCrowds(model) }, 'zero').matrix,
      ).growthRate;
      expect(Math.abs((growth[i * 10] ?? 0) / alone - 1)).toBeLessThan(1e-11);
    });
});

test('what moves more than rates is compiled point by point', () => {
  const one = (name: string): Factor[] => [{ name, base: 1, range: { by: 'values', values: [1, 2] } }];
  const pond = specOf('two-ponds');
  const moved: Spec = {
    ...pond,
    parameters: { far: 1 },
    named: {
      ...pond.named,
      wandering: { ...pond.named['wandering'], kernel: { shape: 'exponential', mean: 'far' } } as never,
    },
  };
  expect(manyPoints(moved, one('far'), nobodyCrowds)).toBeNull();
  expect(manyPoints(pond, one('wandering.kernel.mean'), nobodyCrowds)).toBeNull();
  expect(manyPoints(pond, one('survival.adult'), nobodyCrowds)).not.toBeNull();
});
