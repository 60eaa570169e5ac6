// skein compile: the model as a file for other programs; what the file holds follows from the end of its name.
import { extname } from 'node:path';
import { buildBlock } from '../../compile/block.ts';
import { matrixColumns, matrixMarket, matrixRows } from '../../export/matrix-files.ts';
import { modelModule } from '../../export/model-module.ts';
import type { CompiledModel } from '../../pipeline.ts';
import { matrixJson } from '../../report/show/matrix.ts';
import { Ending, exitCodes } from '../exit.ts';
import { pendingFile } from '../files.ts';
import { loadModel } from '../load.ts';
import { settingsOf, type CommonOptions } from '../options.ts';
import { writeError } from '../output.ts';
import { csvText } from '../tables.ts';

const writers: Readonly<Record<string, (compiled: CompiledModel) => string | Uint8Array>> = {
  '.mtx': (compiled) => matrixMarket(buildBlock(compiled, 'zero'), compiled.model.title),
  '.csv': (compiled) => {
    const columns = matrixColumns.map((name) => ({ name, unit: '', meaning: '' }));
    return csvText({ columns, rows: matrixRows(buildBlock(compiled, 'zero')) });
  },
  '.json': (compiled) => `${JSON.stringify(matrixJson(compiled), null, 2)}\n`,
  '.wasm': modelModule,
};

export async function compileCommand(
  path: string,
  options: CommonOptions & { readonly output: string },
): Promise<void> {
  const { output, quiet } = options;
  const ending = extname(output);
  const write = Object.hasOwn(writers, ending) ? writers[ending] : undefined;
  if (write === undefined) {
    throw new Ending(exitCodes.usage, `-o ${output}: the name of the file ends in ${Object.keys(writers).join(', ')}.`);
  }
  const { compiled } = await loadModel(path, settingsOf(options), options);
  pendingFile(output).finish(write(compiled));
  if (quiet !== true) writeError(`Wrote ${output}\n`);
}
