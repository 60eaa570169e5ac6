// skein sweep summary: what a whole sweep says.
import { sweepPage } from '../../report/sweep/sweep-page.ts';
import { summariseSweep } from '../../sweep/summary/summarise.ts';
import { Ending, exitCodes } from '../exit.ts';
import { pendingFile } from '../files.ts';
import { missingWords } from '../sweep/missing.ts';
import { openSweep } from '../sweep/opened.ts';
import { readSwept } from '../sweep/read-parts.ts';
import { finishedParts } from '../sweep/store.ts';
import { tellSweep, type TellingOptions } from '../sweep/tell.ts';

export interface SummaryOptions extends TellingOptions {
  /** An HTML file to write. */
  readonly page?: string;
}

export async function summariseFolder(folder: string, options: SummaryOptions): Promise<void> {
  const { page } = options;
  const { manifest } = openSweep(folder);
  const missing = missingWords(manifest.parts, finishedParts(folder));
  if (missing !== null) throw new Ending(exitCodes.work, `The sweep in ${folder} is not whole: ${missing}.`);
  const file = page === undefined ? null : pendingFile(page);
  const swept = await readSwept(folder, manifest);
  const summary = summariseSweep(swept);
  file?.finish(sweepPage(swept, summary));
  tellSweep(summary, options);
}
