// Every plan of every model at other values of any number, by the short way: the compiler's own bytes, and its own refusals.
import { readFileSync, readdirSync } from 'node:fs';
import { expect, test, vi } from 'vitest';
import { compileBase, compileScenario, compileSpec } from '../../src/pipeline.ts';
import { readSpec } from '../../src/spec/read.ts';
import { scenariosOf, withScenario } from '../../src/spec/plans/scenarios.ts';
import type { Spec } from '../../src/spec/schema/spec.ts';
import type { Factor } from '../../src/sweep/design/factor.ts';
import { openDesign } from '../../src/sweep/design/design.ts';
import { openEvaluator } from '../../src/sweep/point/evaluate.ts';
import { planSweep } from '../../src/sweep/request.ts';
import { numberIn, placesIn } from '../../src/sweep/places.ts';
import { openChange } from '../../src/sweep/point/change.ts';
import { movingPlans } from '../../src/sweep/point/moving-plans.ts';

vi.setConfig({ testTimeout: 300_000 });

function specOf(text: string): Spec {
  return readSpec(text, 'model.yaml').document!.spec;
}

function factorsOf(spec: Spec, names: readonly string[]): readonly Factor[] {
  const places = new Map(placesIn(spec).map(({ name, value }) => [name, value] as const));
  return names.map((name) => {
    const written = spec.parameters?.[name];
    const base = numberIn(places.get(name) ?? (typeof written === 'object' ? written.value : written) ?? NaN)!;
    return { name, base, range: { by: 'values', values: [base] } };
  });
}

/** Null where there is no short way; else how many points took it, after all that is compiled was held against the compiler. */
function heldAgainstCompiler(spec: Spec, names: readonly string[], scales: readonly number[]): number | null {
  const factors = factorsOf(spec, names);
  const change = openChange(spec, factors);
  const scenarios = scenariosOf(spec).map(({ name }) => name);
  const pointAt = (scale: number, round: number) =>
    factors.map(({ base }, k) => Number(base) * (k % 2 === round % 2 ? scale : 1));
  const short = movingPlans({ factors, scenarios, change, probe: pointAt(scales[0]!, 0) });
  if (short === null) return null;
  let taken = 0;
  for (const [round, scale] of scales.entries()) {
    const values = pointAt(scale, round);
    const moved = short(values, scenarios);
    const changed = change(values);
    const base = compileBase(changed);
    const compiled = scenarios.map((name) => compileScenario(base, withScenario(changed, name)).compiled);
    if (moved === null) {
      expect(compiled).toContain(null);
      continue;
    }
    for (const [s, own] of moved.entries()) {
      const whole = compiled[s]!;
      expect(Buffer.from(own.image).equals(Buffer.from(whole.image))).toBe(true);
      expect(own.coefficients).toEqual(whole.coefficients);
      expect(own.startAnimals).toEqual(whole.startAnimals);
      expect(own.cost).toEqual(whole.cost);
      expect(own.model.outcomes).toEqual(whole.model.outcomes);
    }
    taken++;
  }
  return taken;
}

/** The section and the last word of the language; names that an author chose are left out. */
function kindOf(name: string, spec: Spec): string {
  const [section = '', ...inner] = name.split('.');
  const kind = spec.named[section]?.kind ?? '';
  const own = section === 'actions' ? (spec.actions?.[inner[0] ?? '']?.kind ?? '') : kind === '' ? section : kind;
  const chosen = new Set([
    ...Object.keys(spec.actions ?? {}),
    ...readClasses(spec),
    ...Object.keys(spec.parameters ?? {}),
  ]);
  const words = inner.filter((word) => /^[a-z-]+$/u.test(word) && !chosen.has(word));
  return [own, ...words.slice(-2)].join(' ');
}

function readClasses({ classes }: Spec): readonly string[] {
  return Array.isArray(classes) ? classes : [...classes.females, ...classes.males];
}

const files = readdirSync('models').filter((name) => name.endsWith('.yaml'));

/** Of every kind in so many models. */
const often = 1;

