// skein run: stochastic replicates of one scenario.
import { runText } from '../../report/text.ts';
import { openOutFolder, type OutFolder } from '../out-folder.ts';
import { loadModel } from '../load.ts';
import { settingsOf, type CommonOptions } from '../options.ts';
import { writeOut } from '../output.ts';
import { runReplicates } from '../replicates.ts';
import { runTables } from '../tables.ts';
import { terminalOf } from '../terminal.ts';

export async function runCommand(path: string, options: CommonOptions): Promise<void> {
  const loaded = loadModel(path, settingsOf(options), options);
  const folder: OutFolder | null = options.out === undefined ? null : openOutFolder(options.out);
  const { compiled, results, cutShort } = await runReplicates(loaded.compiled, options);
  folder?.write(compiled, { results, tables: runTables(compiled.model, results) });
  if (options.json === true) writeOut(`${JSON.stringify(results, null, 2)}\n`);
  else {
    const animals = compiled.model.counts === 'females' ? 'females' : 'animals';
    writeOut(`${runText(results, { ...terminalOf(process.stdout), animals }).trimEnd()}\n`);
  }
  if (cutShort !== null) throw cutShort;
}
