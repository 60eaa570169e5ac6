// Lines through many points as short path texts: pages hold thousands of them.

/** Pixels. */
export type Place = readonly [number, number];

/** A line through the places, rounded to tenths of a pixel: the first as it is, each other from the one before. */
export function pathThrough(places: Iterable<Place>): string {
  let [text, fromX, fromY] = ['', 0, 0];
  for (const [x, y] of places) {
    const [tenthsX, tenthsY] = [Math.round(x * 10), Math.round(y * 10)];
    const [across, down] = [tenths(tenthsX - fromX), tenths(tenthsY - fromY)];
    const gap = down.startsWith('-') ? '' : ' ';
    // After a small m, all further pairs are lines from the place before.
    text += `${text === '' ? 'm' : across.startsWith('-') ? '' : ' '}${across}${gap}${down}`;
    [fromX, fromY] = [tenthsX, tenthsY];
  }
  return text;
}

/** The same as an area: back to the first place. */
export function areaWithin(places: readonly Place[]): string {
  return places.length === 0 ? '' : `${pathThrough(places)}z`;
}

/** Rounding is of the places, so that errors do not add up along the line. */
function tenths(count: number): string {
  return String(count / 10).replace(/^(-?)0\./, '$1.');
}
