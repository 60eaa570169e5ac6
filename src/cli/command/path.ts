// skein path: the path without chance.
import { followPath } from '../../pipeline.ts';
import { withHiding } from '../../report/hiding/hide.ts';
import { pathText } from '../../report/path-text.ts';
import { askedFolder } from '../asked-folder.ts';
import { loadModel } from '../load.ts';
import { settingsOf, type CommonOptions } from '../options.ts';
import { writeOut } from '../output.ts';
import { askedHiding } from '../places.ts';
import { pathTables } from '../run-tables.ts';
import { terminalAt } from '../terminal.ts';

export async function pathCommand(path: string, options: CommonOptions): Promise<void> {
  const { compiled } = await loadModel(path, settingsOf(options), options);
  const folder = await askedFolder(options);
  const hidden = askedHiding(compiled, { ...options, path, written: folder !== null });
  const results = withHiding(followPath(compiled), hidden);
  folder?.write(compiled, { command: 'path', results, tables: pathTables(results), hidden });
  if (options.json === true) writeOut(`${JSON.stringify(results, null, 2)}\n`);
  else
    writeOut(
      `${pathText(results, { ...terminalAt('stdout'), animals: compiled.model.counts === 'females' ? 'females' : 'animals' }).trimEnd()}\n`,
    );
}
