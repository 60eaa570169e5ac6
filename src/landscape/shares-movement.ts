// Movement from a table of shares: the chances of those that leave are the shares over their sum.
import type { DispersalPhase, Model } from '../model/model.ts';
import type { Movement } from './landscape.ts';
import { crossLinks } from './links.ts';
import { movementOf } from './ways.ts';

export function sharesMovement(model: Model, phase: DispersalPhase, shares: Float64Array): Movement {
  const count = model.patches.length;
  return movementOf(
    model.patches.map((_, from) => {
      const own = model.patches.map((_patch, to) => shares[to * count + from] ?? 0);
      const sum = own.reduce((total, share) => total + share, 0);
      const open = own.flatMap((share, to) =>
        share > 0 ? [{ to, chance: share / sum, arriving: share / sum, km: null }] : [],
      );
      return crossLinks(phase, from, open);
    }),
  );
}
