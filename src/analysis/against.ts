// Two models, or a model under two scenarios, beside each other: what makes them grow differently.
import { buildBlock } from '../compile/block.ts';
import type { AtState, BlockMatrix } from '../compile/block-matrix.ts';
import { leading } from '../numeric/leading.ts';
import { compileSpec, type CompiledModel } from '../pipeline.ts';
import { applySettings } from '../spec/settings.ts';
import { because, listNames, type Answer } from './answer.ts';
import type { Against, ParameterShare } from './difference-input.ts';
import { parameterTangents } from './parameter-tangents.ts';
import { sensitivityAlong, vectorsOf } from './sensitivity.ts';
import { stateAt } from './state-at.ts';

export interface Compared {
  readonly name: string;
  readonly compiled: CompiledModel;
}

/** The matrix of the other, and the part of each named number: its difference times ∂λ/∂number of the model half-way. */
export function against(compiled: CompiledModel, other: Compared, at: AtState): Answer<Against> {
  const state = stateAt(other.compiled, at);
  if (state === null) return because(`Numbers of ${other.name} do not come to stand still.`);
  const [own, reference] = [
    buildBlock(compiled, at, stateAt(compiled, at) ?? undefined),
    buildBlock(other.compiled, at, state),
  ];
  const differs = namesThatDiffer(own, reference);
  if (differs !== null) return because(`${other.name} has ${differs}, so entries have nothing to be compared with.`);
  return {
    value: { name: other.name, matrix: reference.matrix, parameters: byParameter(compiled, other.compiled, at) },
  };
}

function namesThatDiffer(own: BlockMatrix, other: BlockMatrix): string | null {
  if (own.patches.join('\0') !== other.patches.join('\0')) return 'other patches';
  if (own.classes.join('\0') !== other.classes.join('\0')) return 'other classes';
  const states = ({ states: all }: BlockMatrix): string => all.map(({ patch, class: c }) => `${patch} ${c}`).join();
  return states(own) === states(other) ? null : 'other classes at the count';
}

function byParameter(compiled: CompiledModel, other: CompiledModel, at: AtState): Answer<readonly ParameterShare[]> {
  const before = new Map(other.model.parameters.map(({ name, value }) => [name, value]));
  const changed = compiled.model.parameters.flatMap(({ name, value }) => {
    const reference = before.get(name);
    return reference === undefined || reference === value ? [] : [{ name, value, reference }];
  });
  if (changed.length === 0) return because('No named number differs: the difference is in other numbers of the model.');
  const made = changed.filter(({ name }) => typeof numberOf(compiled, name) === 'string').map(({ name }) => name);
  const set = changed
    .filter(({ name }) => !made.includes(name))
    .map(({ name, value, reference }) => ({ name, value: String((value + reference) / 2) }));
  // What the actions of a scenario change is in the spec that was laid; crowding is held as under any plan.
  const applied = applySettings(compiled.laid, { set, scenario: 'as now' });
  const found = applied.ok ? compileSpec(applied.spec).compiled : null;
  const middle = found && { ...found, coefficients: compiled.coefficients };
  const state = middle && stateAt(middle, at);
  if (middle === null || state === null) return because('There is no model half-way between the two.');
  const block = buildBlock(middle, at, state);
  const vectors = vectorsOf(leading(block.matrix));
  if (vectors === null) return because('The model half-way between the two has no single stable distribution.');
  const { parameterTangents: tangents, withoutTangent } = parameterTangents(middle, block, state);
  const beyond = changed.filter(({ name }) => withoutTangent.includes(name)).map(({ name }) => name);
  if (beyond.length > 0) return because(`The slope by ${listNames(beyond)} is not known half-way.`);
  const slopes = new Map(tangents.map(({ name, matrixTangent }) => [name, sensitivityAlong(matrixTangent, vectors)]));
  return {
    value: changed
      .filter(({ name }) => !made.includes(name))
      .map((one) => ({ ...one, contribution: (one.value - one.reference) * (slopes.get(one.name) ?? 0) })),
  };
}

/** As it is written: a number, or an expression over others, whose differences are theirs. */
function numberOf({ laid }: CompiledModel, name: string): number | string | undefined {
  const written = laid.parameters?.[name];
  const value = typeof written === 'object' && 'value' in written ? written.value : written;
  return typeof value === 'number' ? value : typeof value === 'string' ? madeOf(value) : undefined;
}

/** A number with a unit is a number. */
function madeOf(text: string): number | string {
  return Number.isFinite(Number.parseFloat(text)) && !/[-+*/^(]/.test(text.slice(1)) ? Number.parseFloat(text) : text;
}
