// Runs the programs of the open image: one record after the other, each over all patches and lanes.
import { clearStopped, giveWeather, setStep, step, stepWithoutCalendar } from './batch';
import { entries, header, operand, section } from './image';
import * as layout from './layout';
import { age } from './phases/ageing';
import { breed } from './phases/breeding';
import { limit } from './phases/ceiling';
import { checkTotals, count } from './phases/count';
import { readCrowding } from './phases/crowding';
import { liveYear } from './phases/demography';
import { disperse } from './phases/dispersal';
import { handle } from './phases/handling';
import { release } from './phases/release';
import { survive } from './phases/survival';
import { strike } from './weather/catastrophe';
import { drive } from './weather/drivers';
import { respond } from './weather/response';
import { vary } from './weather/variation';

/** From one count to the next. */
export function advance(): void {
  setStep(step + 1);
  runProgram(header(layout.headerYearProgram));
  runProgram(header(layout.headerPhaseProgram));
}

/** The same under weather whose numbers of this step stand there already, as a run of the same replicates left them. */
export function advanceUnder(): void {
  giveWeather(true);
  advance();
  giveWeather(false);
}

/** The conditions of one more year, as those of the first year are, however many years there are. */
export function advanceWeather(): void {
  stepWithoutCalendar();
  runProgram(header(layout.headerYearProgram));
}

function runProgram(row: i32): void {
  const end = section(row) + ((<usize>entries(row)) << 2);
  for (let record = section(row); record < end; record += layout.recordBytes) {
    runRecord(record);
    clearStopped();
  }
}

/** Counts without a step: for the start. */
export function countStart(): void {
  const row = header(layout.headerPhaseProgram);
  const end = section(row) + ((<usize>entries(row)) << 2);
  for (let record = section(row); record < end; record += layout.recordBytes) {
    if (operand(record, layout.recordOpcode) === layout.opCount) count(record);
  }
}

function runRecord(record: usize): void {
  switch (operand(record, layout.recordOpcode)) {
    case layout.opBreeding:
      breed(record);
      checkTotals(operand(record, layout.recordIndex));
      break;
    case layout.opSurvival:
      survive(record);
      break;
    case layout.opAgeing:
      age(record);
      break;
    case layout.opDemography:
      liveYear(record);
      checkTotals(operand(record, layout.recordIndex));
      break;
    case layout.opDispersal:
      disperse(record);
      break;
    case layout.opCeiling:
      limit(record);
      break;
    case layout.opCrowding:
      readCrowding(record);
      break;
    case layout.opTake:
    case layout.opMove:
      handle(record);
      break;
    case layout.opAdd:
      release(record);
      checkTotals(operand(record, layout.recordIndex));
      break;
    case layout.opDrivers:
      drive(record);
      break;
    case layout.opVariation:
      vary(record);
      break;
    case layout.opResponse:
      respond(record);
      break;
    case layout.opCatastrophe:
      strike(record);
      break;
    case layout.opCount:
      count(record);
      break;
  }
}
