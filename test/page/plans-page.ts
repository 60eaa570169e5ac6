// The report of the comparison of the flagship's plans. What other models say is made up, so that every case is there.
import { readFileSync } from 'node:fs';
import { patchValues } from '../../src/analysis/patch-values.ts';
import { compareSpec } from '../../src/compare/compare-spec.ts';
import { plansOf } from '../../src/compare/plans-of.ts';
import type { Robustness } from '../../src/compare/results.ts';
import { followPath } from '../../src/pipeline.ts';
import { buildPlansReport } from '../../src/report/plans/report.ts';
import { applySettings } from '../../src/spec/settings.ts';
import { readSpec } from '../../src/spec/read.ts';
import { alone } from '../../src/threads/alone.ts';
import { pageScript } from './report-page.ts';

const robustness: readonly Robustness[] = [
  {
    variant: 'the other answer to where leavers end',
    what: 'leavers of natal: may miss',
    notRun: null,
    order: ['mow later', 'as now'],
    supports: ['mow later'],
    holds: false,
    reversed: [{ better: 'mow later', worse: 'hedge and moves', toldApart: false, equal: false }],
  },
  {
    variant: 'another form of crowding',
    what: 'crowding by the form ricker',
    notRun: null,
    order: ['mow later', 'as now'],
    supports: [],
    holds: true,
    reversed: [],
  },
  {
    variant: 'a second threshold',
    what: '',
    notRun: 'the model names no outcome',
    order: [],
    supports: [],
    holds: null,
    reversed: [],
  },
];

export async function plansPage(): Promise<string> {
  const text = readFileSync(new URL('../../models/reed-hare.yaml', import.meta.url), 'utf8');
  const applied = applySettings(readSpec(text, 'reed-hare.yaml').document!.spec, { replicates: 300 });
  if (!applied.ok) throw new Error('The flagship takes fewer replicates.');
  const { spec } = applied;
  const { comparison, run } = (await compareSpec(alone, { spec, plans: plansOf(spec).plans! }))!;
  const plans = run.runs.map(({ plan, compiled, results }) => ({
    name: plan.name,
    input: {
      results,
      path: followPath(compiled),
      model: compiled.model,
      landscape: compiled.landscape,
      coefficients: compiled.coefficients,
      patchValues: patchValues(compiled),
    },
  }));
  return buildPlansReport({
    ...plans[0]!.input,
    specText: text,
    commandLine: 'skein report models/reed-hare.yaml -o reed-hare.html',
    pageScript: await pageScript(),
    comparison: { ...comparison, robustness },
    plans,
  });
}
