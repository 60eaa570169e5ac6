// How every number of a model moves with one named parameter: the model with slopes in the places of its numbers.
import type { SpecPath } from '../../spec/document.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import type { AgeingPhase, BreedingPhase, Crowding, Model, Phase } from '../model.ts';
import { resolveWithContext } from '../resolve.ts';
import { dispersalSlopes } from './dispersal.ts';
import { SlopeReader } from './reader.ts';

export interface ModelSlopes {
  /** For each phase the same phase with slopes as its numbers; null where it has none. What are no numbers stays. */
  readonly phases: readonly (Phase | null)[];
  readonly crowding: readonly CrowdingSlopes[];
  /** Places that use the parameter and whose slopes are not known here: then the slopes do not tell all. */
  readonly missed: readonly SpecPath[];
}

export interface CrowdingSlopes {
  readonly capacity: Float64Array;
  readonly alleeHalf: Float64Array;
  readonly shapeNumber: number;
}

/** For any of the parameters of a spec that resolves; the rates are those of the first year. */
export function slopesOf(spec: Spec): (parameter: string) => ModelSlopes | null {
  const { model, context } = resolveWithContext(spec);
  return (parameter) => {
    if (model === null) return null;
    const reader = new SlopeReader(context, parameter);
    const phases = model.phases.map((phase) => phaseSlopes(reader, model, phase));
    return {
      phases,
      crowding: model.crowding.map((crowding) => crowdingSlopes(reader, crowding)),
      missed: reader.missed(),
    };
  };
}

function phaseSlopes(reader: SlopeReader, model: Model, phase: Phase): Phase | null {
  switch (phase.kind) {
    case 'count':
      return null;
    case 'ageing':
      return stageSlopes(reader, model, phase);
    // Their amounts stay as they are; where they use the parameter they are among the places missed.
    case 'take':
    case 'move':
    case 'add':
      return null;
    case 'survival':
      return { ...phase, survival: reader.table(phase.survival) };
    case 'breeding':
      return breedingSlopes(reader, phase);
    case 'demography':
      return { ...phase, fates: reader.table(phase.fates), births: reader.table(phase.births) };
    case 'dispersal':
      return dispersalSlopes(reader, model, phase);
    case 'ceiling':
      return { ...phase, capacity: ceilingSlopes(reader, phase.name) };
  }
}

/** Births are the written numbers times the share of females; where both sexes are followed the share says which class they enter. */
function breedingSlopes(reader: SlopeReader, phase: BreedingPhase): BreedingPhase {
  const { spec, sexes, numbers, time } = reader.context;
  const { name, births, into } = phase;
  const named = spec.named[name];
  const own = name === 'breeding' ? spec : named?.kind === 'breeding' ? named : undefined;
  const at = (...keys: readonly string[]): SpecPath => (name === 'breeding' ? keys : [name, ...keys]);
  const written = own?.births?.['female-share'];
  const expression = typeof written === 'object' ? undefined : written;
  const path = at('births', 'female-share');
  const shareSlope = reader.one(expression, path);
  const mated = withMating(phase, reader.one(own?.mating?.['females-per-male'], at('mating', 'females-per-male')));
  if (sexes !== null) {
    const entering = new Float64Array(into.length);
    entering[0] = shareSlope;
    entering[sexes.indexOf('male')] = -shareSlope;
    return { ...mated, births: reader.table(births), into: entering };
  }
  const share = expression === undefined ? 1 : numbers.value(expression, path, { year: time.firstYear });
  const table = reader.table(births).epochs[0] ?? new Float64Array(0);
  const values = births.epochs[0] ?? table;
  const slopes = table.map((slope, i) => slope * share + (share === 0 ? 0 : (values[i] ?? 0) / share) * shareSlope);
  return { ...mated, births: { epochs: [slopes], epochOf: new Int32Array(0) }, into: new Float64Array(into.length) };
}

/** Slopes of durations as the years of the stages; what they do to the shares that go on is found when growth is known. */
function stageSlopes(reader: SlopeReader, { classes }: Model, phase: AgeingPhase): AgeingPhase | null {
  if (phase.stages === undefined) return null;
  const { duration } = reader.context.spec;
  const stages = phase.stages.map((stage) => {
    const name = classes[stage.class] ?? '';
    return { ...stage, years: reader.one(duration?.[name]?.years, ['duration', name, 'years']) };
  });
  return { ...phase, stages, advance: new Float64Array(classes.length) };
}

function withMating(phase: BreedingPhase, femalesPerMale: number): BreedingPhase {
  return phase.mating === undefined ? phase : { ...phase, mating: { ...phase.mating, femalesPerMale } };
}

function ceilingSlopes(reader: SlopeReader, name: string): Float64Array {
  const spec = reader.context.spec.named[name];
  return reader.byPatch(spec?.kind === 'ceiling' ? spec.capacity : undefined, [name, 'capacity']);
}

function crowdingSlopes(reader: SlopeReader, { name }: Crowding): CrowdingSlopes {
  const { spec } = reader.context;
  const named = spec.named[name];
  const own = named?.kind === 'crowding' ? named : spec.crowding;
  return {
    capacity: reader.byPatch(own?.capacity, [name, 'capacity']),
    alleeHalf: reader.byPatch(own?.['allee-half'], [name, 'allee-half']),
    shapeNumber: reader.one(own?.['shape-number'], [name, 'shape-number']),
  };
}
