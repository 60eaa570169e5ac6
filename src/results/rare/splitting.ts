// Multilevel splitting with fixed effort (Garvels 2000; L'Ecuyer, Le Gland, Lezaud & Tuffin 2009) for the chance that a count
// ever lies below a threshold. The product of the shares that pass each level is an unbiased estimate of the chance, whatever
// the levels; independent repeats of the whole tell how far it can be off.
import { keyOfName } from '../../compile/image/keys.ts';
import { Trials, type Entrance } from '../../kernel/trials.ts';
import { seedOf } from '../../machine/random.ts';
import type { Model, OutcomeRule } from '../../model/model.ts';
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
    const below = thresholdOf(rule);
    if (below === null) {
      results.push(none(rule, 'splitting holds for a count that ever lies below a number, at a single count'));
      continue;
    }
    results.push(yield* splitting(runner, { model, rule, outcome, below, told }));
  }
  return results;
}

/** Null where splitting does not hold. */
function thresholdOf({ event, counts }: Pick<OutcomeRule, 'event' | 'counts'>): number | null {
  return event.is === 'below' && counts === 1 ? event.than : null;
}

interface Request {
  readonly model: Model;
  readonly rule: OutcomeRule;
  readonly outcome: number;
  readonly below: number;
  readonly told: (share: number) => number;
}

function* splitting(runner: Trials, request: Request): Generator<number, RareResult> {
  const { model, rule, outcome, below, told } = request;
  const { steps, seed } = model;
  const trials = Math.max(fewestTrials, Math.min(mostTrials, model.replicates));
  const key = keyOfName(rule.name);
  const pilotSeed = seedOf({ seed, words: [key, 0, ofPilot] });
  const pilot = pilotLevels(runner, { outcome, below, steps, seed: pilotSeed, trials });
  if (pilot.stopped > 0) return none(rule, 'some runs had to be stopped with too many animals');
  const { levels } = pilot;
  if (levels === null) return none(rule, 'the numbers do not fall level by level, so that nothing can be split');
  let replicateYears = pilot.replicateYears;
  const estimates: number[] = [];
  const passed = levels.map(() => 0);
  for (let repeat = 0; repeat < repeats; repeat++) {
    const own = seedOf({ seed, words: [key, repeat, ofRepeats] });
    const done = oneRepeat(runner, { levels, outcome, steps, seed: own, trials });
    if (done.stopped > 0) return none(rule, 'some runs had to be stopped with too many animals');
    done.shares.forEach((share, k) => (passed[k] = (passed[k] ?? 0) + share / repeats));
    estimates.push(done.shares.length < levels.length ? 0 : done.shares.reduce((product, share) => product * share, 1));
    replicateYears += done.replicateYears;
    yield told((repeat + 1) / repeats);
  }
  return resultOf(rule, { estimates, levels, passed, trials, replicateYears });
}

interface RepeatRequest {
  readonly levels: readonly number[];
  readonly outcome: number;
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

export function oneRepeat(runner: Trials, { levels, outcome, steps, seed, trials }: RepeatRequest): Repeat {
  const shares: number[] = [];
  let entrances: readonly Entrance[] = [atStart];
  let [replicateYears, stopped] = [0, 0];
  for (const [stage, level] of levels.entries()) {
    const chosen = assigned(entrances, { trials, seed, words: [stage, outcome] });
    const done = runner.run(chosen, { level, outcome, steps, seed, firstReplicate: stage * trials });
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
  readonly passed: readonly number[];
  readonly trials: number;
  readonly replicateYears: number;
}

function resultOf(rule: OutcomeRule, { estimates, levels, passed, trials, replicateYears }: Estimates): RareResult {
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
    levels: levels.map((level, k) => ({ below: level, passed: passed[k] ?? 0 })),
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
