// Plans for tests, each from a text of its own.
import type { PlanToRun } from '../../src/compare/plan.ts';
import { compileSpec } from '../../src/pipeline.ts';
import { withValues } from '../../src/results/draws/plan.ts';
import type { Settings } from '../../src/spec/settings.ts';
import { compileText } from '../pipeline/compile-text.ts';

export interface PlanText {
  readonly name: string;
  readonly text: string;
  /** Undiscounted, the same in every future. */
  readonly cost?: number;
}

export function planOf({ name, text, cost }: PlanText, settings: Settings = {}): PlanToRun {
  const compiled = compileText(text, settings);
  const moneyOf =
    cost === undefined ? null : () => ({ presentValue: cost, undiscounted: cost, least: cost, most: cost });
  return {
    name,
    actions: [],
    compiled,
    moneyOf,
    under: (values) => {
      const { compiled: drawn, findings } = compileSpec(withValues(compiled.spec, values));
      if (drawn !== null) return { compiled: drawn, moneyOf };
      return { compiled: null, failure: findings[0]?.message ?? '', moneyOf: null };
    },
  };
}
