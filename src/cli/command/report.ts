// skein report: one page that an agency can read.
import { pageScript } from '../../../build/page-script.ts';
import { withCriterionE } from '../../analysis/criterion-e.ts';
import { patchValues } from '../../analysis/patch-values.ts';
import { followPath } from '../../pipeline.ts';
import { withHiding } from '../../report/hiding/hide.ts';
import { buildReport } from '../../report/report.ts';
import type { RunResults } from '../../results/results.ts';
import { printSpec } from '../../spec/print.ts';
import { loadModel } from '../load.ts';
import { settingsOf, type CommonOptions } from '../options.ts';
import { pendingFile } from '../files.ts';
import { writeError, writeOut } from '../output.ts';
import { askedHiding } from '../places.ts';
import { runReplicates } from '../replicates.ts';
import { commandLineOf } from '../words.ts';
import { reportPlans } from './report-plans.ts';

export async function reportCommand(path: string, options: CommonOptions & { readonly output: string }): Promise<void> {
  const { document, files, ...loaded } = await loadModel(path, settingsOf(options), {
    ...options,
    everyScenario: options.scenario === undefined,
  });
  if (options.scenario === undefined && Object.keys(loaded.compiled.spec.scenarios ?? {}).length > 0) {
    return reportPlans({ document, files, ...loaded, path, options });
  }
  const file = options.output === '-' ? null : pendingFile(options.output);
  const { compiled, cutShort, ...ran } = await runReplicates(loaded.compiled, options);
  const hidden = askedHiding(compiled, { ...options, path, written: true });
  const results = withHiding(withCriterionE(compiled, ran.results), hidden);
  const done =
    cutShort === null ? options : { ...options, precision: undefined, atMost: undefined, ...finishedOf(results) };
  const page = buildReport({
    results,
    path: followPath(compiled),
    model: hidden?.model ?? compiled.model,
    landscape: compiled.landscape,
    coefficients: compiled.coefficients,
    patchValues: patchValues(compiled),
    specText: hidden?.specText ?? document.text,
    data: { files, drivers: compiled.spec.drivers, wholeText: hidden === null ? printSpec(compiled.spec) : null },
    commandLine: commandLineOf(['report', path], done, ['-o', options.output]),
    runLine: commandLineOf(['run', path], done, ['--out', 'results']),
    ...(hidden === null ? {} : { hiding: hidden }),
    pageScript,
  });
  if (file === null) writeOut(page);
  else file.finish(page);
  if (file !== null && options.quiet !== true) writeError(`Wrote ${options.output}\n`);
  if (cutShort !== null) throw cutShort;
}

/** What would have had to be asked for. */
function finishedOf({ replicates, draws }: RunResults): Pick<CommonOptions, 'replicates' | 'draws'> {
  return draws === undefined ? { replicates } : { replicates: draws.replicatesEach, draws: draws.number };
}
