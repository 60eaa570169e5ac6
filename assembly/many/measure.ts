// What a pair of positive vectors says of the growth of two matrices side by side.
// Every positive x encloses the growth ρ of A: min (Ax)ᵢ/xᵢ ≤ ρ ≤ max (Ax)ᵢ/xᵢ (Collatz 1942, Wielandt 1950), and so does
// every positive y with yA.
import { imageLeft, imageRight, matrices, order, stride } from './two';

/** Bounds of the growth by both vectors, how far those by either lie apart, and the quotient yAx / yx (Ostrowski 1959). */
export let low: v128 = f64x2.splat(0);
export let high: v128 = f64x2.splat(0);
export let apart: v128 = f64x2.splat(0);
export let quotient: v128 = f64x2.splat(0);
/** yx. */
export let product: v128 = f64x2.splat(0);

/** imageRight = A x and imageLeft = y A, on one way through A. */
export function apply(x: usize, y: usize): void {
  memory.fill(imageLeft, 0, stride);
  for (let i = 0; i < order; i++) {
    const place = (<usize>i) << 4;
    let at = matrices + <usize>i * stride;
    const end = at + stride;
    const weight = v128.load(y + place);
    let even = f64x2.splat(0);
    let odd = f64x2.splat(0);
    let from = x;
    let to = imageLeft;
    for (; at + 32 <= end; at += 32) {
      const a = v128.load(at);
      const b = v128.load(at, 16);
      even = f64x2.add(even, f64x2.mul(a, v128.load(from)));
      odd = f64x2.add(odd, f64x2.mul(b, v128.load(from, 16)));
      v128.store(to, f64x2.add(v128.load(to), f64x2.mul(a, weight)));
      v128.store(to, f64x2.add(v128.load(to, 16), f64x2.mul(b, weight)), 16);
      from += 32;
      to += 32;
    }
    if (at < end) {
      const a = v128.load(at);
      even = f64x2.add(even, f64x2.mul(a, v128.load(from)));
      v128.store(to, f64x2.add(v128.load(to), f64x2.mul(a, weight)));
    }
    v128.store(imageRight + place, f64x2.add(even, odd));
  }
}

/** Applies both matrices and reads the bounds; x and y are positive. */
export function measure(x: usize, y: usize): void {
  apply(x, y);
  let lowRight = f64x2.splat(Infinity);
  let lowLeft = lowRight;
  let highRight = f64x2.splat(0);
  let highLeft = highRight;
  let above = highRight;
  let below = highRight;
  for (let at: usize = 0; at < stride; at += 16) {
    const xi = v128.load(x + at);
    const yi = v128.load(y + at);
    const ax = v128.load(imageRight + at);
    const ratioRight = f64x2.div(ax, xi);
    const ratioLeft = f64x2.div(v128.load(imageLeft + at), yi);
    lowRight = f64x2.min(lowRight, ratioRight);
    highRight = f64x2.max(highRight, ratioRight);
    lowLeft = f64x2.min(lowLeft, ratioLeft);
    highLeft = f64x2.max(highLeft, ratioLeft);
    above = f64x2.add(above, f64x2.mul(yi, ax));
    below = f64x2.add(below, f64x2.mul(yi, xi));
  }
  low = f64x2.max(lowRight, lowLeft);
  high = f64x2.min(highRight, highLeft);
  apart = f64x2.max(
    f64x2.div(f64x2.sub(highRight, lowRight), highRight),
    f64x2.div(f64x2.sub(highLeft, lowLeft), highLeft),
  );
  quotient = f64x2.div(above, below);
  product = below;
}
