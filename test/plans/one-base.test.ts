// All scenarios of a spec are compiled from one base, and come out as each does by itself.
import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { compileBase, compileScenario, compileSpec } from '../../src/pipeline.ts';
import { scenariosOf } from '../../src/spec/plans/scenarios.ts';
import type { Spec } from '../../src/spec/schema/spec.ts';
import { fens, specOf } from './landscape.ts';

const model = (name: string) => specOf(readFileSync(new URL(`../../models/${name}.yaml`, import.meta.url), 'utf8'));

const crowded = fens({
  actions: `  rewet: { kind: habitat, in: North fen, capacity: { add: -200 }, cost: { once: 100 } }
  mere: { kind: habitat, new: { name: A mere, at: [1, 2], area: 40 ha, capacity: 50 }, from: 2033, cost: { yearly: crowns } }
`,
  scenarios: '  dry: [rewet]\n  mere: [mere]\n  both: [rewet, mere]\n',
  more: 'money: { currency: crowns, price-year: 2030 }\n',
});

test.each<[string, Spec]>([
  ...['reed-hare', 'borrowed-newts', 'three-bags'].map((name): [string, Spec] => [name, model(name)]),
  ['plans with mistakes', specOf(crowded)],
])('%s', (_, spec) => {
  const base = compileBase(spec);
  const scenarios = scenariosOf(spec);
  expect(scenarios.length).toBeGreaterThan(2);
  for (const { name, spec: own } of [...scenarios, ...scenarios.toReversed()]) {
    const [together, alone] = [compileScenario(base, own), compileSpec(own)];
    expect([name, together.findings]).toEqual([name, alone.findings]);
    expect(together.compiled?.provenance).toEqual(alone.compiled?.provenance);
    expect(together.compiled?.cost).toEqual(alone.compiled?.cost);
    const bytes = [together, alone].map(({ compiled }) => compiled && new Uint8Array(compiled.image));
    expect(bytes[0]).toEqual(bytes[1]);
  }
});
