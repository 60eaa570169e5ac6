// Whether births that vary stay within what the distribution of litters can have.
import type { PatchNumbers, Response, Varied } from '../chance.ts';
import { fail, type Context } from '../context.ts';
import type { Phase } from '../model.ts';
import { distributionOf, numberAt } from './distribution.ts';

/** How far out, in SDs of the normal numbers, a rate must stay within its bounds; beyond it the kernel holds it to them. */
export const lookedAt = 4;

/** Rates that vary by themselves; what is worked out from parameters is looked at with its bounds. */
export function refuseBeyondLitters(context: Context, phases: readonly Phase[], varied: readonly Varied[]): void {
  for (const one of varied) {
    const most = one.of.kind === 'rate' ? largestLitter(phases[one.of.phase], one.of.part) : Infinity;
    const patch = most === Infinity ? -1 : context.patches.findIndex((_, p) => highest(one, p) > most);
    if (patch < 0) continue;
    const births = Number(highest(one, patch).toPrecision(4));
    fail(context, 'impossible-variation', ['variation'], {
      message: `In a rare year ${one.name} in ${context.patches[patch]?.name ?? ''} is ${births}, more than the largest litter of ${most}`,
      part: 'key',
      details: {
        expected: `at most ${most}`,
        reason: `Where the underlying normal number is ${lookedAt} standard deviations out.`,
        fix: 'Make the variation smaller, choose another shape, or give a larger litter or another distribution of litters.',
      },
    });
  }
}

/** The most young of one animal in this part of a phase. */
export function largestLitter(phase: Phase | undefined, part: Response['part']): number {
  const offspring = phase?.kind === 'breeding' && part === 'births' ? phase.offspring : undefined;
  return offspring?.by === 'binomial' ? offspring.largest : Infinity;
}

function highest({ shape, mean, sd }: Varied, patch: number): number {
  const at = (numbers: PatchNumbers, epoch: number): number => numbers.epochs[epoch]?.[patch] ?? 0;
  return Math.max(
    ...mean.epochs.map((_, epoch) => {
      const found = distributionOf(shape, { mean: at(mean, epoch), sd: at(sd, epoch) });
      return found === null ? 0 : numberAt(found, lookedAt);
    }),
  );
}
