// Where the leavers of the fixture end: a kernel over all patches within 9 km.
import type { Landscape } from '../../src/landscape/landscape.ts';
import { sites } from './fixture-model.ts';

export function fixtureLandscape(): Landscape {
  const km = (a: number, b: number) => Math.hypot(sites[a]!.at[0] - sites[b]!.at[0], sites[a]!.at[1] - sites[b]!.at[1]);
  const [start, destinations, chance, lengthKm] = [[0], [] as number[], [] as number[], [] as number[]];
  sites.forEach((_, from) => {
    const reached = sites.map((_, p) => p).filter((p) => p !== from && km(from, p) < 9);
    const weight = reached.map((p) => Math.sqrt(sites[p]!.capacity) * Math.exp(-km(from, p) / 2));
    const total = weight.reduce((a, b) => a + b, 0);
    reached.forEach((p, k) => {
      destinations.push(p);
      lengthKm.push(km(from, p));
      chance.push((weight[k]! / total) * Math.exp(-0.03 * km(from, p)));
    });
    start.push(destinations.length);
  });
  const movement = {
    start: Int32Array.from(start),
    destinations: Int32Array.from(destinations),
    chance: Float64Array.from(chance),
    lengthKm: Float64Array.from(lengthKm),
  };
  return { movements: [null, null, movement, null, null] };
}
