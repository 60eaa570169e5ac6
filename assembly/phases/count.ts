// Count: the sums that the host keeps, one column each: the whole, each patch, each outcome's weighted set.
import { f64At } from '../arrays';
import { animals, cellBytes, laneNumbers, observed, rowBytes, stopLane } from '../batch';
import { addNumbers } from '../cells';
import { classes, operand, patches } from '../image';
import * as layout from '../layout';
import { addWeighted } from './crowding';
import { countOutcome } from './outcome';

export function count(record: usize): void {
  memory.fill(observed, 0, laneNumbers);
  for (let patch = 0; patch < patches; patch++) {
    const column = observed + <usize>(patch + 1) * laneNumbers;
    memory.fill(column, 0, laneNumbers);
    const row = animals + <usize>patch * rowBytes();
    for (let c = 0; c < classes; c++) addWeighted(column, row + <usize>c * cellBytes, 1);
    addNumbers(observed, column);
  }
  const outcomes = operand(record, layout.countOutcomes);
  for (let outcome = 0; outcome < outcomes; outcome++) countOutcome(record, outcome);
}

/** Stops every replicate in which more animals live than the kernel can count. */
export function checkTotals(index: i32): void {
  memory.fill(observed, 0, laneNumbers);
  for (let cell = animals; cell < animals + <usize>patches * rowBytes(); cell += cellBytes)
    addWeighted(observed, cell, 1);
  for (let lane = 0; lane < layout.lanes; lane++) {
    if (f64At(observed, lane) > layout.mostAnimals) stopLane(lane, layout.faultTooMany, index);
  }
}
