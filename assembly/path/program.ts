// Runs the programs of the open image without chance: on the path, and on sixteen courses at a time under the conditions of the batch.
import { entries, header, operand, section } from '../image';
import * as layout from '../layout';
import { meanAgeing } from './ageing';
import { meanBreeding } from './breeding';
import { meanCeiling } from './ceiling';
import { meanCrowding } from './crowding';
import { meanDemography } from './demography';
import { meanHandling, meanRelease } from './handling';
import { meanDispersal } from './movement';
import { fillStart, useCourses, usePath } from './state';
import { meanSurvival } from './survival';
import { forgetTables } from './tables';
import { meanCatastrophe, meanResponse, meanVariation } from './weather';

let stepOfPath: i32 = 0;

/** Puts the start into the path; the tables of the image are read anew. */
export function startPath(): void {
  forgetTables();
  rewindPath();
  usePath(0);
  fillStart();
}

/** The next step is the first. */
export function rewindPath(): void {
  stepOfPath = 0;
}

/** From one count to the next. */
export function stepPath(): void {
  stepOfPath += 1;
  usePath(stepOfPath);
  setWeather();
  runPhases<f64>();
}

/** The phases of the first year on all courses, each under the conditions that a lane of the batch has now. */
export function stepCourses(): void {
  useCourses();
  runPhases<v128>();
}

function setWeather(): void {
  const row = header(layout.headerYearProgram);
  const end = section(row) + ((<usize>entries(row)) << 2);
  for (let record = section(row); record < end; record += layout.recordBytes) {
    switch (operand(record, layout.recordOpcode)) {
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
}

function runPhases<N>(): void {
  const row = header(layout.headerPhaseProgram);
  const end = section(row) + ((<usize>entries(row)) << 2);
  for (let record = section(row); record < end; record += layout.recordBytes) runPhase<N>(record);
}

function runPhase<N>(record: usize): void {
  switch (operand(record, layout.recordOpcode)) {
    case layout.opBreeding:
      meanBreeding<N>(record);
      break;
    case layout.opSurvival:
      meanSurvival<N>(record);
      break;
    case layout.opAgeing:
      meanAgeing<N>(record);
      break;
    case layout.opDemography:
      meanDemography<N>(record);
      break;
    case layout.opDispersal:
      meanDispersal<N>(record);
      break;
    case layout.opCeiling:
      meanCeiling<N>(record);
      break;
    case layout.opCrowding:
      meanCrowding<N>(record);
      break;
    case layout.opTake:
    case layout.opMove:
      meanHandling(record);
      break;
    case layout.opAdd:
      meanRelease(record);
      break;
  }
}
