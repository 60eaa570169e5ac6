// Movement from a table of shares: the chances of those that leave are the shares over their sum.
import type { Model } from '../model/model.ts';
import type { Movement } from './landscape.ts';

export function sharesMovement(model: Model, shares: Float64Array): Movement {
  const count = model.patches.length;
  const start = new Int32Array(count + 1);
  const destinations: number[] = [];
  const chance: number[] = [];
  for (let from = 0; from < count; from++) {
    let sum = 0;
    for (let to = 0; to < count; to++) sum += shares[to * count + from] ?? 0;
    for (let to = 0; to < count; to++) {
      const share = shares[to * count + from] ?? 0;
      if (share <= 0) continue;
      destinations.push(to);
      chance.push(share / sum);
    }
    start[from + 1] = destinations.length;
  }
  return { start, destinations: Int32Array.from(destinations), chance: Float64Array.from(chance), lengthKm: null };
}
