// The public library: from the text of a model to what a run says.
export type { Diagnostic, Place } from './diagnostic/diagnostic.ts';
export { renderDiagnostics } from './diagnostic/render.ts';
export { readSpec, type ReadSpec } from './spec/read.ts';
export type { SpecDocument } from './spec/document.ts';
export { locateFinding, type Finding } from './spec/finding.ts';
export { applySettings, type Settings } from './spec/settings.ts';
export { asNow } from './spec/plans/lay.ts';
export { scenariosOf, type Scenario, type ScenarioAction } from './spec/plans/scenarios.ts';
export { printSpec } from './spec/print.ts';
export type { Spec } from './spec/schema/spec.ts';
export {
  compileSpec,
  followPath,
  runModel,
  runModelWith,
  type Compilation,
  type CompiledModel,
  type CrewOptions,
  type FinishedRun,
  type RunOptions,
} from './pipeline.ts';
export { buildBlock } from './compile/block.ts';
export type { BlockMatrix } from './compile/block-matrix.ts';
export { leading, type Leading } from './numeric/leading.ts';
export type { SparseMatrix } from './numeric/sparse.ts';
export { totalCost, type CostRange, type HandledIn, type TotalCost } from './results/costs.ts';
export type { PlanCost } from './model/costs.ts';
export type { PathResults, RunResults } from './results/results.ts';
export { openManySolver, type ManyGrowths, type ManyRequest, type ManySolver } from './kernel/many-growths.ts';
export type { Crew, Job, JobOptions } from './kernel/crew.ts';
export { alone } from './threads/alone.ts';
export { openThreads, type ThreadsOptions } from './threads/threads.ts';
export { buildReport, type ReportInput } from './report/report.ts';
