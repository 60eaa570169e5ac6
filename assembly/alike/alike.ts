// Growth of very many small nonnegative matrices that have one pattern and are made from numbers that move: see `room.ts` for what
// the host writes, `year.ts` for how they are made, `iterate.ts` for how they are solved.
import { iterate } from './iterate';
import * as room from './room';
import { fillMoving, fillSame } from './year';

/** Room for a program of so many words with so many numbers, written by the host before `openAlike`; false without memory. */
export function reserveAlike(words: i32, numbers: i32): bool {
  return room.reserveProgram(words, numbers);
}

/** Makes ready for so many points at a time, a multiple of eight; false where the memory cannot grow so far. */
export function openAlike(most: i32): bool {
  if (!room.reserveRoom(most)) return false;
  fillSame();
  return true;
}

export function alikeProgram(): usize {
  return room.program;
}
export function alikeNumbers(): usize {
  return room.numbers;
}
export function alikeValues(): usize {
  return room.values;
}
export function alikeGrowths(): usize {
  return room.growths;
}

/** Growth of the first `count` points, a multiple of eight; none depends on another. */
export function solveAlike(count: i32): void {
  for (let point = 0; point < count; point += room.together) {
    fillMoving(point);
    iterate(room.growths + ((<usize>point) << 3));
  }
}
