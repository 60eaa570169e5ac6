// The weather of the path without chance: everything that varies stands at its mean.
import { f64At, i32At, putF64 } from '../arrays';
import { entries, operand, patches, section } from '../image';
import * as layout from '../layout';
import { slotValues } from './state';

function fillSlot(slot: i32, value: f64): void {
  for (let patch = 0; patch < patches; patch++) putF64(slotValues, slot * patches + patch, value);
}

/** Slots hold what rates are multiplied by. Those of named numbers are read by responses alone, which need none of them here. */
export function meanVariation(record: usize): void {
  const row = operand(record, layout.variationQuantities);
  for (let word = 0; word < entries(row); word += layout.quantityWords) {
    fillSlot(i32At(section(row), word + layout.quantitySlot), 1);
  }
}

export function meanResponse(record: usize): void {
  fillSlot(operand(record, layout.responseSlot), 1);
}

export function meanCatastrophe(record: usize): void {
  const row = operand(record, layout.strikeSlots);
  const means = section(operand(record, layout.strikeMeans));
  for (let k = 0; k < entries(row); k++) {
    const slot = i32At(section(row), k);
    for (let patch = 0; patch < patches; patch++) {
      putF64(slotValues, slot * patches + patch, f64At(means, k * patches + patch));
    }
  }
}

/** What is left of a capacity, by the product of these slots. */
export function roomOf(row: i32, patch: i32): f64 {
  let room: f64 = 1;
  for (let k = 0; k < entries(row); k++) room *= f64At(slotValues, i32At(section(row), k) * patches + patch);
  return room;
}
