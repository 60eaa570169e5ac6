// Angles without the host's trigonometry, whose last bits differ between engines.

/**
 * Angle of the point (x, y) from the positive x-axis, without sign: 0 to π. The arctangent is halved three times,
 * tan(a/2) = t / (1 + √(1 + t²)), and then summed as its power series.
 */
export function angleOf(x: number, y: number): number {
  const [across, up] = [Math.abs(x), Math.abs(y)];
  if (across === 0 && up === 0) return 0;
  const acute = up <= across ? arctangent(up / across) : Math.PI / 2 - arctangent(across / up);
  return x >= 0 ? acute : Math.PI - acute;
}

/** For 0 to 1. */
function arctangent(t: number): number {
  let small = t;
  for (let halving = 0; halving < 3; halving++) small /= 1 + Math.sqrt(1 + small * small);
  let sum = 0;
  let power = small;
  for (let odd = 1; odd < 40; odd += 2) {
    sum += ((odd & 2) === 0 ? 1 : -1) * (power / odd);
    power *= small * small;
  }
  return 8 * sum;
}
