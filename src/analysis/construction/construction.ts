// What a careful reader asks about a model that compiles: warnings and notes, each with its reason and where it is from. The list
// follows what Kendall et al. (2019) and Morrison et al. (2016) found wrong in published matrix models.
import type { CompiledModel } from '../../pipeline.ts';
import type { Finding } from '../../spec/finding.ts';
import { birthdayDispersal } from './birthday.ts';
import { birthsOfBothSexes, newbornUnsurvived } from './births.ts';
import { uncountedCrowding } from './crowding.ts';
import { lifeCycle } from './life-cycle.ts';
import { longLives } from './longevity.ts';
import { fastGrowth } from './growth.ts';
import { longHorizon } from './horizon.ts';
import { settledOutcomes } from './outcomes.ts';
import { overlappingPatches } from './overlap.ts';
import { samplingSpread } from './sampling.ts';
import { apparentSurvival } from './sources.ts';
import { fastStages } from './stages.ts';

const checks: readonly ((compiled: CompiledModel) => readonly Finding[])[] = [
  birthsOfBothSexes,
  newbornUnsurvived,
  birthdayDispersal,
  overlappingPatches,
  longLives,
  fastGrowth,
  apparentSurvival,
  fastStages,
  lifeCycle,
  uncountedCrowding,
  samplingSpread,
  longHorizon,
  settledOutcomes,
];

export function constructionFindings(compiled: CompiledModel): readonly Finding[] {
  return checks.flatMap((check) => check(compiled));
}
