// Growth in the long run: few animals as real numbers, year after year under the conditions that chance brings.
import * as layout from '../../assembly/layout.ts';
import { headerOf } from '../compile/image/read.ts';
import type { Machine } from '../machine/instance.ts';
import { cellsOf, openOwnCourses } from './open-path.ts';

export interface LongRunRequest {
  /** Years that are forgotten first, and then those that are kept, of each of the sixteen courses. */
  readonly settling: number;
  readonly years: number;
  /** A whole number below 2^53. */
  readonly seed: number;
}

/** Changes of the natural logarithm of all animals; −∞ where a year leaves nobody. */
export interface LongRun {
  /** Mean of a year, one number a course. */
  readonly courses: Float64Array;
  /** Sums over stretches of `stretch` years, course by course; years left over are in none. */
  readonly stretches: Float64Array;
}

/** Long enough that what one year leaves to the next hardly reaches out of it. */
export const stretch = 50;

const mostYears = 5000;
const fewestYears = 500;
/** Multiplications that a look at growth may take. */
const mostWork = 4e8;

/** Years of each course, by the size of the model alone: the same on every machine. */
export function yearsThatPay(image: ArrayBuffer, { phases, settling }: { phases: number; settling: number }): number {
  const header = headerOf(image);
  const word = (index: number): number => header[index] ?? 0;
  const inPatches = word(layout.headerPatches) * (word(layout.headerClasses) * phases + word(layout.headerSlots));
  const work = Math.max(1, inPatches + word(layout.headerWays));
  return Math.max(fewestYears, Math.min(mostYears, Math.floor(mostWork / (layout.lanes * work)) - settling));
}

/** So few that neither crowding nor ceilings matter. */
const few = 1e-12;
const wordSize = 4294967296;

/**
 * The courses are independent; within each the years follow on one another, with their autocorrelation and waits. Rates are
 * those of the first year.
 */
export function runLongRun(image: ArrayBuffer, { settling, years, seed }: LongRunRequest): LongRun {
  const machine = openOwnCourses(image);
  const cells = cellsOf(image);
  const numbers = new Uint32Array(machine.memory.buffer, machine.replicates(), layout.lanes);
  numbers.forEach((_, lane) => (numbers[lane] = lane));
  machine.start(layout.lanes, seed % wordSize, Math.floor(seed / wordSize));
  machine.startCourses();
  machine.fillCourses(few / cells);
  const totals = new Float64Array(machine.memory.buffer, machine.courseTotals(), layout.lanes);
  const sums = new Float64Array(layout.lanes);
  const perCourse = Math.floor(years / stretch);
  const stretches = new Float64Array(layout.lanes * perCourse);
  for (let year = 0; year < settling + years; year++) {
    machine.stepWeather();
    machine.holdCourses();
    machine.stepCourses();
    machine.sumCourses();
    if (year >= settling) {
      const own = Math.floor((year - settling) / stretch);
      totals.forEach((total, lane) => {
        const more = change(machine, total);
        const at = lane * perCourse + own;
        sums[lane] = (sums[lane] ?? 0) + more;
        if (own < perCourse) stretches[at] = (stretches[at] ?? 0) + more;
      });
    }
    machine.scaleCourses(few);
  }
  return { courses: sums.map((sum) => sum / years), stretches };
}

/** Of the logarithm, from `few` animals. */
function change({ log }: Machine, total: number): number {
  return total > 0 ? log(total / few) : -Infinity;
}
