// An instance of the kernel module: what it offers, and how it is made from the compiled module.

/** What the kernel module offers: functions over numbers only; addresses are bytes in its memory. */
export interface MachineFunctions {
  readonly exp: (x: number) => number;
  readonly log: (x: number) => number;
  readonly pow: (base: number, exponent: number) => number;
  /** ln k! for whole k ≥ 0. */
  readonly logFactorial: (k: number) => number;
  readonly release: () => void;
  readonly reserve: (bytes: number) => number;
  /** A fault code of layout.ts. */
  readonly open: (address: number, size: number) => number;
  readonly faultSubject: () => number;
  readonly start: (count: number, seedLow: number, seedHigh: number) => void;
  readonly step: () => void;
  /** A step under the weather whose numbers of this step stand at `weatherNumbers()`. */
  readonly stepUnder: () => void;
  /** Address: f64 [number][lane], what lasts of the weather, as it is after a step. */
  readonly weatherNumbers: () => number;
  /** The conditions of one more year alone. */
  readonly stepWeather: () => void;
  readonly run: (steps: number) => void;
  /** Addresses: u32 [lane]; f64 [column][lane]; i32 [lane][3]; i32 [patch][class][lane]. */
  readonly replicates: () => number;
  readonly observed: () => number;
  readonly stops: () => number;
  readonly animals: () => number;
  /** Address: f64 [slot][patch][lane], what conditions multiply rates by in this step. */
  readonly slotNumbers: () => number;
  /** Address: f64 [way], animals that arrived over each way since `start`, all classes and lanes together. */
  readonly moved: () => number;
  readonly laneBytes: () => number;
  readonly saveLane: (lane: number, target: number) => void;
  /** 0 where the lane was saved at another step than the batch is at. */
  readonly restoreLane: (lane: number, source: number) => number;
  readonly setBatchStep: (step: number) => void;
  /** Room for the path without chance of the open image; 0 where the memory cannot grow so far. */
  readonly openPath: () => number;
  /** The start; the tables of the image are read anew. */
  readonly startPath: () => void;
  readonly stepPath: () => void;
  /** The next step is the first. */
  readonly rewindPath: () => void;
  /** Address: f64 [patch][class], where the animals stand once `readPath` put them there, and from where `writePath` takes them. */
  readonly pathAnimals: () => number;
  readonly readPath: () => void;
  readonly writePath: () => void;
  /** Room for sixteen courses of mean animals side by side; 0 where the memory cannot grow so far. */
  readonly openCourses: () => number;
  /** The start in each; the tables of the image are read anew. */
  readonly startCourses: () => void;
  /** So many animals in each patch and class. */
  readonly fillCourses: (each: number) => void;
  /** The phases of the first year on all courses, each under the conditions of its lane of the batch. */
  readonly stepCourses: () => void;
  /** Puts the courses aside as they are. */
  readonly holdCourses: () => void;
  /** Sums all animals of each course into `courseTotals`. */
  readonly sumCourses: () => void;
  /** From these sums to so many animals in each course; one of nobody goes back to what was put aside. */
  readonly scaleCourses: (wanted: number) => void;
  /** Address: f64 [course]. */
  readonly courseTotals: () => number;
  /** Room for so many matrices of an order at a time; 0 where the memory cannot grow so far. Addresses follow. */
  readonly openMany: (order: number, most: number) => number;
  /** f64 [matrix][row][column]; where elasticities are wanted, they take the place of the entries. */
  readonly manyInputs: () => number;
  /** f64 [matrix]: growth, and how far its bounds lie apart relative to it. */
  readonly manyGrowths: () => number;
  readonly manyErrors: () => number;
  /** i32 [matrix]: period; 0 reducible, -1 the bounds did not close, -2 an entry is no number from 0. */
  readonly manyPeriods: () => number;
  /** f64 [matrix][state]: right vectors sum to 1, left ones begin with 1. */
  readonly manyRights: () => number;
  readonly manyLefts: () => number;
  /** f64 [2][state]: positive vectors to begin with, right and left. */
  readonly manyStarts: () => number;
  /** Wanted: 1 vectors, 2 elasticities, 4 each from the vectors of the one two places before it. */
  readonly solveMany: (count: number, wanted: number, multiplications: number) => void;
  /** Room for a program of so many words and so many numbers, to be written before `openAlike`; 0 without memory. */
  readonly reserveAlike: (words: number, numbers: number) => number;
  /** Addresses: i32 and f64, see `kernel/alike-program.ts`. */
  readonly alikeProgram: () => number;
  readonly alikeNumbers: () => number;
  /** Room for so many points at a time, a multiple of eight; 0 without memory. */
  readonly openAlike: (most: number) => number;
  /** f64 [source][point], as many as there is room for. */
  readonly alikeValues: () => number;
  /** f64 [point] */
  readonly alikeGrowths: () => number;
  /** So many points, a multiple of eight. */
  readonly solveAlike: (count: number) => void;
  /** Room for so many lines of so many numbers at a time; 0 without memory. */
  readonly openLines: (columns: number, most: number) => number;
  /** Addresses: u64 [617][2] of powers of ten, f64 [column][row], bytes of the lines. */
  readonly linePowers: () => number;
  readonly lineCells: () => number;
  readonly lineText: () => number;
  /** So many rows; bytes that were written. */
  readonly writeLines: (rows: number) => number;
  readonly probeExpTwo: (both: number) => void;
  readonly probePhilox: (block: number, seedLow: number, seedHigh: number) => void;
  readonly probePhiloxLanes: (words: number, replicates: number, counter: number) => void;
  readonly probeSample: (out: number, draws: number, request: number) => void;
  readonly probeStream: (word: number, state: number, index: number) => void;
}

