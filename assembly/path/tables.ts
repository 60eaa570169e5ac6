// Tables of the image as the path reads them: rows of numbers by patch, padded with zeros. Each is made when it is first needed and
// again where another stretch of years begins.
import { i32At, putF64 } from '../arrays';
import { classes, entries, header, operand, patches, section } from '../image';
import * as layout from '../layout';
import { reserve } from '../memory';
import { listsBytes, pairsBytes } from './ways';

/** Bytes of a row by patch: whole blocks. */
export let patchRow: usize = 0;
/** usize [record of the phase program][table] */
let places: usize = 0;

const tablesOfRecord: i32 = 3;
/** Before the rows: the address in the image that they are from, how many they are, then whether each has any number but 0. */
const headBytes: usize = 16;

/** False where the memory cannot grow so far. */
export function reserveTables(): bool {
  patchRow = ((<usize>patches + 7) & ~(<usize>7)) << 3;
  const row = header(layout.headerPhaseProgram);
  const records = entries(row) / layout.recordWords;
  places = reserve((<usize>(records * tablesOfRecord)) << 2);
  if (places === 0) return false;
  memory.fill(places, 0, (<usize>(records * tablesOfRecord)) << 2);
  for (let k = 0; k < records; k++) {
    if (!reserveOf(section(row) + <usize>k * layout.recordBytes)) return false;
  }
  return true;
}

function reserveOf(record: usize): bool {
  switch (operand(record, layout.recordOpcode)) {
    case layout.opSurvival:
      return reserveTable(record, 0, classes);
    case layout.opBreeding:
      return reserveTable(record, 0, classes) && reserveTable(record, 1, 1);
    case layout.opAgeing:
      return operand(record, layout.ageingByPatch) < 0 || reserveTable(record, 0, classes);
    case layout.opDemography:
      return reserveTable(record, 0, classes * classes) && reserveTable(record, 1, classes * classes);
    case layout.opDispersal:
      return reserveTable(record, 0, classes) && reserveForWays(record);
    case layout.opCeiling:
      return reserveTable(record, 0, 1);
    case layout.opCrowding:
      return reserveTable(record, 0, 1) && reserveTable(record, 1, 1);
    default:
      return true;
  }
}

function reserveTable(record: usize, which: i32, rows: i32): bool {
  return reserveAt(record, which, reserve(startOf(rows) + <usize>rows * patchRow));
}

function reserveForWays(record: usize): bool {
  if (!reserveAt(record, 1, reserve(listsBytes(record)))) return false;
  const pairs = pairsBytes(record, patchRow);
  return pairs === 0 || reserveAt(record, 2, reserve(pairs));
}

function reserveAt(record: usize, which: i32, address: usize): bool {
  store<usize>(placeOf(record, which), address);
  if (address === 0) return false;
  store<usize>(address, 0);
  return true;
}

function placeOf(record: usize, which: i32): usize {
  const index = (record - section(header(layout.headerPhaseProgram))) / layout.recordBytes;
  return places + ((index * <usize>tablesOfRecord + <usize>which) << 2);
}

/** Where what was reserved for a record stands; 0 for nothing. */
export function placeAt(record: usize, which: i32): usize {
  return load<usize>(placeOf(record, which));
}

function startOf(rows: i32): usize {
  return headBytes + ((((<usize>rows) << 2) + 15) & ~(<usize>15));
}

/** Tables are read anew: their numbers in the image may be others. */
export function forgetTables(): void {
  const records = entries(header(layout.headerPhaseProgram)) / layout.recordWords;
  for (let k = 0; k < records * tablesOfRecord; k++) {
    const table = load<usize>(places + ((<usize>k) << 2));
    if (table !== 0) store<usize>(table, 0);
  }
}

/** The table of a record made from `source`, f64 [patch][row]. */
export function tableOf(record: usize, which: i32, source: usize, rows: i32): usize {
  const table = placeAt(record, which);
  if (load<usize>(table) !== source) fillTable(table, source, rows);
  return table;
}

function fillTable(table: usize, source: usize, rows: i32): void {
  store<usize>(table, source);
  store<i32>(table, rows, 4);
  for (let k = 0; k < rows; k++) {
    const row = rowOf(table, k);
    const from = source + ((<usize>k) << 3);
    const stride = (<usize>rows) << 3;
    let any: i32 = 0;
    let at = from;
    for (let patch = 0; patch < patches; patch++) {
      const value = load<f64>(at);
      if (value !== 0) any = 1;
      putF64(row, patch, value);
      at += stride;
    }
    for (let at = (<usize>patches) << 3; at < patchRow; at += 8) store<f64>(row + at, 0);
    store<i32>(table + headBytes + ((<usize>k) << 2), any);
  }
}

/** f64 [patch] */
export function rowOf(table: usize, k: i32): usize {
  return table + startOf(load<i32>(table, 4)) + <usize>k * patchRow;
}

/** Whether a row has any number but 0. */
export function hasAny(table: usize, k: i32): bool {
  return i32At(table + headBytes, k) !== 0;
}
