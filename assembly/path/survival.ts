// The mean of a survival.
import { classes, operand, section, sectionAt } from '../image';
import * as layout from '../layout';
import { scaleByPatch, scaleOf } from './rows';
import { rowAt, step, workRow } from './state';
import { rowOf, tableOf } from './tables';

export function meanSurvival<N>(record: usize): void {
  const table = tableOf(record, 0, sectionAt(operand(record, layout.survivalRates), step), classes);
  const lists = section(operand(record, layout.survivalSlots));
  for (let c = 0; c < classes; c++) {
    scaleByPatch<N>(rowAt(c), rowAt(c), rowOf(table, c), scaleOf(lists, c, workRow(0)));
  }
}
