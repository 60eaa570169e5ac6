// Matrices of one pattern, eight side by side: where they, the program that makes and eliminates them, and what their solution
// needs stand in memory. A number of all eight takes a row of 64 bytes; addresses in the program are bytes from the start of
// what they point into, so that nothing is multiplied when they are followed.
import { u32At } from '../arrays';
import { reserve } from '../memory';

/** Bytes of one number of all eight. */
export const row: usize = 64;
export const together: i32 = 8;

/** What the program begins with. */
const ofStates = 0;
const ofTape = 1;
const ofFactors = 2;
const ofSources = 3;
/** Where each part of it begins, in bytes from its start. */
const ofMoving = 4;
const ofSums = 5;
const ofEntries = 6;
const ofLoads = 7;
const ofElimination = 8;
const ofRows = 9;

export let states: i32 = 0;
/** Bytes of a vector of all eight. */
export let vector: usize = 0;
/** i32: see `src/kernel/alike-program.ts`. */
export let program: usize = 0;
/** f64: start of the tape, constants and slopes, weights, vectors to start from. */
export let numbers: usize = 0;
/** f64 [source][point], and how many bytes a source takes. */
export let values: usize = 0;
export let sourceBytes: usize = 0;
/** f64 [point] */
export let growths: usize = 0;
/** f64 [place][8] */
export let tape: usize = 0;
/** f64 [slot][8]: row by row what lies below the diagonal, it, and what lies above. */
export let factors: usize = 0;
/** f64 [state][8]: inverse pivots, vectors found so far, and the ones to try next. */
export let pivots: usize = 0;
export let right: usize = 0;
export let left: usize = 0;
export let nextRight: usize = 0;
export let nextLeft: usize = 0;
/** f64 [what][8] of the iteration. */
export let steering: usize = 0;
export const steered: i32 = 10;

/** Room for the program and its numbers, which the host then writes; false where the memory cannot grow so far. */
export function reserveProgram(words: i32, figures: i32): bool {
  program = reserve((<usize>words) << 2);
  numbers = reserve((<usize>figures) << 3);
  return program !== 0 && numbers !== 0;
}

/** Room for what the program asks for, and for so many points at a time, a multiple of eight. */
export function reserveRoom(most: i32): bool {
  states = <i32>u32At(program, ofStates);
  vector = <usize>states * row;
  sourceBytes = (<usize>most) << 3;
  values = reserve(sourceBytes * u32At(program, ofSources));
  growths = reserve(sourceBytes);
  tape = reserve(<usize>u32At(program, ofTape) * row);
  factors = reserve(<usize>u32At(program, ofFactors) * row);
  pivots = reserve(vector * 5);
  right = pivots + vector;
  left = right + vector;
  nextRight = left + vector;
  nextLeft = nextRight + vector;
  steering = reserve(<usize>steered * row);
  return values !== 0 && growths !== 0 && tape !== 0 && factors !== 0 && pivots !== 0 && steering !== 0;
}

export function tapePlaces(): i32 {
  return <i32>u32At(program, ofTape);
}
/** f64 [moving][2]: constant and slope. */
export function lines(): usize {
  return numbers + ((<usize>u32At(program, ofTape)) << 3);
}
/** f64 [entry]: what the vector to start from has at the column, over what it has at the row. */
export function entryWeights(): usize {
  return lines() + ((<usize>load<u32>(movingPart())) << 4);
}
/** f64 [state]: the share of a row in the quotient of both vectors to start from. */
export function rowWeights(): usize {
  return entryWeights() + ((<usize>load<u32>(entriesPart())) << 3);
}
/** f64 [state], right and left. */
export function starts(): usize {
  return rowWeights() + ((<usize>states) << 3);
}
export function movingPart(): usize {
  return program + u32At(program, ofMoving);
}
export function sumsPart(): usize {
  return program + u32At(program, ofSums);
}
export function entriesPart(): usize {
  return program + u32At(program, ofEntries);
}
export function loadsPart(): usize {
  return program + u32At(program, ofLoads);
}
export function eliminationPart(): usize {
  return program + u32At(program, ofElimination);
}
export function rowsPart(): usize {
  return program + u32At(program, ofRows);
}

/** Another pair of vectors to try takes the place of those found. */
export function swapVectors(): void {
  const a = right;
  const b = left;
  right = nextRight;
  left = nextLeft;
  nextRight = a;
  nextLeft = b;
}
