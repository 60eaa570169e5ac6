// From what a user asks of a sweep to a plan of it: names found, ranges made whole, sizes weighed; or what stands against it.
import { nearestName } from '../diagnostic/nearest.ts';
import type { DiagnosticCode } from '../diagnostic/codes.ts';
import type { CompiledModel } from '../pipeline.ts';
import type { SpecPath } from '../spec/document.ts';
import type { Finding } from '../spec/finding.ts';
import { scenarioOf, scenariosOf } from '../spec/plans/scenarios.ts';
import type { SweepSpec } from '../spec/schema/spec.ts';
import { openDesign, type DesignPlan } from './design/design.ts';
import type { Factor, Range, Value } from './design/factor.ts';
import { mostDimensions } from './design/sobol.ts';
import { isOfRuns, type MeasureName } from './measures.ts';
import { misfitOf } from './misfit.ts';
import { numberIn, placesIn, scenarioName } from './places.ts';

export interface SweepPlan {
  readonly design: DesignPlan;
  readonly measures: readonly MeasureName[];
  /** Set beside each other at every point; empty where the model is run as it stands. */
  readonly scenarios: readonly string[];
}

export interface PlannedSweep {
  /** Null where something stands against it. */
  readonly plan: SweepPlan | null;
  readonly findings: readonly Finding[];
}

/** Beyond these a sweep is surely a mistake. */
const mostPoints = 100_000_000;
/** Animals of one class in one patch, year and replicate. */
const mostCells = 1e15;

const usualSteps = 11;
const usualPoints = { 'latin hypercube': 1024, sobol: 1024, 'sobol indices': 1024, morris: 20 } as const;

type Ranges = NonNullable<SweepSpec['over']>;

/** For the base model of the sweep, which compiles. */
export function planSweep(asked: SweepSpec, compiled: CompiledModel): PlannedSweep {
  const findings: Finding[] = [];
  const told = new Told(findings);
  const factors = asked.list === undefined ? factorsOf(asked, compiled, told) : listFactors(asked.list, compiled, told);
  const measures = measuresOf(asked, compiled, told);
  const scenarios = scenariosCompared(asked, compiled, told);
  const design = factors.length === 0 || findings.length > 0 ? null : designOf(asked, factors, told);
  if (design !== null) {
    checkFits(design, compiled, told);
    weigh({ design, measures, scenarios }, compiled, told);
  }
  return { plan: design === null || findings.length > 0 ? null : { design, measures, scenarios }, findings };
}

/** Refuses values that the text of a model could not have at their place either. */
function checkFits(design: DesignPlan, { spec }: CompiledModel, told: Told): void {
  for (const factor of design.factors) {
    const misfit = misfitOf(spec, factor, design);
    if (misfit === null) continue;
    const { found, expected, between } = misfit;
    const path = design.design === 'list' ? ['list'] : ['over', factor.name];
    told.fail('sweep-range', path, `\`${factor.name}\` would be ${found}`, {
      expected,
      ...(between ? { fix: `List the values one by one: \`${factor.name}: [A, B, C]\`.` } : {}),
    });
  }
}

class Told {
  readonly #findings: Finding[];

  constructor(findings: Finding[]) {
    this.#findings = findings;
  }

  fail(code: DiagnosticCode, path: SpecPath, message: string, details: Finding['details'] = {}): void {
    const part = code === 'unknown-number' ? 'key' : 'value';
    this.#findings.push({ severity: 'error', code, message, path: ['sweep', ...path], part, details });
  }
}

function factorsOf(asked: SweepSpec, compiled: CompiledModel, told: Told): readonly Factor[] {
  const over = asked.over ?? uncertainOnes(compiled);
  if (Object.keys(over).length === 0) {
    told.fail('sweep-shape', [], 'It is not said over which numbers the sweep goes', {
      expected: '`over: { NUMBER: { from: …, to: … } }`, or parameters with an `uncertainty`',
    });
  }
  return Object.entries(over).flatMap(([name, range]) => {
    const base = baseOf(name, compiled, told, ['over', name]);
    if (base === null) return [];
    const whole = rangeOf({ name, range, base }, compiled, told);
    return whole === null ? [] : [{ name, base, range: whole }];
  });
}

