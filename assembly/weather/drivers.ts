// Drivers whose years are drawn: each step one of the given years, the same for all drivers and patches.
import { f64At, i32At, u32At } from '../arrays';
import { laneNumbers, replicates, slotValues, step, words } from '../batch';
import { philoxLanes } from '../draws/philox';
import { entries, operand, patches, section } from '../image';
import * as layout from '../layout';
import { uniform } from './uniform';

export function drive(record: usize): void {
  const values = operand(record, layout.driversValues);
  const slots = operand(record, layout.driversSlots);
  const years = entries(values) / entries(slots);
  const key = u32At(section(operand(record, layout.driversColumn)), 0);
  philoxLanes(words, replicates, step, key, operand(record, layout.recordKey));
  for (let lane = 0; lane < layout.lanes; lane++) {
    const year = i32(floor<f64>(uniform(lane, layout.useDrivers) * f64(years)));
    for (let k = 0; k < entries(slots); k++) {
      const value = f64At(section(values), k * years + year);
      const first = slotValues + <usize>(i32At(section(slots), k) * patches) * laneNumbers + ((<usize>lane) << 3);
      for (let patch = 0; patch < patches; patch++) store<f64>(first + <usize>patch * laneNumbers, value);
    }
  }
}
