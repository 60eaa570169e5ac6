// skein report: one page that an agency can read.
import { pageScript } from '../../../build/page-script.ts';
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

export async function reportCommand(path: string, options: CommonOptions & { readonly output: string }): Promise<void> {
  const { document, files, ...loaded } = loadModel(path, settingsOf(options), options);
  const file = options.output === '-' ? null : pendingFile(options.output);
  const { compiled, cutShort, ...ran } = await runReplicates(loaded.compiled, options);
  const hidden = askedHiding(compiled, { ...options, path, written: true });
  const results = withHiding(ran.results, hidden);
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

/** As it can be typed again. */
function commandLineOf(first: readonly string[], options: CommonOptions, last: readonly string[]): string {
  const { years, replicates, seed, draws, precision, atMost, set, allow, places } = options;
  const words = ['skein', ...first];
  for (const { name, value } of set ?? []) words.push('--set', `${name}=${value}`);
  for (const folder of allow ?? []) words.push('--allow', folder);
  if (years !== undefined) words.push('--years', String(years));
  if (replicates !== undefined) words.push('--replicates', String(replicates));
  if (seed !== undefined) words.push('--seed', String(seed));
  if (draws !== undefined) words.push('--draws', String(draws));
  if (precision !== undefined) words.push('--precision', String(precision));
  if (atMost !== undefined) words.push('--at-most', String(atMost));
  if (places !== undefined) words.push('--places', places);
  return [...words, ...last].map(quoted).join(' ');
}

function quoted(word: string): string {
  return /^[\w./=:,+-]+$/.test(word) ? word : `'${word.replaceAll("'", `'\\''`)}'`;
}