/** Without `over`, all parameters that say how sure they are. */
function uncertainOnes({ model }: CompiledModel): Ranges {
  const names = (model.uncertainty?.parameters ?? []).map(({ name }) => name);
  return Object.fromEntries(names.map((name) => [name, { 'as-uncertain': true }]));
}

/** Every scenario, or those that are named. */
function scenariosCompared({ compare, over }: SweepSpec, { spec }: CompiledModel, told: Told): readonly string[] {
  if (compare === undefined) return [];
  const known = scenariosOf(spec).map(({ name }) => name);
  if (over?.[scenarioName] !== undefined) {
    told.fail('sweep-shape', ['compare'], 'Scenarios are compared at every point, and are swept over as well', {
      fix: 'Remove `scenario` from `over`.',
    });
  }
  if (compare !== 'all') {
    compare.forEach((name, i) => {
      if (!known.includes(name)) tellScenario(name, known, told, ['compare', i]);
    });
    return compare;
  }
  if (known.length < 2) told.fail('sweep-shape', ['compare'], 'The model has no scenarios to compare');
  return known;
}

function tellScenario(name: Value, known: readonly string[], told: Told, path: SpecPath): void {
  told.fail('sweep-range', path, `There is no scenario \`${name}\``, { expected: `one of ${known.join(', ')}` });
}

/** The value in the model; null after telling that there is no such number. */
function baseOf(name: string, { spec, model }: CompiledModel, told: Told, path: SpecPath): Value | null {
  if (name === scenarioName) return scenarioOf(spec);
  const parameter = model.parameters.find((one) => one.name === name);
  if (parameter !== undefined) return parameter.value;
  const places = placesIn(spec);
  const place = places.find((one) => one.name === name);
  if (place !== undefined) return numberIn(place.value) ?? place.value;
  const known = [...model.parameters.map((one) => one.name), ...places.map((one) => one.name)];
  const nearest = nearestName(name, known);
  told.fail('unknown-number', path, `The model has no number \`${name}\``, {
    found: name,
    expected: 'a named parameter, or a place where a number stands, such as `natal.leaving`',
    ...(nearest === undefined ? {} : { nearest }),
  });
  return null;
}

interface Ranged {
  readonly name: string;
  readonly range: Ranges[string];
  readonly base: Value;
}

function rangeOf({ name, range }: Ranged, { spec, model }: CompiledModel, told: Told): Range | null {
  const path = ['over', name];
  if (name === scenarioName)
    return scenarioRange(
      range,
      scenariosOf(spec).map((one) => one.name),
      told,
    );
  if (isList(range)) {
    const values = range.map((value) => numberIn(value) ?? value);
    const text = values.find((value) => typeof value === 'string');
    if (text === undefined) return { by: 'values', values };
    told.fail('sweep-range', path, `\`${text}\` is no number`, {
      expected: `numbers for \`${name}\`, or a range from the lower to the upper one (with --over, \`${name}=from:to\`)`,
    });
    return null;
  }
  const steps = range.steps ?? usualSteps;
  if ('as-uncertain' in range) {
    const known = model.uncertainty?.parameters.find((one) => one.name === name);
    if (known !== undefined) return { by: 'how sure it is', distribution: known.distribution, steps };
    told.fail('sweep-range', path, `It is not said how sure \`${name}\` is`, {
      expected: 'a parameter with an `uncertainty`, or a range { from: …, to: … }',
    });
    return null;
  }
  const { from, to, scale = 'even' } = range;
  if (from < to && !(scale === 'ratio' && from <= 0)) return { by: 'from to', from, to, scale, steps };
  const message = from < to ? 'A range by ratio begins above zero' : 'The range ends where it begins, or before';
  told.fail('sweep-range', path, message, {
    found: `from ${from} to ${to}`,
    expected: from < to ? 'such as { from: 0.1, to: 10, scale: ratio }' : 'the lower number first',
  });
  return null;
}

function scenarioRange(range: Ranges[string], known: readonly string[], told: Told): Range | null {
  const path = ['over', scenarioName];
  if (!isList(range)) {
    told.fail('sweep-range', path, 'Scenarios have names', { expected: `a list of ${known.join(', ')}` });
    return null;
  }
  const unknown = range.filter((name) => !known.includes(String(name)));
  for (const name of unknown) tellScenario(name, known, told, path);
  return unknown.length > 0 ? null : { by: 'values', values: range };
}

