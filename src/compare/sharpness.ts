// How sharp the differences between plans are so far: half the width of the widest interval from the number of runs.
import type { Model } from '../model/model.ts';
import type { ReachedPrecision } from '../results/results.ts';
import { shareDifferenceFromRuns } from './over-draws.ts';
import { countPairs, pairedShareDifference } from './paired-share.ts';
import type { DrawPlaces, OpenPlan } from './plans-run.ts';

export interface SoFar {
  readonly futures: number;
  /** Empty where nothing is drawn. */
  readonly draws: DrawPlaces;
}

/** Over the chances of all outcomes, between any two plans; null where no precision was asked for. */
export function precisionSoFar(model: Model, plans: readonly OpenPlan[], soFar: SoFar): ReachedPrecision | null {
  const { precision } = model;
  if (precision === undefined) return null;
  const { halfWidth: asked, atMost } = precision;
  const halfWidth = widestHalf(model, plans, soFar);
  return { asked, halfWidth, reached: halfWidth <= asked, atMost };
}

function widestHalf({ outcomes }: Model, plans: readonly OpenPlan[], { futures, draws }: SoFar): number {
  const ended = Uint8Array.from({ length: futures }, (_, i) =>
    plans.every(({ ledger }) => ledger.ended[i] === 1) ? 1 : 0,
  );
  let widest = 0;
  outcomes.forEach((_, k) => {
    const hits = plans.map(({ reduction }) =>
      Uint8Array.from(reduction.hits[k]?.first.subarray(0, futures) ?? [], (count) => (count > 0 ? 1 : 0)),
    );
    hits.forEach((from, i) => {
      for (const to of hits.slice(i + 1)) {
        const counts = (first: number, many: number) =>
          countPairs(
            from.subarray(first, first + many),
            to.subarray(first, first + many),
            ended.subarray(first, first + many),
          );
        const { lower, upper } =
          draws.length === 0
            ? pairedShareDifference(counts(0, futures))
            : shareDifferenceFromRuns(draws.map((draw) => counts(draw.first, draw.futures)));
        widest = Math.max(widest, (upper - lower) / 2);
      }
    });
  });
  return widest;
}
