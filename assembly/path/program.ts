// Runs the programs of the open image without chance.
import { entries, header, operand, section } from '../image';
import * as layout from '../layout';
import { meanAgeing, meanBreeding, meanCeiling, meanCrowding, meanDemography, meanSurvival } from './maps';
import { meanHandling, meanRelease } from './handling';
import { meanDispersal } from './movement';
import { meanCatastrophe, meanResponse, meanVariation } from './weather';
import { animals, fillPath, moved, setStep, step, takeConditions } from './state';

/** Puts the start into the path. */
export function startPath(): void {
  fillPath();
}

/** From one count to the next. */
export function stepPath(): void {
  setStep(step + 1);
  runProgram(header(layout.headerYearProgram));
  runProgram(header(layout.headerPhaseProgram));
}

/** The phases of the first year alone, on the animals of the path, under the conditions that a lane of the batch has now. */
export function stepPathUnder(lane: i32): void {
  setStep(1);
  takeConditions(lane);
  runProgram(header(layout.headerPhaseProgram));
}

/** Where the animals of the path stand. */
export function pathAnimals(): usize {
  return animals;
}

/** Where the animals that moved stand. */
export function pathMoved(): usize {
  return moved;
}

function runProgram(row: i32): void {
  const end = section(row) + ((<usize>entries(row)) << 2);
  for (let record = section(row); record < end; record += layout.recordBytes) runRecord(record);
}

function runRecord(record: usize): void {
  switch (operand(record, layout.recordOpcode)) {
    case layout.opBreeding:
      meanBreeding(record);
      break;
    case layout.opSurvival:
      meanSurvival(record);
      break;
    case layout.opAgeing:
      meanAgeing(record);
      break;
    case layout.opDemography:
      meanDemography(record);
      break;
    case layout.opDispersal:
      meanDispersal(record);
      break;
    case layout.opTake:
    case layout.opMove:
      meanHandling(record);
      break;
    case layout.opAdd:
      meanRelease(record);
      break;
    case layout.opCeiling:
      meanCeiling(record);
      break;
    case layout.opCrowding:
      meanCrowding(record);
      break;
    case layout.opVariation:
      meanVariation(record);
      break;
    case layout.opResponse:
      meanResponse(record);
      break;
    case layout.opCatastrophe:
      meanCatastrophe(record);
      break;
  }
}
