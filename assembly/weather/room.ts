// How much of its capacity a patch has left where catastrophes lower it for years.
import { i32At } from '../arrays';
import { laneNumbers, rooms, slotValues } from '../batch';
import { entries, patches, section } from '../image';

/** Fills `rooms` with the product of these slots in a patch, 1 without any. */
export function fillRooms(row: i32, patch: i32): void {
  for (let i: usize = 0; i < laneNumbers; i += 16) v128.store(rooms + i, f64x2.splat(1));
  for (let k = 0; k < entries(row); k++) {
    const values = slotValues + <usize>(i32At(section(row), k) * patches + patch) * laneNumbers;
    for (let i: usize = 0; i < laneNumbers; i += 16) {
      v128.store(rooms + i, f64x2.mul(v128.load(rooms + i), v128.load(values + i)));
    }
  }
}
