// What a page says of its places.
import type { ReportInput } from '../input.ts';
import { tellsPlaces } from './hide.ts';

/** Beneath the map; null where places are as they are. */
export function hidingWords({ hiding }: ReportInput): string | null {
  if (hiding === undefined) return null;
  const bands = `Movement is the mean over all years in steps of 1, 2, 5, 10, so that no distance can be worked back from it.`;
  const areas = 'Areas are given to one digit.';
  if (hiding.places === 'schematic' || hiding.ring === null) {
    return `Places are hidden on purpose: patches stand in a ring in the order of the model, and distances in the picture mean
nothing. ${areas} ${bands}`;
  }
  const { leastKm, mostKm } = hiding.ring;
  return `Places are hidden on purpose: each patch was moved by itself, by ${String(leastKm)} to ${String(mostKm)} km in an unknown
direction, and stands as a circle. ${areas} ${bands}`;
}

/** Among the limits; null where nothing is told that could harm. */
export function placesCaution({ model, hiding }: ReportInput): string | null {
  if (hiding !== undefined || !tellsPlaces(model)) return null;
  return `This page tells exactly where the patches are, in its pictures and in its data. Where that could harm nests, dens or
roosts, hand on one that is written with --places shifted or --places schematic instead.`;
}
