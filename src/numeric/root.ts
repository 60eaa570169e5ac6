// Where a function of one number crosses zero.

export interface Bracket {
  readonly low: number;
  readonly high: number;
}

interface Point {
  readonly x: number;
  readonly y: number;
}

/**
 * Root of a continuous function between two numbers at which it has opposite signs. Each round tries a secant step inside
 * the bracket and halves what is left, so the bracket shrinks at least by half a round and near a smooth root much faster.
 * Ends when the bracket is as narrow as `tolerance` (relative, absolute below 1) or rounding allows.
 * Null where both ends have the same sign or a value is not a number.
 */
export function findRoot(f: (x: number) => number, bracket: Bracket, tolerance = 1e-14): number | null {
  const at = (x: number): Point => ({ x, y: f(x) });
  let [left, right] = [at(bracket.low), at(bracket.high)];
  if (left.y === 0) return left.x;
  if (right.y === 0) return right.x;
  if (!(Math.sign(left.y) === -Math.sign(right.y))) return null;
  for (let round = 0; round < 1100; round++) {
    const enough = Math.max(tolerance, 2 * Number.EPSILON) * Math.max(1, Math.abs(left.x), Math.abs(right.x));
    for (const place of [secant(left, right, enough), null]) {
      const x = place ?? left.x + (right.x - left.x) / 2;
      if (Math.abs(right.x - left.x) <= enough || x === left.x || x === right.x) return nearer(left, right).x;
      const point = at(x);
      if (point.y === 0) return x;
      if (Number.isNaN(point.y)) return null;
      if (Math.sign(point.y) === Math.sign(left.y)) left = point;
      else right = point;
    }
  }
  return nearer(left, right).x;
}

/** The zero of the straight line through both ends, pushed a little over towards the far end so that both ends close in. */
function secant(left: Point, right: Point, enough: number): number | null {
  const slope = (right.y - left.y) / (right.x - left.x);
  const x = left.x - left.y / slope;
  if (!Number.isFinite(x)) return null;
  const towards = Math.abs(x - left.x) < Math.abs(right.x - x) ? right.x : left.x;
  const pushed = x + Math.sign(towards - x) * enough * 0.4;
  return pushed > Math.min(left.x, right.x) && pushed < Math.max(left.x, right.x) ? pushed : null;
}

function nearer(left: Point, right: Point): Point {
  return Math.abs(left.y) <= Math.abs(right.y) ? left : right;
}
