// Multilevel splitting with fixed effort (Garvels 2000; L'Ecuyer, Le Gland, Lezaud & Tuffin 2009) for the chance that a count
// ever lies below a threshold, or above it. The product of the shares that pass each level is an unbiased estimate of the chance, whatever
// the levels; independent repeats of the whole tell how far it can be off.
import { keyOfName } from '../../compile/image/keys.ts';
import { Trials, type Entrance } from '../../kernel/trials.ts';
import { seedOf } from '../../machine/random.ts';
import type { Model, OutcomeRule } from '../../model/model.ts';
import { leftAfterFall } from '../reduction/hits.ts';
import type { RareResult } from '../results.ts';
import { assigned } from './assign.ts';
import { atStart, pilotLevels } from './levels.ts';

/** Repeats, and Student's t for 0.975 with one degree of freedom less. */
const repeats = 24;
const student = 2.068658;

/** Of a level: the replicates of the model within these. */
const fewestTrials = 100;
const mostTrials = 10_000;

const ofPilot = keyOfName('pilot of splitting');
const ofRepeats = keyOfName('repeats of splitting');

/** One result an outcome; yields after each repeat how much of the work is done, from 0 to 1. */
export function* rareResults(model: Model, image: ArrayBuffer): Generator<number, readonly RareResult[]> {
  const results: RareResult[] = [];
  const runner = new Trials(image);
  for (const [outcome, rule] of model.outcomes.entries()) {
    const told = (share: number): number => (outcome + share) / model.outcomes.length;
    const threshold = thresholdOf(rule, () => runner.startCount(outcome));
    if (threshold.reason === null) results.push(yield* splitting(runner, { model, rule, outcome, ...threshold, told }));
    else results.push(none(rule, threshold.reason));
  }
  return results;
}

interface Threshold {
  readonly below: number;
  readonly rising: boolean;
  readonly reason: null;
}

/** A fall is one below a number, as the start is the same in all runs; a rise is one of −N. */
function thresholdOf(
  { event, counts }: Pick<OutcomeRule, 'event' | 'counts'>,
  startCount: () => number,
): Threshold | { readonly reason: string } {
  if (counts > 1) return { reason: 'futures cannot come level by level to so many counts one after the other' };
  if (event.is === 'fallen') {
    const start = startCount();
    if (start === 0) return { reason: 'nobody who is counted is there at the start, so there can be no fall' };
    return { below: justAbove(leftAfterFall(start, event.by)), rising: false, reason: null };
  }
  const rising = event.is === 'above';
  return { below: rising ? -event.than : event.than, rising, reason: null };
}

/** To have fallen is to be at this or below it. */
function justAbove(value: number): number {
  return value + Math.max(Number.MIN_VALUE, value * Number.EPSILON);
}

interface Request {
  readonly model: Model;
  readonly rule: OutcomeRule;
  readonly outcome: number;
  readonly below: number;
  readonly rising: boolean;
  readonly told: (share: number) => number;
}

function* splitting(runner: Trials, request: Request): Generator<number, RareResult> {
  const { model, rule, outcome, below, rising, told } = request;
  const { steps, seed } = model;
  const trials = Math.max(fewestTrials, Math.min(mostTrials, model.replicates));
  const key = keyOfName(rule.name);
  const pilotSeed = seedOf({ seed, words: [key, 0, ofPilot] });
  const pilot = pilotLevels(runner, { outcome, below, rising, steps, seed: pilotSeed, trials });
  if (pilot.stopped > 0) return none(rule, 'some runs had to be stopped with too many animals');
  const { levels } = pilot;
  if (levels === null) {
    return none(rule, `the numbers do not ${rising ? 'rise' : 'fall'} level by level, so that nothing can be split`);
  }
  let replicateYears = pilot.replicateYears;
  const estimates: number[] = [];
  const passed = levels.map(() => 0);
  for (let repeat = 0; repeat < repeats; repeat++) {
    const own = seedOf({ seed, words: [key, repeat, ofRepeats] });
    const done = oneRepeat(runner, { levels, outcome, rising, steps, seed: own, trials });
    if (done.stopped > 0) return none(rule, 'some runs had to be stopped with too many animals');
    done.shares.forEach((share, k) => (passed[k] = (passed[k] ?? 0) + share / repeats));
    estimates.push(done.shares.length < levels.length ? 0 : done.shares.reduce((product, share) => product * share, 1));
    replicateYears += done.replicateYears;
    yield told((repeat + 1) / repeats);
  }
  return resultOf(rule, { estimates, levels, rising, passed, trials, replicateYears });
}

interface RepeatRequest {
  readonly levels: readonly number[];
  readonly outcome: number;
  readonly rising?: boolean;
  readonly steps: number;
  readonly seed: number;
  readonly trials: number;
}

interface Repeat {
  /** Shares that passed each level, up to the first that none passed. */
  readonly shares: readonly number[];
  readonly replicateYears: number;
  readonly stopped: number;
}

export function oneRepeat(runner: Trials, request: RepeatRequest): Repeat {
  const { levels, outcome, rising = false, steps, seed, trials } = request;
  const shares: number[] = [];
  let entrances: readonly Entrance[] = [atStart];
  let [replicateYears, stopped] = [0, 0];
  for (const [stage, level] of levels.entries()) {
    const chosen = assigned(entrances, { trials, seed, words: [stage, outcome] });
    const done = runner.run(chosen, { level, outcome, rising, steps, seed, firstReplicate: stage * trials });
    replicateYears += done.replicateYears;
    stopped += done.stopped;
    if (done.hits.length === 0) break;
    shares.push(done.hits.length / trials);
    entrances = done.hits;
  }
  return { shares, replicateYears, stopped };
}

interface Estimates {
  readonly estimates: readonly number[];
  readonly levels: readonly number[];
  readonly rising: boolean;
  readonly passed: readonly number[];
  readonly trials: number;
  readonly replicateYears: number;
}

function resultOf(rule: OutcomeRule, found: Estimates): RareResult {
  const { estimates, levels, rising, passed, trials, replicateYears } = found;
  const n = estimates.length;
  const probability = estimates.reduce((a, b) => a + b, 0) / n;
  if (probability === 0) return none(rule, 'no repeat came to it; give it more replicates');
  const squares = estimates.reduce((sum, one) => sum + (one - probability) * (one - probability), 0);
  const standardError = Math.sqrt(squares / (n - 1) / n);
  return {
    outcome: rule.name,
    definition: rule.definition,
    reason: null,
    probability,
    standardError,
    interval: {
      lower: Math.max(0, probability - student * standardError),
      upper: Math.min(1, probability + student * standardError),
      level: 0.95,
      method: `multilevel splitting, Student's t over ${n} repeats`,
      from: 'the number of runs',
    },
    levels: levels.map((level, k) => ({ ...(rising ? { above: -level } : { below: level }), passed: passed[k] ?? 0 })),
    repeats: n,
    trials,
    replicateYears,
  };
}

function none({ name, definition }: OutcomeRule, reason: string): RareResult {
  return {
    outcome: name,
    definition,
    reason,
    probability: null,
    standardError: null,
    interval: null,
    levels: [],
    repeats: 0,
    trials: 0,
    replicateYears: 0,
  };
}
