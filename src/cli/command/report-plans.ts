// skein report of a model with plans: the page of their comparison.
import { pageScript } from '../../../build/page-script.ts';
import { withCriterionE } from '../../analysis/criterion-e.ts';
import { patchValues } from '../../analysis/patch-values.ts';
import { compareSpec } from '../../compare/compare-spec.ts';
import { plansOf } from '../../compare/plans-of.ts';
import type { PlanRun } from '../../compare/plans-run.ts';
import { followPath } from '../../pipeline.ts';
import { hiddenComparison } from '../../report/hiding/hidden-comparison.ts';
import { hiddenPlan, withHiding, type Hidden } from '../../report/hiding/hide.ts';
import type { PlanReport } from '../../report/plans/input.ts';
import { buildPlansReport } from '../../report/plans/report.ts';
import { printSpec } from '../../spec/print.ts';
import { Ending, exitCodes } from '../exit.ts';
import { pendingFile } from '../files.ts';
import type { LoadedModel } from '../load.ts';
import type { CommonOptions } from '../options.ts';
import { writeError, writeOut } from '../output.ts';
import { askedHiding } from '../places.ts';
import { chosenPlans } from '../plans.ts';
import { threadsFor, withCrew } from '../replicates.ts';
import { commandLineOf } from '../words.ts';
import { cutShort, plansToCompare } from './compare.ts';

export interface PlansReportRequest extends LoadedModel {
  readonly path: string;
  readonly options: CommonOptions & { readonly output: string };
}

export async function reportPlans({ document, files, compiled, path, options }: PlansReportRequest): Promise<void> {
  const spec = chosenPlans(compiled.spec, options.only);
  const plans = plansToCompare(plansOf(spec).plans);
  const file = options.output === '-' ? null : pendingFile(options.output);
  const threads = options.threads ?? threadsFor(plans.map((plan) => plan.compiled));
  const robust = options.robust === true;
  const done = await withCrew({ ...options, threads }, (crew, own) =>
    compareSpec(crew, { spec, plans }, { ...own, robust }),
  );
  const [first] = done?.run.runs ?? [];
  if (done === null || first === undefined) {
    throw new Ending(exitCodes.work, 'Stopped before the first futures of all plans were finished.');
  }
  const hidden = askedHiding(first.compiled, { ...options, path, written: true });
  const cut = cutShort(done.run, plans);
  const { replicates, draws } = first.compiled.model;
  const asked = cut === null ? options : { ...options, precision: undefined, atMost: undefined, replicates, draws };
  const page = buildPlansReport({
    ...planInput(first, hidden),
    specText: hidden?.specText ?? document.text,
    data: { files, drivers: spec.drivers, wholeText: hidden === null ? printSpec(spec) : null },
    commandLine: commandLineOf(['report', path], asked, ['-o', options.output]),
    runLine: commandLineOf(['compare', path], asked, ['--out', 'results']),
    ...(hidden === null ? {} : { hiding: hidden }),
    pageScript,
    comparison: hiddenComparison(done.comparison, hidden),
    plans: done.run.runs.map((run) => ({ name: run.plan.name, input: planInput(run, hidden) })),
  });
  if (file === null) writeOut(page);
  else file.finish(page);
  if (file !== null && options.quiet !== true) writeError(`Wrote ${options.output}\n`);
  if (cut !== null) throw cut;
}

function planInput({ compiled, results }: PlanRun, hidden: Hidden | null): PlanReport['input'] {
  return {
    results: withHiding(withCriterionE(compiled, results), hidden),
    path: followPath(compiled),
    model: hidden === null ? compiled.model : hiddenPlan(compiled.model, hidden),
    landscape: compiled.landscape,
    coefficients: compiled.coefficients,
    patchValues: patchValues(compiled),
    ...(hidden === null ? {} : { hiding: hidden }),
  };
}
