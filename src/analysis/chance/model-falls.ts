// Which outcomes are falls of freely drifting numbers, and how often they come in runs: what the diffusion curve is held against.
import type { AtState } from '../../compile/block-matrix.ts';
import { growingOnly } from '../../compile/handling.ts';
import { dependsOnMakeUp } from '../../compile/make-up.ts';
import type { Model, OutcomeRule } from '../../model/model.ts';
import { runModel, type CompiledModel } from '../../pipeline.ts';
import { yearsDiffer } from '../../results/long-run.ts';
import { because, type Answer } from '../answer.ts';
import type { SimulatedFall } from '../falling.ts';
import { dependsOnNumbers } from '../state-at.ts';

/** Class-years that the replicates may take: a second or two. */
const mostWork = 5e7;
const fewestReplicates = 100;

export interface FallsRequest {
  readonly at: AtState;
  /** Rates, ways or actions are not the same in every year. */
  readonly changesByYear: boolean;
  /** Of the matrix, as p * C + c. */
  readonly places: readonly number[];
}

/** The runs are those of `skein run` with the numbers as they are, or the first of them where all would take too long. */
export function modelFalls(compiled: CompiledModel, request: FallsRequest): Answer<readonly SimulatedFall[]> {
  const { model } = compiled;
  const reason = whyNot(model, request);
  if (reason !== null) return because(reason);
  const falls = model.outcomes.flatMap((rule, k) => (isFall(rule) ? [{ rule, k }] : []));
  if (falls.length === 0) return because('No outcome is that one count falls below a number.');
  const plain = { ...model, replicates: replicatesOf(model), draws: 0, precision: undefined, rare: undefined };
  const { outcomes, stopped } = runModel({ ...compiled, model: plain });
  if (stopped.runs > 0) return because('Some runs had to be stopped with too many animals.');
  return {
    value: falls.map(({ rule, k }) => {
      const counted = countedBy(rule, model, request.places);
      return {
        outcome: rule.name,
        definition: rule.definition,
        counted,
        threshold: thresholdOf(rule, { model, start: compiled.startAnimals }),
        replicates: plain.replicates,
        byYear: (outcomes[k]?.byYear ?? []).map(({ year, ever, lower, upper }) => ({ year, ever, lower, upper })),
      };
    }),
  };
}

function whyNot(model: Model, { at, changesByYear }: FallsRequest): string | null {
  if (at !== 'zero') return 'It is told near zero.';
  if (!yearsDiffer(model)) return 'Nothing differs from year to year, so the logarithm of numbers does not stray.';
  if (dependsOnNumbers(model))
    return 'Rates depend on numbers (crowding or a ceiling), so the logarithm of numbers does not drift freely; runs tell the chance.';
  if (dependsOnMakeUp(model))
    return 'Births depend on who meets whom, so the years are no products of matrices; runs tell the chance.';
  if (changesByYear)
    return 'Rates, ways or actions change with the year, so the drift is not the same in all; runs tell the chance.';
  if (!isLinear(model))
    return 'Animals are taken, moved or released by number, which no drift of the logarithm is; runs tell the chance.';
  return null;
}

function isLinear(model: Model): boolean {
  return (
    growingOnly(model) === model &&
    model.phases.every((phase) => (phase.kind === 'take' || phase.kind === 'move' ? phase.rule === 'share' : true))
  );
}

function isFall({ event, counts, over, weights }: OutcomeRule): boolean {
  const falls = event.is === 'below' ? event.than > 0 : event.is === 'fallen' && event.by < 1;
  return falls && counts === 1 && over === 'sum' && weights.length === 1;
}

function countedBy({ weights: [weights], patches }: OutcomeRule, { classes }: Model, places: readonly number[]) {
  const n = classes.length;
  return Float64Array.from(places, (place) => (patches[Math.floor(place / n)] === 1 ? (weights?.[place % n] ?? 0) : 0));
}

interface Started {
  readonly model: Model;
  readonly start: Float64Array;
}

function thresholdOf(rule: OutcomeRule, { model, start }: Started): number {
  const { event } = rule;
  if (event.is !== 'fallen') return event.than;
  const everywhere = Array.from(start, (_, place) => place);
  const counted = countedBy(rule, model, everywhere);
  return (1 - event.by) * counted.reduce((sum, weight, place) => sum + weight * (start[place] ?? 0), 0);
}

function replicatesOf({ replicates, patches, classes, steps }: Model): number {
  const pays = Math.floor(mostWork / (patches.length * classes.length * steps));
  return Math.min(replicates, Math.max(fewestReplicates, pays));
}
