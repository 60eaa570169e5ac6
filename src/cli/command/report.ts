// skein report: one page that an agency can read.
import { pageScript } from '../../../build/page-script.ts';
import { patchValues } from '../../analysis/patch-values.ts';
import { followPath } from '../../pipeline.ts';
import { buildReport } from '../../report/report.ts';
import { loadModel } from '../load.ts';
import { settingsOf, type CommonOptions } from '../options.ts';
import { pendingFile } from '../files.ts';
import { writeError, writeOut } from '../output.ts';
import { runReplicates } from '../replicates.ts';

export async function reportCommand(path: string, options: CommonOptions & { readonly output: string }): Promise<void> {
  const { document, ...loaded } = loadModel(path, settingsOf(options), options);
  const file = options.output === '-' ? null : pendingFile(options.output);
  const { compiled, results, cutShort } = await runReplicates(loaded.compiled, options);
  const page = buildReport({
    results,
    path: followPath(compiled),
    model: compiled.model,
    landscape: compiled.landscape,
    coefficients: compiled.coefficients,
    patchValues: patchValues(compiled),
    specText: document.text,
    commandLine: commandLineOf(path, cutShort === null ? options : { ...options, replicates: results.replicates }),
    pageScript,
  });
  if (file === null) writeOut(page);
  else file.finish(page);
  if (file !== null && options.quiet !== true) writeError(`Wrote ${options.output}\n`);
  if (cutShort !== null) throw cutShort;
}

/** As it can be typed again. */
function commandLineOf(path: string, options: CommonOptions & { readonly output: string }): string {
  const { years, replicates, seed, set, output } = options;
  const words = ['skein', 'report', path];
  for (const { name, value } of set ?? []) words.push('--set', `${name}=${value}`);
  if (years !== undefined) words.push('--years', String(years));
  if (replicates !== undefined) words.push('--replicates', String(replicates));
  if (seed !== undefined) words.push('--seed', String(seed));
  return [...words, '-o', output].map(quoted).join(' ');
}

function quoted(word: string): string {
  return /^[\w./=:,+-]+$/.test(word) ? word : `'${word.replaceAll("'", `'\\''`)}'`;
}
