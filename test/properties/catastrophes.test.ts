// Catastrophes as the kernel draws them: how often they are on in each patch against what `check` prints, which patches are
// struck together, and what they do. Bounds are 6 standard errors, allowing for runs of bad years.
import { expect, test } from 'vitest';
import { buildBlock } from '../../src/compile/block.ts';
import { planSlots } from '../../src/compile/weather/slots.ts';
import { openOwnImage } from '../../src/kernel/open.ts';
import { followPath, runModel, type CompiledModel } from '../../src/pipeline.ts';
import { catastropheWords } from '../../src/report/catastrophe-words.ts';
import { compileText, errorsOf } from '../pipeline/compile-text.ts';

function text(own: string, { years = 400, year = '[count, breeding, survival, ageing]', crowding = '' } = {}): string {
  return `skein: 1
study: { title: Catastrophes }
years: ${years}
position: plane
unit: km
patches:
  - { name: A, at: [0, 0], capacity: 100 }
  - { name: B, at: [10, 0], capacity: 100 }
  - { name: C, at: [40, 0], capacity: 100 }
counts: females
classes: [young, adult]
oldest: open-ended
survival: { young: 0.5, adult: 0.7 }
births: { adult: 1.2 }
year: ${year}
${crowding}
start: { table: { A: { adult: 100 }, B: { adult: 100 }, C: { adult: 100 } } }
${own}
`;
}

/** Share of the years in which a slot of a catastrophe is not 1, by patch, and how often two patches are struck at once. */
function struckShares(compiled: CompiledModel, which = 0, skip = 50): { readonly on: number[]; readonly both: number } {
  const { model, image } = compiled;
  const plan = planSlots(model);
  const slot = plan.catastrophes[0]!.slots.at(which)!;
  const machine = openOwnImage(image);
  const hits = [0, 0, 0];
  let [both, years] = [0, 0];
  for (let first = 0; first < 800; first += 16) {
    const numbers = new Uint32Array(machine.memory.buffer, machine.replicates(), 16);
    for (let lane = 0; lane < 16; lane++) numbers[lane] = first + lane;
    machine.start(16, 4, 0);
    for (let step = 1; step <= model.steps; step++) {
      machine.step();
      if (step <= skip) continue;
      const slots = new Float64Array(machine.memory.buffer, machine.slotNumbers(), plan.count * 3 * 16);
      const on = (p: number, lane: number) => slots[(slot * 3 + p) * 16 + lane] !== 1;
      for (let lane = 0; lane < 16; lane++) {
        years++;
        for (const p of [0, 1, 2]) if (on(p, lane)) hits[p]!++;
        if (on(0, lane) && on(1, lane)) both++;
      }
    }
  }
  return { on: hits.map((count) => count / years), both: both / years };
}

const effects = 'multiplies: { survival: { adult: 0.5 } }';

test.each([
  ['chance: 0.05 per patch, reach: one patch', [0.05, 0.05, 0.05], 0.0025],
  ['chance: 0.05 per patch, reach: { radius: 15 km }', [0.0975, 0.0975, 0.05], 0.0975],
  ['chance: 0.09 per landscape, reach: one patch', [0.03, 0.03, 0.03], 0],
  ['chance: 0.09 per landscape, reach: everywhere', [0.09, 0.09, 0.09], 0.09],
  ['chance: 0.09 per landscape, reach: { radius: 15 km }, begins-in: [B, C]', [0.045, 0.045, 0.045], 0.045],
  // One beginning in w − 1 + 1/q = 4 + 10 years, on for 3 (derived).
  ['chance: 0.1 per landscape, reach: everywhere, lasts: 3 years, wait: 5 years', [3 / 14, 3 / 14, 3 / 14], 3 / 14],
  // Each patch for itself: on in 2/(1 + 10) of the years.
  ['chance: 0.1 per patch, reach: one patch, lasts: 2 years', [2 / 11, 2 / 11, 2 / 11], 4 / 121],
])('%s', (words, shares, together) => {
  const compiled = compileText(text(`flood: { kind: catastrophe, ${words}, ${effects} }`));
  expect([...compiled.landscape.strikes![0]!.on]).toEqual(shares.map((share) => expect.closeTo(share, 12)));
  const seen = struckShares(compiled);
  const bound = (share: number) => 6 * Math.sqrt((share * (1 - share) * 3) / 280_000) + 1e-9;
  seen.on.forEach((share, p) => {
    expect(Math.abs(share - shares[p]!)).toBeLessThan(bound(shares[p]!));
  });
  expect(Math.abs(seen.both - together)).toBeLessThan(bound(together));
});

