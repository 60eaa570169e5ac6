// Everything that the report of a comparison is written from.
import type { Comparison } from '../../compare/results.ts';
import type { ReportInput } from '../input.ts';

/** One plan as a report of it alone would need it. */
export interface PlanReport {
  readonly name: string;
  readonly input: Omit<ReportInput, 'specText' | 'data' | 'commandLine' | 'runLine' | 'pageScript'>;
}

export interface PlansReportInput extends ReportInput {
  readonly comparison: Comparison;
  /** As in the comparison; the first is what the rest of the input is of. */
  readonly plans: readonly PlanReport[];
}