/** Kinds that need not be compiled whole; the others are years, lists, places on the ground and what drivers are read from. */
const shortWays = [
  'parameter',
  'start table',
  'start total',
  'start counted',
  'outcomes below',
  'outcomes above',
  'outcomes fallen-by',
  'money discount',
  'survival',
  'births',
  'births female-share',
  'in demography births',
  'patches area',
  'patches capacity',
  'demography fates',
  'dispersal shares',
  'dispersal leaving',
  'dispersal kernel mean',
  'dispersal kernel reach',
  'dispersal kernel shape-number',
  'dispersal hazard',
  'dispersal survival-on-the-way',
  'dispersal links crossing-death',
  'dispersal links turn-back',
  'dispersal links distance',
  'mating females-per-male',
  'crowding shape-number',
  'crowding allee-half',
  'variation survival sd',
  'variation cv',
  'variation autocorrelation',
  'variation between-patches',
  'variation between-patches range',
  'duration years',
  'breeding offspring size',
  'catastrophe multiplies survival',
  'catastrophe capacity times',
  'take share-of-excess',
  'take number',
  'move number',
  'move handling-survival',
  'move first-year-survival',
  'move cost per-animal',
  'add number',
  'add first-year-survival',
  'habitat capacity add',
  'habitat cost once',
  'link crossing-death times',
  'link distance times',
  'link cost yearly',
  'change cost yearly',
];

test('numbers of every kind, over all models', () => {
  const tried = new Map<string, number>();
  const taken = new Map<string, number>();
  for (const file of files) {
    const text = readFileSync(`models/${file}`, 'utf8');
    // Data files are read by the command line.
    if (/\.(csv|geojson)$/mu.test(text)) continue;
    const whole = specOf(text);
    const spec: Spec = { ...whole, years: Math.min(8, whole.years) };
    const seen = new Set<string>();
    for (const name of [...Object.keys(spec.parameters ?? {}), ...placesIn(spec).map((place) => place.name)]) {
      const kind = Object.hasOwn(spec.parameters ?? {}, name) ? 'parameter' : kindOf(name, spec);
      if (seen.has(kind) || (tried.get(kind) ?? 0) >= often) continue;
      if (!(Number(factorsOf(spec, [name])[0]!.base) > 0)) continue;
      seen.add(kind);
      tried.set(kind, (tried.get(kind) ?? 0) + 1);
      const points = heldAgainstCompiler(spec, [name], [1.05, 3]);
      if (points !== null) taken.set(kind, (taken.get(kind) ?? 0) + points);
    }
  }
  expect([...taken.keys()]).toEqual(expect.arrayContaining(shortWays));
});

test('an area that is none is refused by either way', () => {
  const spec = specOf(readFileSync('models/owl-network.yaml', 'utf8'));
  expect(heldAgainstCompiler(spec, ['patches.Poplars.area'], [1.05, 1, 0, 1, -1])).toBe(3);
});

test('points of a sweep have the same numbers by either way, whatever is swept', () => {
  const whole = specOf(readFileSync('models/which-plan-where.yaml', 'utf8'));
  const spec: Spec = { ...whole, years: 8, run: { replicates: 16, seed: 3 } };
  const { compiled } = compileSpec(spec);
  const over = {
    'actions.ford.crossing-death.times': [0.1, 0.2, 0.6],
    'patches.Near bank.capacity': [30, 60],
    adult_survival: [0.5, 0.7],
  };
  for (const asked of [
    { over, compare: 'all' as const, measures: ['chance' as const, 'animals' as const, 'growth' as const] },
    { over: { ...over, scenario: ['as now', 'safe ford'] }, measures: ['animals' as const, 'growth' as const] },
    { over, compare: 'all' as const, measures: ['growth' as const] },
  ]) {
    const { plan, findings } = planSweep(asked, compiled!);
    expect(findings).toEqual([]);
    const design = openDesign(plan!.design);
    const points = Array.from({ length: design.size }, (_, i) => design.at(i));
    const evaluator = openEvaluator(spec, plan!);
    points.forEach((values, i) => {
      if (i % 5 !== 0) return;
      // A list of one point is compiled whole.
      const list = { ...plan!.design, design: 'list' as const, rows: [values] };
      expect(evaluator.at(values)).toEqual(openEvaluator(spec, { ...plan!, design: list }).at(values));
    });
  }
});
