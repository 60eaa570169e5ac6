// A small landscape with plans of every kind: a pair of fens that exchange animals, and a pool that nobody leaves or reaches.
import { openRunner } from '../../src/kernel/run.ts';
import { scenariosOf } from '../../src/spec/plans/scenarios.ts';
import { readSpec } from '../../src/spec/read.ts';
import type { Spec } from '../../src/spec/schema/spec.ts';
import { compileSpec, type CompiledModel } from '../../src/pipeline.ts';

export interface Written {
  readonly actions?: string;
  readonly scenarios?: string;
  readonly more?: string;
  readonly first?: string;
}

/** Sections as YAML, each from the first column on. */
export function fens({ actions = '', scenarios = '', more = '', first = '' }: Written): string {
  return `skein: 1
study: { title: Two fens and a pool (invented) }
first-year: 2031
years: 20
position: plane
unit: km
patches:
${first}  - { name: Far pool, at: [400, 0], area: 30 ha, capacity: 50 }
  - { name: North fen, at: [0, 0], area: 100 ha, capacity: 120 }
  - { name: South fen, at: [3, 4], area: 60 ha, capacity: 40 }
counts: females
classes: [young, adult]
oldest: open-ended
parameters: { adult_survival: 0.66, litter: 2.6 }
survival: { young: 0.42, adult: adult_survival }
births: { adult: litter, female-share: 0.5 }
year: [count, breeding, survival, natal, ageing]
natal:
  kind: dispersal
  classes: [young]
  leaving: 0.2
  kernel: { shape: exponential, mean: 4 km, reach: 30 km }
  attraction: capacity ^ 0.5
  leavers: all arrive
  hazard: 0.02 per km
crowding:
  form: beverton-holt
  changes: { survival: [young] }
  counted: [adult]
  capacity: capacity
variation:
  survival: { young: { sd: 0.08 } }
  between-patches: 0.5
start: { table: { Far pool: { adult: 40 }, North fen: { adult: 70 }, South fen: { adult: 12 } } }
outcomes: { few: { of: [adult], below: 60 } }
${more}${actions === '' ? '' : `actions:\n${actions}`}${scenarios === '' ? '' : `scenarios:\n${scenarios}`}run: { replicates: 16, seed: 4 }
`;
}

export function specOf(text: string): Spec {
  const { document, diagnostics } = readSpec(text, 'test.yaml');
  if (document === undefined) throw new Error(JSON.stringify(diagnostics, null, 2));
  return document.spec;
}

export function compiledOf(text: string, scenario: string): CompiledModel {
  const found = scenariosOf(specOf(text)).find(({ name }) => name === scenario);
  if (found === undefined) throw new Error(`There is no scenario ${scenario}.`);
  const { compiled, findings } = compileSpec(found.spec);
  if (compiled === null) throw new Error(JSON.stringify(findings, null, 2));
  return compiled;
}

/** By the name of a patch, the animals of sixteen futures at each count. */
export function futuresOf({ model, image }: CompiledModel, seed = 4): ReadonlyMap<string, readonly string[]> {
  const { counts } = openRunner(image, { steps: model.steps, seed })({ first: 0, lanes: 16 });
  const columns = counts.length / ((model.steps + 1) * 16);
  return new Map(
    model.patches.map(({ name }, p) => [
      name,
      Array.from({ length: model.steps + 1 }, (_, t) =>
        counts.slice((t * columns + 1 + p) * 16, (t * columns + 2 + p) * 16).join(),
      ),
    ]),
  );
}
