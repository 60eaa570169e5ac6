// How often a model is run, under which seed, and how precise its chances are to be.
import { fail, type Context } from './context.ts';
import type { Model, Precision } from './model.ts';

const defaultReplicates = 1000;
const defaultSeed = 1;
const defaultAtMost = 100_000;

export function runSettings(context: Context): Pick<Model, 'replicates' | 'seed' | 'draws' | 'precision' | 'rare'> {
  const { spec, defaults } = context;
  const { seed, draws = 0, replicates = defaultReplicates } = spec.run ?? {};
  if (spec.run?.replicates === undefined) defaults.push(`A run has ${defaultReplicates} replicates.`);
  if (seed === undefined) defaults.push(`The seed is ${defaultSeed}.`);
  const precision = precisionOf(context, replicates * Math.max(1, draws));
  return {
    replicates,
    seed: seed ?? defaultSeed,
    draws,
    ...(precision === null ? {} : { precision }),
    ...(rareAsked(context) ? { rare: true } : {}),
  };
}

function rareAsked(context: Context): boolean {
  const { rare, draws = 0 } = context.spec.run ?? {};
  if (rare !== true) return false;
  const path = ['run', 'rare'];
  if (draws > 0) {
    fail(context, 'rare-shape', path, {
      message: 'Splitting is of one model, and `draws` makes many',
      part: 'key',
      details: {
        expected: 'either `rare` or `draws`',
        reason:
          'Over draws the rarest risks come from the draws with the worst numbers, which plain runs of each draw find.',
      },
    });
  }
  const rules = Object.values(context.spec.outcomes ?? {});
  if (!rules.some((rule) => rule.for === undefined)) {
    fail(context, 'rare-shape', path, {
      message: 'There is no outcome that can be split',
      part: 'key',
      details: {
        expected: 'an outcome without `for`',
        reason: 'Futures come level by level to a single count, not to several one after the other.',
      },
    });
  }
  return true;
}

function precisionOf(context: Context, first: number): Precision | null {
  const { precision: halfWidth, 'at-most': limit } = context.spec.run ?? {};
  if (halfWidth === undefined) return null;
  const path = ['run', 'precision'];
  if (Object.keys(context.spec.outcomes ?? {}).length === 0) {
    fail(context, 'precision-shape', path, {
      message: 'There is no outcome whose chance could be known so well',
      part: 'key',
      details: { expected: 'at least one outcome under `outcomes`' },
    });
  }
  if (limit === undefined) context.defaults.push(`A run ends after ${defaultAtMost} replicates, precise or not.`);
  const atMost = limit ?? defaultAtMost;
  if (atMost < first) {
    fail(context, 'precision-shape', limit === undefined ? path : ['run', 'at-most'], {
      message: 'The run would end before its first replicates are done',
      details: { found: String(atMost), expected: `at least ${first}, the replicates that are run first` },
    });
  }
  return { halfWidth, atMost };
}
