// Places that are moved so far that a nest cannot be found from them: each patch by itself, in any direction, by no less than
// one distance and no more than another (the ring of Hampton et al. 2010, Am J Epidemiol 172:1062). What decides the move is a
// secret key and the name of the patch, never the seed of the run: that stands in every report, and whoever knew it could move
// all patches back. With one key a patch is always moved alike, so that several reports cannot be averaged.
import { hmac } from '@noble/hashes/hmac.js';
import { sha256 } from '@noble/hashes/sha2.js';
import { utf8ToBytes } from '@noble/hashes/utils.js';
import type { Patch } from '../../model/model.ts';

type Point = readonly [number, number];

export interface Ring {
  readonly leastKm: number;
  readonly mostKm: number;
}

export interface Shifted {
  /** Kilometres around the middle of them all, to 10 m; null where the patch has no place. */
  readonly places: readonly (Point | null)[];
  readonly ring: Ring;
}

/** No patch is moved by less. */
const leastMoveKm = 1;

export function shiftPlaces(patches: readonly Patch[], key: Uint8Array): Shifted {
  const ring = ringFor(patches.flatMap(({ at }) => (at === null ? [] : [at])));
  const moved = patches.map(({ name, at }) => (at === null ? null : move(at, placeInRing(key, name), ring)));
  const [x0, y0] = middle(moved.flatMap((place) => (place === null ? [] : [place])));
  const round = (km: number): number => Math.round(km * 100) / 100 + 0;
  return { places: moved.map((place) => (place === null ? null : [round(place[0] - x0), round(place[1] - y0)])), ring };
}

/** At least half the way to the nearest other patch, as it is in the middle over the patches, so that places really change. */
function ringFor(places: readonly Point[]): Ring {
  const nearest = places.map((a, i) => {
    let least = Infinity;
    places.forEach((b, j) => {
      const [dx, dy] = [a[0] - b[0], a[1] - b[1]];
      if (i !== j) least = Math.min(least, Math.sqrt(dx * dx + dy * dy));
    });
    return least;
  });
  nearest.sort((a, b) => a - b);
  const usual = nearest[Math.floor(nearest.length / 2)] ?? 0;
  // Rounded, since it is told.
  const leastKm = Math.max(leastMoveKm, Number.isFinite(usual) ? Number((usual / 2).toPrecision(1)) : 0);
  return { leastKm, mostKm: 2 * leastKm };
}

function move([x, y]: Point, [u, v]: Point, { mostKm }: Ring): Point {
  return [x + mostKm * u, y + mostKm * v];
}

/**
 * A place in the ring from half to the whole of the unit circle, evenly over its area, that nobody can tell without the key: of
 * the places in the square the first that lies in the ring.
 */
function placeInRing(key: Uint8Array, name: string): Point {
  for (let attempt = 0; ; attempt++) {
    const bytes = new DataView(hmac(sha256, key, utf8ToBytes(`${attempt} ${name}`)).buffer);
    const [u, v] = [bytes.getInt32(0) / 0x8000_0000, bytes.getInt32(4) / 0x8000_0000];
    const square = u * u + v * v;
    if (square >= 0.25 && square <= 1) return [u, v];
  }
}

function middle(places: readonly Point[]): Point {
  const sum = places.reduce<Point>(([a, b], [x, y]) => [a + x, b + y], [0, 0]);
  const count = Math.max(1, places.length);
  return [sum[0] / count, sum[1] / count];
}
