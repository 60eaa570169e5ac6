// How many futures it takes to know the difference in risk between two plans to one percentage point: under common chance, with
// chance of their own, and at the least that any pairing could need; and how long that takes here and in NumPy, where each plan is
// run by itself. The flagship; both must agree on both risks before any time counts.
import { spawn } from 'node:child_process';
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { comparePlans } from '../../src/compare/compare.ts';
import type { PlanToRun } from '../../src/compare/plan.ts';
import { plansOf } from '../../src/compare/plans-of.ts';
import { runPlans } from '../../src/compare/run-plans.ts';
import { alone } from '../../src/threads/alone.ts';
import { median, meanOf } from './measure.ts';
import type { Options } from './options.ts';
import { planNumbers } from './plan-numbers.ts';
import { runBaseline, script, work } from './tools.ts';
import { compileText } from './workload.ts';

const file = 'models/reed-hare.yaml';
const z = 1.959963984540054;
const wanted = 0.01;
/** Differences for which the bench speaks; and standard errors that two risks may lie apart. */
const [least, most, apartAtMost] = [0.03, 0.08, 4.9];

export interface PlanFutures {
  readonly plans: string;
  readonly difference: number;
  /** Futures of each plan until the 95 % interval reaches one percentage point to either side. */
  readonly common: number;
  readonly apart: number;
  /** With all of the smaller risk within the larger one: no pairing needs fewer. */
  readonly fewest: number;
  /** Seconds for so many futures of both plans; null where there is no NumPy. */
  readonly seconds: PlanSeconds | null;
}

export interface PlanSeconds {
  /** Of the processor, in the run itself: `common` futures here, `apart` in NumPy. */
  readonly ours: number;
  readonly numpy: number;
  /** Of the clock, as whole processes: one command in two threads, and two processes side by side. */
  readonly command: number;
  readonly processes: number;
}

export async function measurePlans({ quick, rounds }: Options): Promise<readonly PlanFutures[]> {
  const pilot = quick ? 2000 : 8000;
  const all = plansIn(pilot);
  const run = await runPlans(alone, all);
  if (run === null) throw new Error('Nothing was run.');
  const none = { hash: '', money: null, moves: [], robustness: [], cautions: [] };
  const { differences, scenarios, objectives } = comparePlans({ run, ...none });
  const found: PlanFutures[] = [];
  for (const { from, to, estimate: d, futures: paired, outcome } of differences) {
    if (outcome !== objectives[0]?.name || paired === null || Math.abs(d) < least || Math.abs(d) > most) continue;
    const [p = NaN, q = NaN] = [from, to].map((name) => riskOf(scenarios, name));
    const futures = (variance: number): number => Math.ceil((z * z * variance) / (wanted * wanted));
    const common = futures((paired.onlyFrom + paired.onlyTo) / pilot - d * d);
    const apart = futures(p * (1 - p) + q * (1 - q));
    const risks = { [from]: { risk: p, futures: pilot }, [to]: { risk: q, futures: pilot } };
    const seconds = await secondsOf({ risks, common, apart, rounds });
    found.push({
      plans: `${from} / ${to}`,
      difference: d,
      common,
      apart,
      fewest: futures(Math.abs(d) - d * d),
      seconds,
    });
  }
  return found;
}

function plansIn(replicates: number): readonly PlanToRun[] {
  return plansOf(compileText(readFileSync(file, 'utf8'), { settings: { replicates } }).spec).plans ?? [];
}

function riskOf(scenarios: readonly { name: string; outcomes: readonly { probability: number }[] }[], name: string) {
  return scenarios.find((one) => one.name === name)?.outcomes[0]?.probability ?? NaN;
}

interface Asked {
  readonly risks: Readonly<Record<string, { readonly risk: number; readonly futures: number }>>;
  readonly common: number;
  readonly apart: number;
  readonly rounds: number;
}

async function secondsOf({ risks, common, apart, rounds }: Asked): Promise<PlanSeconds | null> {
  const numpy = script('plan.py');
  if (numpy === null) return null;
  const names = Object.keys(risks);
  const plans = plansIn(common).filter(({ name }) => names.includes(name));
  mkdirSync(work, { recursive: true });
  const baselines = plans.map(({ compiled }, k): readonly string[] => {
    const target = join(work, `plan-${k}.json`);
    writeFileSync(target, planNumbers(compiled));
    return [...numpy, target, String(apart), String(k + 1)];
  });
  const times = { ours: [] as number[], numpy: [] as number[], command: [] as number[], processes: [] as number[] };
  await runPlans(alone, plans);
  for (let round = 0; round < Math.min(rounds, 3); round++) {
    const before = process.cpuUsage();
    await runPlans(alone, plans);
    const { user, system } = process.cpuUsage(before);
    times.ours.push((user + system) / 1e6);
    const told = baselines.map((words) => runBaseline(words));
    told.forEach(({ numbers }, k) => refuseOther(numbers, risks[plans[k]?.name ?? '']));
    times.numpy.push(told.reduce((sum, one) => sum + one.seconds, 0));
    times.processes.push(await wallSeconds(baselines));
    const only = names.flatMap((name) => ['--only', name]);
    const words = ['compare', file, ...only, '--replicates', String(common), '--threads', '2', '--quiet'];
    times.command.push(await wallSeconds([[process.execPath, 'bin/skein.cjs', ...words]]));
  }
  return {
    ours: median(times.ours),
    numpy: median(times.numpy),
    command: median(times.command),
    processes: median(times.processes),
  };
}

/** Errors: throws where the risk is another one than ours. */
function refuseOther(
  numbers: readonly number[],
  ours: { readonly risk: number; readonly futures: number } | undefined,
) {
  const { mean, error } = meanOf(numbers);
  const { risk = NaN, futures = NaN } = ours ?? {};
  const apart = Math.abs(mean - risk) / Math.hypot(error, Math.sqrt((risk * (1 - risk)) / futures));
  if (!(apart < apartAtMost)) {
    throw new Error(`NumPy finds a risk of ${mean} against ${risk}, ${apart.toFixed(1)} standard errors apart.`);
  }
}

/** From the start of all commands, side by side, to the end of the last. */
async function wallSeconds(commands: readonly (readonly string[])[]): Promise<number> {
  const began = performance.now();
  await Promise.all(
    commands.map(
      ([command = '', ...words]) =>
        new Promise<void>((done, failed) => {
          const env = { ...process.env, OPENBLAS_NUM_THREADS: '1', OMP_NUM_THREADS: '1' };
          spawn(command, words, { stdio: 'ignore', env })
            .on('error', failed)
            .on('exit', (code) => {
              if (code === 0) done();
              else failed(new Error(`${command} ${words.join(' ')} ended with ${String(code)}.`));
            });
        }),
    ),
  );
  return (performance.now() - began) / 1000;
}
