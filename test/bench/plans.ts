// How many futures it takes to know the difference in risk between two plans to one percentage point: under common chance, with
// chance of their own, and at the least that any pairing could need; and how long that takes in the process.
import { readFileSync } from 'node:fs';
import { comparePlans } from '../../src/compare/compare.ts';
import { plansOf } from '../../src/compare/plans-of.ts';
import { runPlans } from '../../src/compare/run-plans.ts';
import { alone } from '../../src/threads/alone.ts';
import { compileText } from './workload.ts';
import type { Options } from './options.ts';

const file = 'models/reed-hare.yaml';
const z = 1.959963984540054;
const wanted = 0.01;

export interface PlanFutures {
  readonly plans: string;
  readonly difference: number;
  /** Futures of each plan until the 95 % interval reaches one percentage point to either side. */
  readonly common: number;
  readonly apart: number;
  /** With all of the smaller risk within the larger one: no pairing needs fewer. */
  readonly fewest: number;
  /** Processor milliseconds for `common` futures of both plans, in one thread. */
  readonly milliseconds: number;
}

export async function measurePlans({ quick }: Options): Promise<readonly PlanFutures[]> {
  const replicates = quick ? 1000 : 8000;
  const { spec } = compileText(readFileSync(file, 'utf8'), { replicates });
  const all = plansOf(spec).plans ?? [];
  const [now, ...others] = all;
  const found: PlanFutures[] = [];
  for (const plan of others) {
    if (now === undefined) break;
    const before = process.cpuUsage();
    const run = await runPlans(alone, [now, plan]);
    const { user, system } = process.cpuUsage(before);
    if (run === null) continue;
    const none = { hash: '', money: null, moves: [], robustness: [], cautions: [] };
    const { differences, scenarios } = comparePlans({ run, ...none });
    const [first] = differences;
    const [p = NaN, q = NaN] = scenarios.map(({ outcomes }) => outcomes[0]?.probability);
    if (first?.futures === null || first === undefined) continue;
    const d = q - p;
    const discordant = (first.futures.onlyFrom + first.futures.onlyTo) / replicates;
    const futures = (variance: number): number => Math.ceil((z * z * variance) / (wanted * wanted));
    const common = futures(discordant - d * d);
    found.push({
      plans: `${now.name} / ${plan.name}`,
      difference: d,
      common,
      apart: futures(p * (1 - p) + q * (1 - q)),
      fewest: futures(Math.abs(d) - d * d),
      milliseconds: ((user + system) / 1000 / replicates) * common,
    });
  }
  return found;
}
