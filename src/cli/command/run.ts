// skein run: stochastic replicates of one scenario.
import { withCriterionE } from '../../analysis/criterion-e.ts';
import type { CompiledModel } from '../../pipeline.ts';
import { withHiding } from '../../report/hiding/hide.ts';
import { runText } from '../../report/text.ts';
import { loadAgain, refuseBesideAgain } from '../again.ts';
import { askedFolder } from '../asked-folder.ts';
import { loadModel } from '../load.ts';
import { settingsOf, type CommonOptions } from '../options.ts';
import { writeOut } from '../output.ts';
import { askedHiding } from '../places.ts';
import { runReplicates } from '../replicates.ts';
import { runTables } from '../run-tables.ts';
import { terminalAt } from '../terminal.ts';

export interface RunCommandOptions extends CommonOptions {
  /** A run.json. */
  readonly again?: string;
}

export async function runCommand(path: string | undefined, options: RunCommandOptions): Promise<void> {
  const asked = await load(path, options);
  const folder = await askedFolder(options);
  const { compiled, threads, cutShort, ...done } = await runReplicates(asked, options);
  const hidden = askedHiding(compiled, { ...options, path: path ?? options.again ?? '-', written: folder !== null });
  const results = withHiding(withCriterionE(compiled, done.results), hidden);
  const tables = runTables(hidden?.model ?? compiled.model, results);
  folder?.write(compiled, { command: 'run', results, tables, threads, hidden });
  if (options.json === true) writeOut(`${JSON.stringify(results, null, 2)}\n`);
  else {
    const animals = compiled.model.counts === 'females' ? 'females' : 'animals';
    writeOut(`${runText(results, { ...terminalAt('stdout'), animals }).trimEnd()}\n`);
  }
  if (cutShort !== null) throw cutShort;
}

async function load(path: string | undefined, options: RunCommandOptions): Promise<CompiledModel> {
  refuseBesideAgain(path, options);
  if (options.again !== undefined) return loadAgain(options.again, 'run').compiled;
  return (await loadModel(path ?? '-', settingsOf(options), options)).compiled;
}
