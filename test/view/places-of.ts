import type { Place } from '../../src/view/path.ts';

/** The places that a path of one small m stands for. */
export function placesOf(path: string): readonly Place[] {
  const numbers = (path.match(/-?(\d+\.?\d*|\.\d+)/g) ?? []).map(Number);
  const places: Place[] = [];
  let [x, y] = [0, 0];
  for (let i = 0; i < numbers.length; i += 2) {
    [x, y] = [x + numbers[i]!, y + numbers[i + 1]!];
    places.push([x, y]);
  }
  return places;
}
