// skein run: stochastic replicates of one scenario.
import { runModel } from '../../pipeline.ts';
import { runText } from '../../report/text.ts';
import { openOutFolder, type OutFolder } from '../out-folder.ts';
import { loadModel } from '../load.ts';
import { settingsOf, type CommonOptions } from '../options.ts';
import { writeOut } from '../output.ts';
import { showProgress } from '../progress.ts';
import { runTables } from '../tables.ts';
import { terminalOf } from '../terminal.ts';

export function runCommand(path: string, options: CommonOptions): void {
  const { compiled } = loadModel(path, settingsOf(options), options.quiet === true);
  const folder: OutFolder | null = options.out === undefined ? null : openOutFolder(options.out);
  const progress = showProgress('Replicates', options.quiet === true);
  const results = runModel(compiled, { onProgress: progress.update });
  progress.finish();
  folder?.write(compiled, { results, tables: runTables(compiled.model, results) });
  if (options.json === true) writeOut(`${JSON.stringify(results, null, 2)}\n`);
  else
    writeOut(
      `${runText(results, { ...terminalOf(process.stdout), animals: compiled.model.counts === 'females' ? 'females' : 'animals' }).trimEnd()}\n`,
    );
}