/** An instance with its own memory. Views on `memory.buffer` die when it grows: make them anew after `reserve`. */
export interface Machine extends MachineFunctions {
  readonly memory: WebAssembly.Memory;
}

const functionNames: Readonly<Record<keyof MachineFunctions, true>> = {
  exp: true,
  log: true,
  pow: true,
  logFactorial: true,
  release: true,
  reserve: true,
  open: true,
  faultSubject: true,
  start: true,
  step: true,
  stepUnder: true,
  weatherNumbers: true,
  stepWeather: true,
  run: true,
  replicates: true,
  observed: true,
  stops: true,
  animals: true,
  slotNumbers: true,
  moved: true,
  laneBytes: true,
  saveLane: true,
  restoreLane: true,
  setBatchStep: true,
  openPath: true,
  startPath: true,
  stepPath: true,
  rewindPath: true,
  pathAnimals: true,
  readPath: true,
  writePath: true,
  openCourses: true,
  startCourses: true,
  fillCourses: true,
  stepCourses: true,
  holdCourses: true,
  sumCourses: true,
  scaleCourses: true,
  courseTotals: true,
  openMany: true,
  manyInputs: true,
  manyGrowths: true,
  manyErrors: true,
  manyPeriods: true,
  manyRights: true,
  manyLefts: true,
  manyStarts: true,
  solveMany: true,
  reserveAlike: true,
  alikeProgram: true,
  alikeNumbers: true,
  openAlike: true,
  alikeValues: true,
  alikeGrowths: true,
  solveAlike: true,
  openLines: true,
  linePowers: true,
  lineCells: true,
  lineText: true,
  writeLines: true,
  probeExpTwo: true,
  probePhilox: true,
  probePhiloxLanes: true,
  probeSample: true,
  probeStream: true,
};

/** With memory of its own. About 0.3 ms. */
export function instantiate(module: WebAssembly.Module): Machine {
  const exported: unknown = new WebAssembly.Instance(module).exports;
  if (!isMachine(exported)) throw new Error('The kernel module was built from other sources: run `npm run build`.');
  return exported;
}

function isMachine(exported: unknown): exported is Machine {
  if (typeof exported !== 'object' || exported === null) return false;
  const found = new Map<string, unknown>(Object.entries(exported));
  if (!(found.get('memory') instanceof WebAssembly.Memory)) return false;
  return Object.keys(functionNames).every((name) => typeof found.get(name) === 'function');
}
