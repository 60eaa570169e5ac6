// npm run bench: figures to read, asserted nowhere but for agreement on the answer, without which no time counts.
import { mkdirSync, writeFileSync } from 'node:fs';
import { cpus } from 'node:os';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { compareAnimals, compareCourses } from './animals.ts';
import { measureFlagship } from './flagship.ts';
import { measureLargest, measureLosses } from './landscapes.ts';
import { measureLarge } from './large.ts';
import { compareSweep, compareSweepInTwo } from './growth-sweep.ts';
import { compareLifeCycles } from './many.ts';
import type { Comparison, Options } from './options.ts';
import { comparePaths } from './path.ts';
import { measurePlans } from './plans.ts';
import { plotScaling } from './plot.ts';
import { measurePlanPoints } from './plan-points.ts';
import { measureScaling } from './scaling.ts';
import { measureStart, measureThreads } from './start.ts';
import { measureSweeps } from './sweeps.ts';
import { missingTools, work } from './tools.ts';

const comparisons: Readonly<Record<string, (options: Options) => Comparison>> = {
  w1: (options) => ({ ...comparePaths(options), floors: { 'C, same width': 1.5, 'C, widest': 0.7, NumPy: 10 } }),
  w2: (options) => ({
    ...compareCourses('w2', options),
    floors: { 'C, same width': 0.85, 'C, widest': 0.2, NumPy: 4.5 },
  }),
  w3: (options) => ({
    ...compareAnimals('w3', options),
    floors: { 'C, same width': 0.95, 'C, widest': 0.5, NumPy: 3.5 },
  }),
  w4: (options) => ({ ...compareAnimals('w4', options), floors: { 'C, same width': 1, 'C, widest': 0.5, NumPy: 3 } }),
  lifecycles: compareLifeCycles,
  sweep: compareSweep,
  'sweep-in-two': compareSweepInTwo,
};
const others = ['flagship', 'sweeps', 'plans', 'start', 'threads', 'large', 'landscapes', 'scaling'];

const { values, positionals } = parseArgs({
  allowPositionals: true,
  options: { quick: { type: 'boolean', default: false }, rounds: { type: 'string' }, out: { type: 'string' } },
});
const options: Options = { quick: values.quick, rounds: Number(values.rounds ?? (values.quick ? 3 : 7)) };
const known = [...Object.keys(comparisons), ...others];
const unknown = positionals.find((name) => !known.includes(name));
if (unknown !== undefined || !(options.rounds >= 1)) {
  console.error(`Benches are ${known.join(', ')}; --rounds takes a number from 1.`);
  process.exit(2);
}
const chosen = new Set(positionals.length === 0 ? known : positionals);
const report: Record<string, unknown> = {
  format: 'skein-bench/1',
  node: process.version,
  processor: cpus()[0]?.model ?? 'unknown',
  ...options,
};

const compared: Comparison[] = [];
for (const [name, compare] of Object.entries(comparisons)) {
  if (!chosen.has(name)) continue;
  console.error(`${name} ...`);
  const found = compare(options);
  compared.push(found);
  printComparison(found);
}
report['comparisons'] = compared;

