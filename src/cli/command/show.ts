// skein show: what a stage of the work makes of a model.
import { describeImage, imageJson } from '../../compile/image/describe.ts';
import type { CompiledModel } from '../../pipeline.ts';
import { landscapeJson, landscapeText } from '../../report/show/landscape.ts';
import { matrixJson, matrixText } from '../../report/show/matrix.ts';
import { modelJson, modelText } from '../../report/show/model.ts';
import { printSpec } from '../../spec/print.ts';
import { Ending, exitCodes } from '../exit.ts';
import { loadModel } from '../load.ts';
import { settingsOf, type CommonOptions } from '../options.ts';
import { writeOut } from '../output.ts';
import { specJson } from '../spec-json.ts';

interface Printer {
  text(compiled: CompiledModel): string;
  json(compiled: CompiledModel): unknown;
}

const printers: Readonly<Record<string, Printer>> = {
  spec: { text: ({ spec }) => printSpec(spec), json: ({ spec }) => specJson(spec) },
  model: { text: ({ model }) => modelText(model), json: ({ model }) => modelJson(model) },
  landscape: { text: landscapeText, json: landscapeJson },
  matrix: { text: matrixText, json: matrixJson },
  packed: { text: ({ image }) => describeImage(image), json: ({ image }) => imageJson(image) },
};

export async function showStage(path: string, stage: string, options: CommonOptions): Promise<void> {
  const printer = Object.hasOwn(printers, stage) ? printers[stage] : undefined;
  if (printer === undefined) {
    throw new Ending(
      exitCodes.usage,
      `There is no stage \`${stage}\`. There are: ${Object.keys(printers).join(', ')}.`,
    );
  }
  const { compiled } = await loadModel(path, settingsOf(options), options);
  writeOut(
    options.json === true
      ? `${JSON.stringify(printer.json(compiled), null, 2)}\n`
      : `${printer.text(compiled).trimEnd()}\n`,
  );
}
