// A point of a sweep says what the same model says with `--set`, and a failed point says why.
import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { analyseModel } from '../../src/analysis/analyse-model.ts';
import { compileSpec, followPath, runModel } from '../../src/pipeline.ts';
import { readSpec } from '../../src/spec/read.ts';
import type { Spec, SweepSpec } from '../../src/spec/schema/spec.ts';
import { applySettings, type Settings } from '../../src/spec/settings.ts';
import { openEvaluator } from '../../src/sweep/point/evaluate.ts';
import { columnsOf } from '../../src/sweep/measures.ts';
import { planSweep } from '../../src/sweep/request.ts';

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
  const names = evaluator.quantities.flatMap(columnsOf).map(({ name }) => name);
  return (values: readonly (number | string)[]) => {
    const { numbers, failure } = evaluator.at(values);
    return { failure, numbers: Object.fromEntries(names.map((name, i) => [name, numbers[i] ?? NaN])) };
  };
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
