// Counts of the fixture: growth with crowding, and luck that is partly that of all patches.
import { futures, sites, steps } from './fixture-model.ts';
import { seeded } from './random.ts';

/** Counts by run, count and patch. */
export function toy(growth: number): number[][][] {
  const next = seeded(7);
  const noise = () => (next() + next() + next() + next() - 2) * 0.62;
  return Array.from({ length: futures }, () => {
    let state = sites.map((site) => Math.round(site.capacity * 0.52));
    const path = [state];
    for (let t = 0; t < steps; t++) {
      const common = noise();
      const total = state.reduce((a, b) => a + b, 0);
      state = state.map((n, p) => {
        const crowd = 1.24 / (1 + 0.3 * (n / sites[p]!.capacity));
        const kept = n * crowd * growth * Math.exp(0.6 * common + 0.4 * noise() - 0.08) * 0.94;
        return Math.floor(kept + 0.006 * total * Math.sqrt(sites[p]!.capacity / 100) + next() * 0.98);
      });
      path.push(state);
    }
    return path;
  });
}
