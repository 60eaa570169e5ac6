// Quantiles of a distribution over the normal numbers as a curve: exact at some places, and between them by Taylor series of
// the differential equation that quantiles follow. Far cheaper than an inversion at every place where they are wanted.
import { quantileAt, type QuantilePoint, type Tails } from './tail.ts';

/**
 * With x the quantile, y the scale of the tails and p = dy/dz: x′ = x·w·p and p′ = p·(−z − (rise − fall·x)·p), where w is 1 − x
 * of a share and 1 of what has no upper end, and rise − fall·x is the slope of the logarithm of the density over y.
 */
export interface QuantileLaw {
  readonly rise: number;
  readonly fall: number;
  readonly share: boolean;
}

/** A distribution whose quantiles are wanted from z = 0 outwards, on one side. */
export interface CurveSide {
  readonly law: QuantileLaw;
  readonly tails: Tails;
  /** −1 below the median, 1 above it. */
  readonly direction: 1 | -1;
  /** y near the median. */
  readonly near: number;
  readonly quantile: (y: number) => number;
  /** Errors of quantiles stay below this. */
  readonly wanted: number;
}

/** Writes the quantile at so far from the median into `out`, and behind it its slope outwards. */
export type QuantileCurve = (distance: number, out: Float64Array) => void;

const order = 12;
/** From one exact place to the next. */
const stretch = 3;
/** Series over one stretch. */
const coarsest = 12;
const finest = 96;

/** From the median to `reach`, a multiple of 3, outwards. */
export function quantileCurve(side: CurveSide, reach: number): QuantileCurve {
  const anchors = anchorsOf(side, reach / stretch);
  const series = new Series(side.law);
  const size = coarsest * (order + 1);
  // One piece of memory for all: many small ones cost more than what is worked out in them.
  const room = new Float64Array((anchors.length - 1) * size);
  const pieces = anchors.slice(1).map((from, k) => {
    const own = room.subarray(k * size, (k + 1) * size);
    return pieceOf(side, series, { inner: k * stretch, from, to: anchors[k] ?? from, room: own });
  });
  return (distance, out) => pieces[Math.min(Math.floor(distance / stretch), pieces.length - 1)]?.(distance, out);
}

/** The exact points from the median outwards, a stretch apart. */
function anchorsOf({ tails, direction, near }: CurveSide, stretches: number): readonly QuantilePoint[] {
  const anchors: QuantilePoint[] = [];
  let guess = near;
  for (let k = 0; k <= stretches; k++) {
    const point = quantileAt(tails, direction * k * stretch, guess);
    anchors.push(point);
    guess = point.y + direction * point.slope * stretch;
  }
  return anchors;
}

/** Between two of them. */
interface Stretch {
  /** Distance of the inner one. */
  readonly inner: number;
  /** The outer one, from which the series go inwards: errors fade on the way, which would grow outwards. */
  readonly from: QuantilePoint;
  readonly to: QuantilePoint;
  /** For the coefficients at the coarsest steps. */
  readonly room: Float64Array;
}

/** Where the series miss the inner end at the finest steps, every place is inverted by itself. */
function pieceOf(side: CurveSide, series: Series, between: Stretch): QuantileCurve {
  for (let steps = coarsest; steps <= finest; steps *= 2) {
    const piece = seriesOf(side, series, { ...between, steps });
    if (piece !== null) return piece;
  }
  const { tails, direction, quantile, law } = side;
  return (distance, out) => {
    const near = between.to.y + direction * (distance - between.inner) * between.to.slope;
    const point = quantileAt(tails, direction * distance, near);
    out[0] = quantile(point.y);
    out[1] = direction * slopeOf(law, out[0], point.slope);
  };
}

/** Null where they miss. */
function seriesOf(
  { law, direction, quantile, wanted }: CurveSide,
  series: Series,
  { inner, from, to, room, steps }: Stretch & { readonly steps: number },
): QuantileCurve | null {
  const coefficients = steps === coarsest ? room : new Float64Array(steps * (order + 1));
  const size = stretch / steps;
  const outer = inner + stretch;
  let [x, p] = [quantile(from.y), from.slope];
  for (let step = 0; step < steps; step++) {
    series.open(x, p, direction * (outer - step * size));
    coefficients.set(series.x, step * (order + 1));
    x = valueOf(series.x, 0, -direction * size);
    p = valueOf(series.p, 0, -direction * size);
  }
  const end = quantile(to.y);
  const missed = Math.abs(x - end) + Math.abs(slopeOf(law, x, p) - slopeOf(law, end, to.slope));
  if (!(missed <= wanted)) return null;
  return (distance, out) => {
    const inwards = outer - distance;
    const step = Math.min(steps - 1, Math.floor(inwards / size));
    const away = direction * (step * size - inwards);
    out[0] = valueOf(coefficients, step * (order + 1), away);
    out[1] = direction * changeOf(coefficients, step * (order + 1), away);
  };
}

function slopeOf({ share }: QuantileLaw, x: number, p: number): number {
  return (share ? x * (1 - x) : x) * p;
}

/** Taylor coefficients of x and p about a place. */
class Series {
  readonly x = new Float64Array(order + 1);
  readonly p = new Float64Array(order + 1);
  /** w·p, and −z − (rise − fall·x)·p. */
  readonly #m = new Float64Array(order);
  readonly #q = new Float64Array(order);
  readonly #law: QuantileLaw;

  constructor(law: QuantileLaw) {
    this.#law = law;
  }

  open(x: number, p: number, z: number): void {
    const { rise, fall, share } = this.#law;
    this.x[0] = x;
    this.p[0] = p;
    for (let n = 0; n < order; n++) {
      const [xp, own] = [productAt(this.x, this.p, n), this.p[n] ?? 0];
      this.#m[n] = share ? own - xp : own;
      this.#q[n] = (n === 0 ? -z : n === 1 ? -1 : 0) - rise * own + fall * xp;
      this.x[n + 1] = productAt(this.x, this.#m, n) / (n + 1);
      this.p[n + 1] = productAt(this.p, this.#q, n) / (n + 1);
    }
  }
}

/** Coefficient n of the product of two series. */
function productAt(a: Float64Array, b: Float64Array, n: number): number {
  let sum = 0;
  for (let i = 0; i <= n; i++) sum += (a[i] ?? 0) * (b[n - i] ?? 0);
  return sum;
}

function valueOf(coefficients: Float64Array, at: number, away: number): number {
  let sum = 0;
  for (let n = order; n >= 0; n--) sum = sum * away + (coefficients[at + n] ?? 0);
  return sum;
}

function changeOf(coefficients: Float64Array, at: number, away: number): number {
  let sum = 0;
  for (let n = order; n >= 1; n--) sum = sum * away + n * (coefficients[at + n] ?? 0);
  return sum;
}
