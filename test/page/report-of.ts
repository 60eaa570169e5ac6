// The report of a real model, from its text to the page, with the page script of the sources as they are now.
import { patchValues } from '../../src/analysis/patch-values.ts';
import { followPath, runModel, type CompiledModel } from '../../src/pipeline.ts';
import { buildReport, type ReportInput } from '../../src/report/report.ts';
import { printSpec } from '../../src/spec/print.ts';

export function reportOf(compiled: CompiledModel, more: Partial<ReportInput> = {}): string {
  const { model, landscape, coefficients, spec } = compiled;
  return buildReport({
    results: runModel(compiled),
    path: followPath(compiled),
    model,
    landscape,
    coefficients,
    patchValues: patchValues(compiled),
    specText: 'as written',
    data: { files: [], drivers: spec.drivers, wholeText: printSpec(spec) },
    commandLine: 'skein report model.yaml -o model.html',
    runLine: 'skein run model.yaml --out results',
    pageScript: '',
    ...more,
  });
}
