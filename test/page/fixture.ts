// A plausible report input of eight patches, invented, without the pipeline: counts come from a small seeded toy.
import type { PatchRole } from '../../src/analysis/patches.ts';
import type { ReportInput } from '../../src/report/input.ts';
import { fixtureLandscape } from './fixture-landscape.ts';
import { fixtureModel, type ModelChoice } from './fixture-model.ts';
import { fixturePath, fixtureResults } from './fixture-results.ts';

export interface FixtureChoice extends ModelChoice {
  readonly movement?: boolean;
  readonly pageScript?: string;
  /** Multiplies the growth of every patch. */
  readonly growth?: number;
}

export function fixture(choice: FixtureChoice = {}): ReportInput {
  const model = fixtureModel(choice);
  const input = {
    model,
    landscape: fixtureLandscape(),
    results: fixtureResults(model, choice.growth ?? 1),
    specText: choice.text ?? 'skein: 1\nstudy:\n  title: Reed hare on the Harrow Levels\n',
    commandLine: 'skein report reed-hare.yaml -o report.html',
    pageScript: choice.pageScript ?? '',
    coefficients: [],
    patchValues: { value: { growthRate: 1.01, patches: worths } },
  };
  return choice.movement === false ? input : { ...input, path: fixturePath(model) };
}

/** In the order of the sites; made up like all else. */
const worths: readonly PatchRole[] = [0.97, 1, 0.94, 1.04, 1.03, 1.06, 1.01, 0.99].map((contribution) => ({
  growthAlone: contribution - 0.08,
  contribution,
  selfRecruitment: contribution - 0.1,
  role: contribution === 1 ? 'undecided' : contribution > 1 ? 'source' : 'sink',
}));
