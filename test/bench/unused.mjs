// What a model does not use costs nothing: ratios of one run of a model to the same model with sections of chance that no rate
// reads, and, to compare, with ones that it does. Rounds of all follow one another, so that a busy machine is busy for all.
import { build, installPackages } from '../../bin/setup.mjs';

installPackages();
build();
const { compileSpec, readSpec, runModel } = await import('../../build/index.js');

const rounds = 9;
const years = Array.from({ length: 20 }, (_, i) => `${2000 + i}: ${0.5 + (i % 7) / 6}`).join(', ');

function compiled(more, survival = '0.74') {
  const patches = Array.from(
    { length: 12 },
    (_, i) => `  - { name: P${i}, at: [${i * 3}, ${(i % 4) * 2}], capacity: 80 }`,
  );
  const text = `skein: 1
study: { title: Bench }
years: 50
position: plane
unit: km
patches:
${patches.join('\n')}
counts: females
classes: [newborn, yearling, adult]
oldest: open-ended
parameters: { live: ${survival} }
survival: { newborn: 0.4, yearling: 0.6, adult: live }
births: { adult: 1.4 }
year: [count, breeding, survival, natal, ageing]
natal: { kind: dispersal, classes: [newborn], leaving: 0.2, kernel: { shape: exponential, mean: 4 km }, leavers: all arrive }
crowding: { form: beverton-holt, changes: { survival: [newborn] }, counted: [adult], capacity: capacity, where-declining: ceiling }
start: { total: 600 }
outcomes: { few: { of: [adult], below: 50 } }
run: { replicates: 400, seed: 1 }
${more}`;
  const { document, diagnostics } = readSpec(text, 'bench');
  if (document === undefined) throw new Error(JSON.stringify(diagnostics));
  const { compiled: made, findings } = compileSpec(document.spec);
  if (made === null) throw new Error(JSON.stringify(findings));
  return made;
}

const drivers = `drivers: { values: { rain: { ${years} } }, future: resample-years }`;
const cases = [
  ['the model', compiled('')],
  ['drivers by the calendar that nothing reads', compiled(drivers.replace('resample-years', 'repeat'))],
  ['drawn drivers that nothing reads', compiled(drivers)],
  ['uncertainty that is not drawn', compiled('', '{ value: 0.74, uncertainty: { standard-error: 0.03 } }')],
  ['variation that is used', compiled('variation: { survival: { adult: { sd: 0.05 } }, between-patches: 0.4 }')],
  [
    'a catastrophe that is used',
    compiled(
      'flood: { kind: catastrophe, chance: 0.04 per patch, reach: one patch, multiplies: { survival: { adult: 0.5 } } }',
    ),
  ],
];

const times = cases.map(() => []);
for (let round = 0; round <= rounds; round++) {
  cases.forEach(([, model], i) => {
    const started = performance.now();
    runModel(model);
    if (round > 0) times[i].push(performance.now() - started);
  });
}
const median = (values) => values.toSorted((a, b) => a - b)[Math.floor(values.length / 2)];
const ratios = times.map((own) => median(own.map((ms, round) => ms / times[0][round])));
console.log(`Time of a run as a multiple of that of the model, medians of ${rounds} rounds, Node ${process.version}`);
cases.forEach(([what], i) => console.log(`${what.padEnd(48)} ${ratios[i].toFixed(2)}`));
