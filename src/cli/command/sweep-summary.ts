// skein sweep summary: what a whole sweep says.
import { sweepText } from '../../report/sweep-text.ts';
import { summariseSweep } from '../../sweep/summary/summarise.ts';
import { Ending, exitCodes } from '../exit.ts';
import { writeOut } from '../output.ts';
import { missingWords } from '../sweep/missing.ts';
import { openSweep } from '../sweep/opened.ts';
import { readSwept } from '../sweep/read-parts.ts';
import { finishedParts } from '../sweep/store.ts';
import { terminalOf } from '../terminal.ts';

export interface SummaryOptions {
  readonly json?: boolean;
}

export async function summariseFolder(folder: string, { json }: SummaryOptions): Promise<void> {
  const { manifest } = openSweep(folder);
  const missing = missingWords(manifest.parts, finishedParts(folder));
  if (missing !== null) throw new Ending(exitCodes.work, `The sweep in ${folder} is not whole: ${missing}.`);
  const summary = summariseSweep(await readSwept(folder, manifest));
  if (json === true) writeOut(`${JSON.stringify(summary, null, 2)}\n`);
  else writeOut(`${sweepText(summary, terminalOf(process.stdout)).trimEnd()}\n`);
}
