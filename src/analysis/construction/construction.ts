// What a careful reader asks about a model that compiles: warnings and notes, each with its reason and where it is from.
import type { CompiledModel } from '../../pipeline.ts';
import type { Finding } from '../../spec/finding.ts';
import { uncountedCrowding } from './crowding.ts';
import { alreadyBelow } from './outcomes.ts';

export function constructionFindings(compiled: CompiledModel): readonly Finding[] {
  return [uncountedCrowding, alreadyBelow].flatMap((check) => check(compiled));
}
