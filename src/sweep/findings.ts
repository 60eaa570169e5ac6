// What stands against the section `sweep` of a model.
import type { CompiledModel } from '../pipeline.ts';
import type { Finding } from '../spec/finding.ts';
import { planSweep } from './request.ts';

export function sweepFindings(compiled: CompiledModel): readonly Finding[] {
  const { sweep } = compiled.spec;
  return sweep === undefined ? [] : planSweep(sweep, compiled).findings;
}
