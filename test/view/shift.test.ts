// Shifted places lie in the ring that is told, evenly around, and depend on the key and the name alone.
import { expect, test } from 'vitest';
import type { Patch } from '../../src/model/model.ts';
import { shiftPlaces } from '../../src/report/hiding/shift.ts';

const key = (byte: number) => new Uint8Array(32).fill(byte);

/** On a square grid of so many kilometres. */
function grid(side: number, km: number): readonly Patch[] {
  return Array.from({ length: side * side }, (_, i): Patch => {
    const at = [(i % side) * km, Math.floor(i / side) * km] as const;
    return { name: `patch ${i}`, at, areaKm2: null, capacity: null, fileOrder: i };
  });
}

test('each patch is moved by what the ring says, in all directions alike', () => {
  const patches = grid(30, 6);
  const { places, ring } = shiftPlaces(patches, key(1));
  expect(ring).toEqual({ leastKm: 3, mostKm: 6 });
  const moves = places.map((place, i) => [place![0] - patches[i]!.at![0], place![1] - patches[i]!.at![1]] as const);
  // The whole is centred: its own displacement is the mean of what is left, but for the mean of 900 moves (0.1 km each way).
  const [dx, dy] = [0, 1].map((k) => moves.reduce((sum, move) => sum + move[k]!, 0) / moves.length) as [number, number];
  const lengths = moves.map(([x, y]) => Math.hypot(x - dx, y - dy));
  expect(Math.min(...lengths)).toBeGreaterThan(3 - 0.7);
  expect(Math.max(...lengths)).toBeLessThan(6 + 0.7);
  // Evenly over the area: half lie beyond the radius that halves it (√22.5 = 4.74 km); 900 patches miss 450 by less than 75.
  const beyond = lengths.filter((length) => length > Math.sqrt(22.5)).length;
  expect(Math.abs(beyond - 450)).toBeLessThan(75);
  const east = moves.filter(([x]) => x > dx).length;
  expect(Math.abs(east - 450)).toBeLessThan(75);
});

test('the middle of all says nothing: it is 0', () => {
  const { places } = shiftPlaces(grid(5, 40), key(2));
  for (const k of [0, 1]) expect(Math.abs(places.reduce((sum, place) => sum + place![k]!, 0) / 25)).toBeLessThan(0.01);
});

test('another key or another name moves elsewhere; other patches, other places and their order change no direction', () => {
  const one = shiftPlaces(grid(3, 10), key(3)).places;
  expect(shiftPlaces(grid(3, 10), key(3)).places).toEqual(one);
  expect(shiftPlaces(grid(3, 10), key(4)).places).not.toEqual(one);
  const renamed = grid(3, 10).map((patch, i) => (i === 4 ? { ...patch, name: 'another' } : patch));
  expect(shiftPlaces(renamed, key(3)).places[4]).not.toEqual(one[4]);
});

test('patches close together are moved by a kilometre at least, a single one too', () => {
  expect(shiftPlaces(grid(4, 0.05), key(5)).ring).toEqual({ leastKm: 1, mostKm: 2 });
  expect(shiftPlaces(grid(1, 1), key(5))).toEqual({ ring: { leastKm: 1, mostKm: 2 }, places: [[0, 0]] });
});
