// What a command tells of a whole sweep, and the log that it leaves beside it.
import { join } from 'node:path';
import { sweepText } from '../../report/sweep/sweep-text.ts';
import type { SweepSummary } from '../../sweep/summary/summarise.ts';
import { pendingFile } from '../files.ts';
import { logOf, type Work } from '../log.ts';
import { writeOut } from '../output.ts';
import { terminalAt } from '../terminal.ts';

export interface TellingOptions {
  readonly json?: boolean;
  /** Everything, not only what leads to an answer. */
  readonly details?: boolean;
}

export function tellSweep(summary: SweepSummary, { json, details }: TellingOptions): void {
  if (json === true) writeOut(`${JSON.stringify(summary, null, 2)}\n`);
  else writeOut(`${sweepText(summary, { ...terminalAt('stdout'), details: details === true }).trimEnd()}\n`);
}

export function writeLog(folder: string, work: Work): void {
  pendingFile(join(folder, 'log.json')).finish(`${JSON.stringify(logOf(work), null, 2)}\n`);
}