function isList(range: Ranges[string]): range is Extract<Ranges[string], readonly Value[]> {
  return Array.isArray(range);
}

/** All names of a list of points, in the order in which they come. */
function listFactors(list: NonNullable<SweepSpec['list']>, compiled: CompiledModel, told: Told): readonly Factor[] {
  const names = [...new Set(list.flatMap((point) => Object.keys(point)))];
  return names.flatMap((name) => {
    const row = list.findIndex((point) => point[name] !== undefined);
    const base = baseOf(name, compiled, told, ['list', row, name]);
    const values = list.flatMap((point) => point[name] ?? []);
    return base === null ? [] : [{ name, base, range: { by: 'values' as const, values: [...new Set(values)] } }];
  });
}

function measuresOf(asked: SweepSpec, compiled: CompiledModel, told: Told): readonly MeasureName[] {
  const { model } = compiled;
  const measures = asked.measures ?? usualMeasures(asked, compiled);
  const wanted = measures.find((one) => one === 'chance' || one === 'chance-at-end');
  if (wanted !== undefined && model.outcomes.length === 0) {
    told.fail('sweep-shape', ['measures'], `The model has no outcomes, so there is no ${wanted}`, {
      fix: 'Say under `outcomes` what is looked for.',
    });
  }
  if (measures.includes('cost') && compiled.cost.money === null) {
    told.fail('sweep-shape', ['measures'], 'The model knows no money, so there is no cost', {
      fix: 'Give the actions a `cost`, and say under `money` what it is in.',
    });
  }
  return measures;
}

/** Growth; of plans that are compared what a comparison goes by. */
function usualMeasures({ compare }: SweepSpec, { model, cost }: CompiledModel): readonly MeasureName[] {
  if (compare === undefined) return ['growth'];
  return [model.outcomes.length > 0 ? 'chance' : 'animals', ...(cost.money === null ? [] : ['cost' as const])];
}

function designOf(asked: SweepSpec, factors: readonly Factor[], told: Told): DesignPlan | null {
  const name = asked.list === undefined ? (asked.design ?? 'grid') : 'list';
  const { seed = 1, scrambled = true } = asked;
  switch (name) {
    case 'grid':
    case 'one at a time':
      return { design: name, factors };
    case 'list':
      if (asked.list !== undefined) {
        return {
          design: name,
          factors,
          rows: asked.list.map((point) => factors.map((one) => point[one.name] ?? one.base)),
        };
      }
      told.fail('sweep-shape', ['design'], 'A list has no points', { expected: '`list: [{ NUMBER: value, … }, …]`' });
      return null;
    case 'latin hypercube':
    case 'morris':
      return { design: name, factors, points: asked.points ?? usualPoints[name], seed };
    case 'sobol':
    case 'sobol indices': {
      const dimensions = factors.length * (name === 'sobol' ? 1 : 2);
      if (dimensions > mostDimensions) {
        told.fail(
          'sweep-size',
          ['over'],
          `Sobol points have at most ${mostDimensions} dimensions, and ${dimensions} are needed`,
        );
        return null;
      }
      const points = asked.points ?? usualPoints[name];
      return name === 'sobol'
        ? { design: name, factors, points, seed, scrambled }
        : { design: name, factors, points, seed };
    }
  }
}

/** Refuses what would surely never end. */
function weigh({ design, measures, scenarios }: SweepPlan, { model }: CompiledModel, told: Told): void {
  const { size } = openDesign(design);
  const { replicates, steps, patches, classes } = model;
  const runs = measures.some(isOfRuns)
    ? replicates * steps * patches.length * classes.length * Math.max(1, scenarios.length)
    : 0;
  if (size > mostPoints) {
    told.fail('sweep-size', ['design'], `This sweep has ${size.toLocaleString('en')} points`, {
      expected: `at most ${mostPoints.toLocaleString('en')}`,
      fix: 'Take fewer values of each number, or a sampled design such as `latin hypercube`.',
    });
  } else if (size * runs > mostCells) {
    told.fail(
      'sweep-size',
      ['design'],
      `This sweep has ${(size * replicates).toLocaleString('en')} runs of ${steps} years`,
      {
        reason: 'It would take years.',
        fix: 'Take fewer points or replicates.',
      },
    );
  }
}
