// What a sweep is, whole: two folders with the same manifest hold parts of the same sweep, to the last byte.
import type { CompiledModel } from '../pipeline.ts';
import { provenanceOf } from '../results/provenance.ts';
import { openDesign } from './design/design.ts';
import { isText, type Factor } from './design/factor.ts';
import {
  columnsOf,
  inScenarios,
  isOfRuns,
  moneyUnit,
  pairColumnsOf,
  quantitiesOf,
  type MeasureName,
  type NumberColumn,
  type Quantity,
} from './measures.ts';
import type { DesignPlan } from './design/design.ts';
import type { Spec } from '../spec/schema/spec.ts';
import { unitOfPlace } from './places.ts';
import type { SweepPlan } from './request.ts';

export interface SweepColumn {
  readonly name: string;
  readonly type: 'integer' | 'number' | 'text';
  readonly unit: string;
  readonly meaning: string;
}

export interface Manifest {
  readonly format: 'skein-sweep/1';
  readonly tool: { readonly name: 'skein'; readonly version: string; readonly kernel: string };
  readonly model: string;
  /** SHA-256 of the model, the design and the measures, and of the major version of the kernel. */
  readonly hash: string;
  readonly design: DesignPlan;
  readonly measures: readonly MeasureName[];
  readonly scenarios: readonly string[];
  /** Numbers that each point answers with, and which scenario is better by them. */
  readonly quantities: readonly {
    readonly name: string;
    readonly scenario: string | null;
    readonly better: Quantity['better'];
  }[];
  readonly points: number;
  /** Each part holds so many points, the last perhaps fewer. */
  readonly pointsInPart: number;
  readonly parts: number;
  /** Null where no measure asks for runs. */
  readonly runs: { readonly replicates: number; readonly years: number; readonly seed: number } | null;
  /** Of the parts, in their order. */
  readonly columns: readonly SweepColumn[];
  /** The model with all its inputs, as the language has it. */
  readonly spec: unknown;
}

/** `spec` as it is to be printed. */
export function manifestOf({ spec, model }: CompiledModel, plan: SweepPlan, printed: unknown): Manifest {
  const { design, measures, scenarios } = plan;
  const asked = quantitiesOf(measures, model);
  const { tool, model: title, hash } = provenanceOf(model.title, { spec, plan });
  const points = openDesign(design).size;
  const ofRuns = measures.some(isOfRuns);
  const cells = model.replicates * model.steps * model.patches.length * model.classes.length;
  const pointsInPart = partSize({ points, cells: ofRuns ? cells * Math.max(1, scenarios.length) : 0, measures });
  const { replicates, steps: years, seed } = model;
  return {
    format: 'skein-sweep/1',
    tool,
    model: title,
    hash,
    design,
    measures,
    scenarios,
    quantities: placedQuantities(asked, scenarios),
    points,
    pointsInPart,
    parts: Math.ceil(points / pointsInPart),
    runs: ofRuns ? { replicates, years, seed } : null,
    columns: sweepColumns(spec, design.factors, [
      ...inScenarios(asked, scenarios).flatMap(columnsOf),
      ...pairColumnsOf(asked, scenarios),
    ]),
    spec: printed,
  };
}

function placedQuantities(asked: readonly Quantity[], scenarios: readonly string[]): Manifest['quantities'] {
  const named: readonly (string | null)[] = scenarios.length === 0 ? [null] : scenarios;
  return named.flatMap((scenario) => asked.map(({ name, better }) => ({ name, scenario, better })));
}

interface PartSize {
  readonly points: number;
  /** Animals of one class in one patch, year and replicate of a point. */
  readonly cells: number;
  readonly measures: readonly MeasureName[];
}

/** At most about a second of work where points are run, and enough parts for many threads: by the request alone, never by the machine. */
function partSize({ points, cells, measures }: PartSize): number {
  const quick = measures.every((one) => one === 'growth');
  const fitting = cells > 0 ? Math.min(4096, Math.floor(2e7 / cells)) : quick ? 16_384 : 256;
  const few = Math.max(cells > 0 ? 1 : 64, Math.ceil(points / 16));
  return Math.max(1, Math.min(fitting, few));
}

/** What a number of a model is in that has no unit in the language: whatever its author gave it in. */
export const ownUnit = 'as in the model';

function sweepColumns(
  spec: Spec,
  factors: readonly Factor[],
  numbers: readonly NumberColumn[],
): readonly SweepColumn[] {
  const currency = spec.money?.currency ?? moneyUnit;
  const number = ({ name, type, unit, meaning }: NumberColumn): SweepColumn => ({
    name,
    type: type ?? 'number',
    unit: unit === moneyUnit ? currency : unit,
    meaning,
  });
  return [
    { name: 'point', type: 'integer', unit: '', meaning: 'Number of the point in the design, from 0.' },
    ...factors.map((factor): SweepColumn => ({
      name: factor.name,
      type: isText(factor) ? 'text' : 'number',
      unit: isText(factor) ? '' : unitOfPlace(spec, factor.name) || ownUnit,
      meaning: 'Value of this number at the point, in its base unit.',
    })),
    ...numbers.map(number),
    { name: 'failure', type: 'text', unit: '', meaning: 'Why no model can have these values; empty where one can.' },
  ];
}

export interface PartPlace {
  readonly first: number;
  readonly count: number;
}

/** Parts count from 0. */
export function placeOfPart(
  { points, pointsInPart }: Pick<Manifest, 'points' | 'pointsInPart'>,
  part: number,
): PartPlace {
  const first = part * pointsInPart;
  return { first, count: Math.min(pointsInPart, points - first) };
}
