// From animals moved so far to animals moved in each step.
import type { Moved } from './output.ts';

/** `soFar` holds step t at t * ways, step 0 first. */
export function eachStep(soFar: Float64Array<ArrayBuffer>, ways: number): Moved {
  const animals = soFar.slice(ways);
  for (let i = 0; i < animals.length; i++) animals[i] = (animals[i] ?? 0) - (soFar[i] ?? 0);
  return { ways, animals };
}
