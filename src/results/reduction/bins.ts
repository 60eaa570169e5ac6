// The fixed bins of a sketch: one for each whole number below 64, then 32 in every doubling. Since they never move, sketches
// of parts add up to the sketch of the whole, whatever the order.

export const exactBelow = 64;
const binsInDoubling = 32;
const doublingOfFirst = 6;

/** Of half the width of a bin to its lower end: how far a quantile can be off, as a share of itself. */
export const relativeError = 1 / (2 * binsInDoubling);

/** For a whole number from 0 to 2^31 − 1. */
export function binOf(value: number): number {
  if (value < exactBelow) return value;
  const doubling = 31 - Math.clz32(value);
  const within = (value >>> (doubling - 5)) & (binsInDoubling - 1);
  return exactBelow + (doubling - doublingOfFirst) * binsInDoubling + within;
}

/** The whole number in the middle of a bin, the lower of two. */
export function middleOf(bin: number): number {
  if (bin < exactBelow) return bin;
  const [doubling, within] = [Math.floor((bin - exactBelow) / binsInDoubling), (bin - exactBelow) % binsInDoubling];
  const width = 2 << doubling;
  return (binsInDoubling + within) * width + width / 2 - 1;
}
