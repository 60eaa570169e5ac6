// Sixteen replicates side by side: where their animals and everything they need during a step stand in memory.
// An array [..][lane] has the sixteen lanes of one number next to each other.
import { i32At, putU32 } from './arrays';
import { classes, columns, entries, header, patches, section, slots, ways } from './image';
import { faultNone, headerStart, headerWeather, headerWork, lanes } from './layout';
import { reserve } from './memory';

/** i32 [patch][class][lane] */
export let animals: usize = 0;
/** i32 [patch][class][lane]: those on their way, or a row of the next state */
export let arrivals: usize = 0;
/** f64 [slot][patch][lane]: what conditions multiply rates by */
export let slotValues: usize = 0;
/** f64 [number][lane]: what lasts from year to year beside the animals, such as weather that is carried over, and waits */
export let weather: usize = 0;
/** f64 [number][lane]: for the year program */
export let work: usize = 0;
/** f64 [column][lane]: what was counted last */
export let observed: usize = 0;
/** f64 [way]: animals that arrived over each way, all classes and lanes together, since `start` */
export let moved: usize = 0;
/** u32 [lane] */
export let replicates: usize = 0;
/** i32 [lane][3]: fault code, index of the phase, step */
export let stops: usize = 0;
/** u64 [2][lane]: the block of random bits of the patch and phase at hand */
export let words: usize = 0;
/** f64 [lane]: the rate of the patch and class at hand */
export let rates: usize = 0;
/** f64 [lane] twice, i32 [lane] twice: for the phase at hand */
export let numbers: usize = 0;
export let moreNumbers: usize = 0;
export let counts: usize = 0;
export let moreCounts: usize = 0;
/** f64 [lane]: how much of a capacity is left in the patch at hand */
export let rooms: usize = 0;
export let step: i32 = 0;
/** Whether the numbers in `weather` are those of this step already: what is drawn for them is not drawn again. */
export let weatherGiven: bool = false;
/** The step whose tables hold: `step`, or 1 for good where years go on without the calendar. */
export let calendar: i32 = 0;

export const cellBytes: usize = 64;
export const laneNumbers: usize = 128;

export function rowBytes(): usize {
  return <usize>classes * cellBytes;
}

export function stateBytes(): usize {
  return <usize>patches * rowBytes();
}

export function weatherBytes(): usize {
  return <usize>header(headerWeather) * laneNumbers;
}

/** False where the memory is too small for a batch. */
export function reserveBatch(): bool {
  animals = reserve(stateBytes());
  arrivals = reserve(stateBytes());
  slotValues = reserve(<usize>slots * patches * laneNumbers);
  weather = reserve(weatherBytes());
  work = reserve(<usize>header(headerWork) * laneNumbers);
  observed = reserve(<usize>columns * laneNumbers);
  moved = reserve((<usize>ways) << 3);
  const small = reserve(1152);
  replicates = small;
  stops = small + 64;
  words = small + 256;
  rates = small + 512;
  numbers = small + 640;
  moreNumbers = small + 768;
  counts = small + 896;
  moreCounts = small + 960;
  rooms = small + 1024;
  const states = animals !== 0 && arrivals !== 0 && slotValues !== 0 && weather !== 0 && work !== 0;
  return states && observed !== 0 && moved !== 0 && small !== 0;
}

/** Puts the starting animals into the first `count` lanes and none into the others. */
export function fillBatch(count: i32): void {
  const start = section(header(headerStart));
  for (let cell = 0; cell < entries(header(headerStart)); cell++) {
    const n = i32At(start, cell);
    const at = animals + <usize>cell * cellBytes;
    for (let lane = 0; lane < lanes; lane++) putU32(at, lane, lane < count ? n : 0);
  }
  memory.fill(stops, 0, 192);
  memory.fill(moved, 0, (<usize>ways) << 3);
  memory.fill(observed, 0, <usize>columns * laneNumbers);
  memory.fill(slotValues, 0, <usize>slots * patches * laneNumbers);
  memory.fill(weather, 0, weatherBytes());
  anyStopped = false;
}

export function setStep(t: i32): void {
  step = t;
  calendar = t;
}

/** One step further, in which the tables of the first step hold. */
export function stepWithoutCalendar(): void {
  step += 1;
  calendar = 1;
}

export function giveWeather(given: bool): void {
  weatherGiven = given;
}

let anyStopped: bool = false;

/** Marks a replicate as stopped in the phase of this index; `clearStopped` takes its animals away after the phase. */
export function stopLane(lane: i32, code: i32, index: i32): void {
  const at = stops + <usize>lane * 12;
  if (load<i32>(at) !== faultNone) return;
  store<i32>(at, code, 0);
  store<i32>(at, index, 4);
  store<i32>(at, step, 8);
  anyStopped = true;
}

export function isStopped(lane: i32): bool {
  return load<i32>(stops + <usize>lane * 12) !== faultNone;
}

export function clearStopped(): void {
  if (!anyStopped) return;
  anyStopped = false;
  for (let lane = 0; lane < lanes; lane++) {
    if (load<i32>(stops + <usize>lane * 12) === faultNone) continue;
    const end = animals + stateBytes();
    for (let at = animals + ((<usize>lane) << 2); at < end; at += cellBytes) store<i32>(at, 0);
  }
}
