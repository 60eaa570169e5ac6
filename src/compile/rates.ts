// Reading a table at a step.
import type { RateTable } from '../model/model.ts';

/** The table that holds in a step (1-based). */
export function tableAt(table: RateTable, step: number): Float64Array {
  const epoch = table.epochOf[step - 1] ?? 0;
  return table.epochs[epoch] ?? new Float64Array(0);
}
