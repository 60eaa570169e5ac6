// Boxes on the map that are taken, kept by the squares that they touch: among hundreds only those nearby are looked at.
import type { Box } from './shape.ts';

export interface Crowd {
  add(box: Box): void;
  /** Square pixels of a box that others cover; twice where two do. */
  covered(box: Box): number;
}

/** Pixels. */
const side = 64;

export function createCrowd(): Crowd {
  const squares = new Map<number, Box[]>();
  return {
    add(box) {
      eachSquare(box, (x, y) => {
        const there = squares.get(keyOf(x, y));
        if (there === undefined) squares.set(keyOf(x, y), [box]);
        else there.push(box);
      });
    },
    covered(box) {
      let covered = 0;
      eachSquare(box, (x, y) => {
        for (const other of squares.get(keyOf(x, y)) ?? []) {
          const left = Math.max(box.left, other.left);
          const top = Math.max(box.top, other.top);
          const [wide, high] = [Math.min(box.right, other.right) - left, Math.min(box.bottom, other.bottom) - top];
          // Two boxes may share several squares; they are counted where what they share begins.
          const begins = squareOf(left) === x && squareOf(top) === y;
          if (begins && wide > 0 && high > 0) covered += wide * high;
        }
      });
      return covered;
    },
  };
}

function eachSquare({ left, right, top, bottom }: Box, visit: (x: number, y: number) => void): void {
  const [lastX, lastY] = [squareOf(right), squareOf(bottom)];
  for (let x = squareOf(left); x <= lastX; x++) for (let y = squareOf(top); y <= lastY; y++) visit(x, y);
}

function squareOf(at: number): number {
  return Math.floor(at / side);
}

function keyOf(x: number, y: number): number {
  return x * 65_536 + y;
}
