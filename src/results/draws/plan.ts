// The outer loop: for each draw the values of the parameters that are not exactly known, and the seed of its replicates.
// Both are keyed by (seed, draw, name): a further parameter or draw moves no other, and all plans meet the same draws.
import { seedOf, uniformAt } from '../../machine/random.ts';
import { factorOf } from '../../compile/weather/factor.ts';
import { keyOfName } from '../../compile/image/keys.ts';
import type { Uncertainty } from '../../model/chance.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import { valueAt } from '../../model/uncertainty/distribution.ts';
import { normalQuantile } from '../../numeric/normal-quantile.ts';

const ofValues = keyOfName('what is not known');
const ofSeeds = keyOfName('seed of a draw');

/** By name; draws count from 0. */
export type DrawnValues = Readonly<Record<string, number>>;

export function drawnValues({ parameters, correlation, table }: Uncertainty, seed: number, draw: number): DrawnValues {
  if (table !== null) return table[draw] ?? {};
  const names = parameters.map(({ name }) => name);
  const factor = factorOf(correlation, names);
  const normals = factor.columns.map((name) =>
    normalQuantile(uniformAt({ seed, words: [draw, keyOfName(name ?? ''), ofValues] }, 0)),
  );
  const values = parameters.map(({ name, distribution }, i): readonly [string, number] => {
    let z = 0;
    for (let k = factor.start[i] ?? 0; k < (factor.start[i + 1] ?? 0); k++) {
      z += (factor.weight[k] ?? 0) * (normals[factor.column[k] ?? 0] ?? 0);
    }
    return [name, valueAt(distribution, z)];
  });
  return Object.fromEntries(values);
}

/** Of the replicates of a draw. */
export function seedOfDraw(seed: number, draw: number): number {
  return seedOf({ seed, words: [draw, 0, ofSeeds] });
}

/** The spec with the values of a draw, which are then taken as known. */
export function withValues(spec: Spec, values: DrawnValues): Spec {
  const parameters = Object.entries(spec.parameters ?? {}).map(([name, before]): [string, typeof before] => {
    const value = values[name];
    if (typeof before !== 'object') return [name, value ?? before];
    const { source } = before;
    return [name, { value: value ?? before.value, ...(source === undefined ? {} : { source }) }];
  });
  return { ...spec, uncertainty: {}, parameters: Object.fromEntries(parameters) };
}