if (chosen.has('flagship')) {
  const times = measureFlagship(options);
  report['flagship'] = times;
  console.log(
    `The flagship, 1000 replicates of 50 years: compiled in ${ms(times.compile)}, run in ${ms(times.run)}, whole command ${ms(times.command)}`,
  );
}
if (chosen.has('sweeps')) {
  const sweeps = { ...measureSweeps(options), planPoints: measurePlanPoints(options) };
  report['sweeps'] = sweeps;
  const { runs, writing, memory } = sweeps;
  console.log(
    `${runs.points} points of 200 replicates of the flagship take ${runs.overKernel.toFixed(2)} times the kernel alone, aim 1.15`,
  );
  console.log(
    `${writing.rows} growth rates with their rows written take ${writing.parts.toFixed(2)} times those without, aim 1.10; ` +
      `with table and summary ${writing.all.toFixed(2)}`,
  );
  for (const { over, gain } of sweeps.planPoints)
    console.log(`Every plan of the flagship over ${over}: ${gain.toFixed(1)} times faster than compiled whole`);
  console.log(`A sweep of ${memory.points} points takes ${memory.megabytes.toFixed(0)} MB, aim 500`);
}
if (chosen.has('plans')) {
  const plans = await measurePlans(options);
  report['plans'] = plans;
  for (const { plans: names, difference, common, apart, fewest, seconds } of plans) {
    console.log(
      `${names}: ${(difference * 100).toFixed(1)} points apart, known to one point with ${common} futures each; with chance of their own ${apart} (${(apart / common).toFixed(1)} times as many, at best ${(apart / fewest).toFixed(1)})`,
    );
    if (seconds === null) continue;
    const { ours, numpy, command, processes } = seconds;
    console.log(
      `  in the run itself ${ours.toFixed(2)} s of the processor against ${numpy.toFixed(2)} s in NumPy: ${(numpy / ours).toFixed(1)} times faster, aim 12; whole processes on the clock ${command.toFixed(2)} s against ${processes.toFixed(2)} s: ${(processes / command).toFixed(1)} times`,
    );
  }
}
if (chosen.has('start')) {
  const { nothing, help, smallest } = measureStart(options);
  report['start'] = { nothing, help, smallest };
  console.log(
    `Above node -e 0 (${ms(nothing)}): skein --help ${ms(help - nothing)}, aim 60; run of the smallest model ${ms(smallest - nothing)}, aim 150`,
  );
}
if (chosen.has('threads')) {
  const gains = Object.fromEntries(['w3', 'w4'].map((name) => [name, measureThreads(name, options)]));
  report['threads'] = gains;
  for (const [name, gain] of Object.entries(gains))
    console.log(`Two threads against one, ${name.toUpperCase()}: ${gain.toFixed(2)} times, aim 1.9`);
}
if (chosen.has('large')) {
  const large = await measureLarge(options);
  report['large'] = large;
  const { seconds, memory, memoryReplicates, page, browser } = large;
  console.log(
    `400 patches x 6 classes x 100 years: 100 replicates in two threads ${seconds.toFixed(1)} s, aim 5; ` +
      `${memoryReplicates} replicates with quantiles ${memory.toFixed(0)} MB, aim 300; page ${page.toFixed(2)} MB, aim 5, ` +
      `shows the year that its slider is moved to ${ms(browser.opening)} after it was asked for, aim 1000; all controls work after ` +
      `${ms(browser.whole)}; nothing is answered for ${ms(browser.longest)} at most; another year is shown in ${ms(browser.step)}`,
  );
}
if (chosen.has('scaling')) {
  const scaling = measureScaling(options);
  report['scaling'] = scaling;
  for (const { over, points } of scaling) {
    console.log(
      `ns a cell over ${over}: ${points.map(({ at, nanosecondsACell }) => `${at} ${nanosecondsACell.toFixed(0)}`).join(', ')}`,
    );
  }
  mkdirSync(work, { recursive: true });
  writeFileSync(join(work, 'scaling.svg'), plotScaling(scaling));
  console.log(`The plot: ${join(work, 'scaling.svg')}`);
}

if (chosen.has('landscapes')) {
  const [losses, largest] = [measureLosses(options), measureLargest(options)];
  report['landscapes'] = { losses, largest };
  console.log(
    `${losses.patches} patches of 8 classes: all losses (${losses.links} links; ${losses.exact} losses exact) in ${losses.seconds.toFixed(1)} s, aim 5`,
  );
  console.log(
    `${largest.patches} patches of 8 classes: read ${largest.read.toFixed(1)} s, compiled ${largest.compile.toFixed(1)} s, checked ${largest.check.toFixed(1)} s in all; ` +
      `growth and both vectors ${largest.vectors.toFixed(1)} s, aim 10`,
  );
}

report['missing'] = missingTools();
for (const told of missingTools()) console.log(`not compared: ${told}`);
mkdirSync(work, { recursive: true });
const target = values.out ?? join(work, 'bench.json');
writeFileSync(target, `${JSON.stringify(report, null, 2)}\n`);
console.log(`All of it as JSON: ${target}`);

function ms(value: number): string {
  return `${value.toFixed(1)} ms`;
}

function printComparison({ name, cells, seconds, agreement, floors = {} }: Comparison): void {
  console.log(name);
  const ours = seconds['skein'] ?? NaN;
  for (const [who, time] of Object.entries(seconds)) {
    const floor = floors[who] === undefined ? '' : `  floor ${floors[who]}`;
    console.log(
      `  ${who.padEnd(16)}${((time / cells) * 1e9).toFixed(1).padStart(12)} ns each  ${(time / ours).toFixed(2).padStart(8)} times ours${floor}`,
    );
  }
  for (const told of agreement) console.log(`  agreed: ${told}`);
}