test('capacity stays low for its years in each patch that was struck', () => {
  const own = 'capacity: { times: 0.5, for: 6 years }';
  const fire = compileText(
    text(`fire: { kind: catastrophe, chance: 0.2 per landscape, reach: one patch, lasts: 2 years, ${own} }`),
  );
  const expected = fire.landscape.strikes![0]!.lowered[0]!;
  const seen = struckShares(fire, -1);
  for (const share of seen.on) expect(Math.abs(share - expected)).toBeLessThan(6 * Math.sqrt((0.25 * 12) / 280_000));
});

// Derived: chance of at least one in 100 years at 0.02 a year, 1 − 0.98^100.
test('at least one in 100 years', () => {
  const { image } = compileText(
    text('flood: { kind: catastrophe, chance: 0.02 per landscape, reach: everywhere, takes: { adult: 1, young: 1 } }', {
      years: 100,
      year: '[count, breeding, survival, flood, ageing]',
    })
      .replace('adult: 1.2', 'adult: 0.6')
      .replaceAll('adult: 100 }', 'adult: 100000 }'),
  );
  const machine = openOwnImage(image);
  let hit = 0;
  for (let first = 0; first < 8000; first += 16) {
    const numbers = new Uint32Array(machine.memory.buffer, machine.replicates(), 16);
    for (let lane = 0; lane < 16; lane++) numbers[lane] = first + lane;
    machine.start(16, 11, 0);
    let fallen = new Uint8Array(16);
    for (let step = 1; step <= 100; step++) {
      machine.step();
      const counted = new Float64Array(machine.memory.buffer, machine.observed(), 16);
      fallen = fallen.map((before, lane) => (before === 1 || counted[lane] === 0 ? 1 : 0));
    }
    hit += fallen.reduce((a, b) => a + b, 0);
  }
  expect(Math.abs(hit / 8000 - 0.8673804)).toBeLessThan(6 * Math.sqrt((0.867 * 0.133) / 8000));
});

// Reed et al. 2003: about 14 % of the generations of vertebrates have a year in which half or more die. Derived: 1 − 0.86^(1/5) a year.
test('14 % a generation of five years is 2.97 % a year, and 14 % within five years of the runs', () => {
  const compiled = compileText(
    text(
      `die off: { kind: catastrophe, chance: 14 % per landscape, generation: 5 years, reach: everywhere, takes: { adult: 1, young: 1 } }
outcomes: { gone: { of: all, below: 1 } }
run: { replicates: 40000, seed: 9 }`,
      { years: 5, year: '[count, breeding, survival, die off, ageing]' },
    ),
  );
  expect(compiled.model.catastrophes[0]!.chance).toBeCloseTo(0.0297142, 7);
  expect(catastropheWords(compiled.model, compiled.landscape)[0]).toContain(
    'with a chance of 0.0297 a year, from 14 % a generation of 5 years',
  );
  const { byYear } = runModel(compiled).outcomes[0]!;
  byYear.forEach(({ ever }, t) => {
    const chance = 1 - 0.86 ** ((t + 1) / 5);
    expect(Math.abs(ever - chance)).toBeLessThan(5 * Math.sqrt((chance * (1 - chance)) / 40_000));
  });
  expect(Math.abs(byYear.at(-1)!.ever - 0.14)).toBeLessThan(0.009);
});

