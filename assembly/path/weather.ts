// The weather of the path without chance: everything that varies stands at its mean.
import { f64At, i32At, putF64 } from '../arrays';
import { entries, operand, patches, section } from '../image';
import * as layout from '../layout';
import { fillRow, slotRow } from './rows';

/** Slots hold what rates are multiplied by. Those of named numbers are read by responses alone, which need none of them here. */
export function meanVariation(record: usize): void {
  const row = operand(record, layout.variationQuantities);
  for (let word = 0; word < entries(row); word += layout.quantityWords) {
    fillRow(slotRow(i32At(section(row), word + layout.quantitySlot)), 1);
  }
}

export function meanResponse(record: usize): void {
  fillRow(slotRow(operand(record, layout.responseSlot)), 1);
}

export function meanCatastrophe(record: usize): void {
  const row = operand(record, layout.strikeSlots);
  const means = section(operand(record, layout.strikeMeans));
  for (let k = 0; k < entries(row); k++) {
    const slot = slotRow(i32At(section(row), k));
    fillRow(slot, 1);
    for (let patch = 0; patch < patches; patch++) putF64(slot, patch, f64At(means, k * patches + patch));
  }
}
