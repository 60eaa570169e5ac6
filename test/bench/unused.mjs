// What a model does not use costs nothing: ratios of one run of a model to the same model with sections of chance that no rate
// reads, and, to compare, with ones that it does. Times are of the processor. Each run stands between two of the model itself, and is
// held against their mean, so that a machine that grows busy is busy for both; the model against itself shows what is noise.
import { build, installPackages } from '../../bin/setup.mjs';

installPackages();
build();
const { compileSpec, readSpec, runModel } = await import('../../build/index.js');

const rounds = Number(process.argv[2] ?? 25);
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
const base = compiled('');
const cases = [
  ['the model itself (noise)', base],
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

function seconds(model) {
  const before = process.cpuUsage();
  runModel(model);
  const { user, system } = process.cpuUsage(before);
  return (user + system) / 1e6;
}

/** What nothing reads draws nothing: the same runs, to the last animal. */
function sameRuns(model) {
  const told = ({ abundance, outcomes }) => JSON.stringify([abundance, outcomes]);
  return told(runModel(model)) === told(runModel(base));
}

const ratios = cases.map(() => []);
for (const [, model] of cases) seconds(model);
for (let round = 0; round < rounds; round++) {
  // From another case on in each round, so that none always comes after the same one.
  for (let k = 0; k < cases.length; k++) {
    const i = (k + round) % cases.length;
    const before = seconds(base);
    const own = seconds(cases[i][1]);
    ratios[i].push((2 * own) / (before + seconds(base)));
  }
}

function quantile(values, share) {
  const sorted = values.toSorted((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))];
}

console.log(`Processor time of a run as a multiple of that of the model, ${rounds} rounds, Node ${process.version}`);
console.log(`${''.padEnd(46)} median   middle half    same runs`);
cases.forEach(([what, model], i) => {
  const [low, middle, high] = [0.25, 0.5, 0.75].map((share) => quantile(ratios[i], share).toFixed(3));
  console.log(`${what.padEnd(46)}  ${middle}   ${low} to ${high}  ${sameRuns(model) ? 'yes' : 'no'}`);
});
