// skein analyse: what drives growth, which patches feed the others, and whether the matrix says what was meant.
import type { Compared } from '../../analysis/against.ts';
import { analyseModel } from '../../analysis/analyse-model.ts';
import type { AtState } from '../../compile/block-matrix.ts';
import type { CompiledModel } from '../../pipeline.ts';
import { analysisText } from '../../report/analysis/analysis-text.ts';
import { scenariosOf } from '../../spec/plans/scenarios.ts';
import { analysisTables } from '../analysis-tables.ts';
import { askedFolder } from '../asked-folder.ts';
import { Ending, exitCodes } from '../exit.ts';
import { loadModel } from '../load.ts';
import { settingsOf, type CommonOptions } from '../options.ts';
import { writeOut } from '../output.ts';
import { terminalAt } from '../terminal.ts';

export interface AnalyseCommandOptions extends CommonOptions {
  readonly at: AtState;
  readonly eigenvalues?: boolean;
  readonly against?: string;
}

export async function analyseCommand(path: string, options: AnalyseCommandOptions): Promise<void> {
  const { compiled } = await loadModel(path, settingsOf(options), options);
  const against =
    options.against === undefined ? {} : { against: await comparedWith(path, options.against, options, compiled) };
  const folder = await askedFolder(options);
  const found = analyseModel(compiled, { at: options.at, ...against, wantEigenvalues: options.eigenvalues === true });
  if (found.value === null) throw new Ending(exitCodes.work, `--at ${options.at}: ${found.reason}`);
  folder?.write(compiled, { command: 'analyse', results: found.value, tables: analysisTables(found.value) });
  if (options.json === true) writeOut(`${JSON.stringify(found.value, null, 2)}\n`);
  else writeOut(analysisText(found.value, terminalAt('stdout')));
}

/** A scenario of the same model, else another model. */
async function comparedWith(
  path: string,
  other: string,
  options: AnalyseCommandOptions,
  compiled: CompiledModel,
): Promise<Compared> {
  const quietly = { ...options, quiet: true };
  if (scenariosOf(compiled.spec).some(({ name }) => name === other)) {
    const found = await loadModel(path, { ...settingsOf(options), scenario: other }, quietly);
    return { name: other, compiled: found.compiled };
  }
  const { compiled: found } = await loadModel(other, {}, quietly);
  return { name: found.model.title, compiled: found };
}