test('a generation is at least a year, and its chance a share', () => {
  const stated = (words: string) =>
    errorsOf(text(`flood: { kind: catastrophe, ${words}, reach: everywhere, ${effects} }`));
  expect(stated('chance: 0.14 per landscape, generation: 0.5')).toEqual(['out-of-range']);
  expect(stated('chance: 0.14 per landscape, generation: 3 km')).toEqual(['wrong-unit']);
  expect(stated('chance: 1.4 per landscape, generation: 3 years')).toEqual(['share-out-of-range']);
  expect(stated('chance: 0.14 per landscape, generation: 4.5 years')).toEqual([]);
});

test('the map of one year uses the long-run frequency, and so does the path', () => {
  const compiled = compileText(
    text(
      `flood: { kind: catastrophe, chance: 0.1 per landscape, reach: everywhere, takes: { adult: 0.4 } }
mast: { kind: catastrophe, chance: 0.2 per patch, reach: one patch, multiplies: { births: { adult: 2 } } }
cold: { kind: catastrophe, chance: 0.5 per patch, reach: one patch, multiplies: { births: { adult: 0.5 } } }`,
      { year: '[count, breeding, survival, flood, ageing]' },
    ),
  );
  const { matrix } = buildBlock(compiled, 'zero');
  const entries = [...matrix.values].sort();
  const births = 1.2 * (1 + 0.2) * (1 - 0.5 * 0.5) * 0.5;
  expect(entries).toContainEqual(expect.closeTo(0.7 * 0.96 + births, 12));
  const path = followPath(compiled);
  const second = path.abundance.find(({ year, patch, class: c }) => year === 1 && patch === 'A' && c === 'adult');
  expect(second!.animals).toBeCloseTo(100 * (0.7 * 0.96 + births), 9);
});

test('capacities are those of years without catastrophes', () => {
  const crowding =
    'crowding: { form: beverton-holt, changes: { survival: [young] }, counted: [adult], capacity: capacity }';
  const calm = compileText(text('', { crowding }));
  const struck = compileText(
    text(`flood: { kind: catastrophe, chance: 0.1 per patch, reach: one patch, ${effects} }`, { crowding }),
  );
  expect(struck.coefficients).toEqual(calm.coefficients);
});

test('a further catastrophe leaves the others where they were', () => {
  const one = `flood: { kind: catastrophe, chance: 0.1 per patch, reach: one patch, ${effects} }`;
  const two = `${one}\nalso: { kind: catastrophe, chance: 0.1 per patch, reach: one patch, multiplies: { births: { adult: 0.5 } } }`;
  const shares = (own: string, index: number) => {
    const compiled = compileText(text(own, { years: 60 }));
    const plan = planSlots(compiled.model);
    const machine = openOwnImage(compiled.image);
    machine.start(16, 4, 0);
    return Array.from({ length: 60 }, () => {
      machine.step();
      const slots = new Float64Array(machine.memory.buffer, machine.slotNumbers(), plan.count * 48);
      return [...slots.slice(plan.catastrophes[index]!.slots[0]! * 48, plan.catastrophes[index]!.slots[0]! * 48 + 48)];
    });
  };
  expect(shares(two, 1)).toEqual(shares(one, 0));
});

test('shares above 1 in good years, and catastrophes that do nothing, are mistakes', () => {
  const good =
    'mast: { kind: catastrophe, chance: 0.1 per patch, reach: one patch, multiplies: { survival: { adult: 1.5 } } }';
  expect(errorsOf(text(good))).toEqual(['share-out-of-range']);
  expect(errorsOf(text('flood: { kind: catastrophe, chance: 0.1 per patch, reach: one patch }'))).toEqual([
    'idle-catastrophe',
  ]);
  expect(errorsOf(text(`flood: { kind: catastrophe, chance: "0.1", reach: one patch, ${effects} }`))).toEqual([
    'wrong-unit',
  ]);
});
