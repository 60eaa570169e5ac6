// Everything that a report is written from.
import type { Answer } from '../analysis/answer.ts';
import type { PatchValues } from '../analysis/patch-values.ts';
import type { CrowdingCoefficients } from '../compile/coefficients.ts';
import type { Landscape } from '../landscape/landscape.ts';
import type { Model } from '../model/model.ts';
import type { PathResults, RunResults } from '../results/results.ts';
import type { Hidden } from './hiding/hide.ts';
import type { Spec } from '../spec/schema/spec.ts';

export interface ReportInput {
  readonly results: RunResults;
  /** The path without chance; the spread over classes that movement is worked out with comes from it. */
  readonly path?: PathResults;
  readonly model: Model;
  readonly landscape: Landscape;
  /** In the order of the model's crowding; without them movement is not worked out for a model that has crowding. */
  readonly coefficients?: readonly CrowdingCoefficients[];
  /** What the patches are to the whole, or why that is not told. */
  readonly patchValues?: Answer<PatchValues>;
  readonly specText: string;
  /** Absent where the model reads no files and is not driven from outside. */
  readonly data?: InputData;
  /** As it can be typed again. */
  readonly commandLine: string;
  /** The same for the run whose tables and run.json hold what the page shows. */
  readonly runLine?: string;
  /** Where places are hidden: `model`, the hash and the texts are then those that may be handed out. */
  readonly hiding?: Pick<Hidden, 'places' | 'ring'>;
  /** The script of the page, as built from src/page/. */
  readonly pageScript: string;
}

/** What comes into the model from outside its text. */
export interface InputData {
  /** As the model names them. */
  readonly files: readonly string[];
  readonly drivers: Spec['drivers'];
  /** The model with what its files hold in their place; null where it is not to be shown. */
  readonly wholeText: string | null;
}
