// skein compare: the plans of a model against each other, in the same futures.
import { compareSpec } from '../../compare/compare-spec.ts';
import { plansOf } from '../../compare/plans-of.ts';
import type { PlanToRun } from '../../compare/plan.ts';
import type { PlansRun } from '../../compare/plans-run.ts';
import { compareText } from '../../report/compare/compare-text.ts';
import { hiddenComparison } from '../../report/hiding/hidden-comparison.ts';
import { loadAgain, refuseBesideAgain, type LoadedAgain } from '../again.ts';
import { askedFolder } from '../asked-folder.ts';
import { compareTables } from '../compare-tables.ts';
import { Ending, exitCodes } from '../exit.ts';
import { loadModel } from '../load.ts';
import { settingsOf, type CommonOptions } from '../options.ts';
import { writeOut } from '../output.ts';
import { askedHiding } from '../places.ts';
import { chosenPlans } from '../plans.ts';
import { threadsFor, withCrew } from '../replicates.ts';
import { tellNotSplit } from '../rare.ts';
import { terminalAt } from '../terminal.ts';

export interface CompareCommandOptions extends CommonOptions {
  /** A run.json. */
  readonly again?: string;
  readonly details?: boolean;
}

export async function compareCommand(path: string | undefined, options: CompareCommandOptions): Promise<void> {
  const { compiled, robust } = await load(path, options);
  tellNotSplit(compiled.model, 'A comparison', options.quiet);
  const spec = chosenPlans(compiled.spec, options.only);
  const plans = plansToCompare(plansOf(spec).plans);
  const folder = await askedFolder(options);
  const threads = options.threads ?? threadsFor(plans.map((plan) => plan.compiled));
  const done = await withCrew({ ...options, threads }, (crew, own) =>
    compareSpec(crew, { spec, plans }, { ...own, robust }),
  );
  if (done === null) throw new Ending(exitCodes.work, 'Stopped before the first futures of all plans were finished.');
  const { comparison, run } = done;
  const first = run.runs[0]?.compiled ?? compiled;
  const hidden = askedHiding(first, { ...options, path: path ?? options.again ?? '-', written: folder !== null });
  const results = hiddenComparison(comparison, hidden);
  folder?.write(first, { command: 'compare', results, tables: compareTables(results), threads, robust, hidden });
  if (options.json === true) writeOut(`${JSON.stringify(results, null, 2)}\n`);
  else {
    const animals = compiled.model.counts === 'females' ? 'females' : 'animals';
    writeOut(
      `${compareText(results, { ...terminalAt('stdout'), animals, details: options.details === true }).trimEnd()}\n`,
    );
  }
  const cut = cutShort(run, plans);
  if (cut !== null) throw cut;
}

async function load(path: string | undefined, options: CompareCommandOptions): Promise<LoadedAgain> {
  refuseBesideAgain(path, options);
  if (options.again !== undefined) return loadAgain(options.again, 'compare');
  const { compiled } = await loadModel(path ?? '-', settingsOf(options), { ...options, everyScenario: true });
  return { compiled, robust: options.robust === true };
}

/** The plans were compiled once already, so nothing can be wrong with them. */
export function plansToCompare(plans: readonly PlanToRun[] | null): readonly PlanToRun[] {
  if (plans === null) throw new Error('A model without mistakes has a plan that cannot be compiled.');
  if (plans.length > 1) return plans;
  const why =
    'The model has no plans: name some under `scenarios`, each a list of `actions`, and compare them with `as now`.';
  throw new Ending(exitCodes.model, why);
}

/** What is left is the comparison of fewer futures. */
export function cutShort({ futures, draws, runs }: PlansRun, [first]: readonly PlanToRun[]): Ending | null {
  const [asked, done] = [first?.compiled.model, runs[0]?.compiled.model];
  if (asked === undefined || done === undefined || (asked.replicates === done.replicates && asked.draws === done.draws))
    return null;
  const left = draws.length > 0 ? `--draws ${done.draws}` : `--replicates ${done.replicates}`;
  const words = `Stopped after ${futures.toLocaleString('en')} futures of each plan; the results are those of \`${left}\`.`;
  return new Ending(exitCodes.work, words);
}
