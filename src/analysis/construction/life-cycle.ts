// Life cycles whose long run depends on the start, or that never settle. Each patch is looked at alone: which patches reach which
// others is told by an analysis.
import type { CompiledModel } from '../../pipeline.ts';
import { multipliersAtRest } from '../../compile/multipliers.ts';
import { patchYear } from '../../compile/patch-year.ts';
import { presentClasses } from '../../compile/present-classes.ts';
import type { Model } from '../../model/model.ts';
import { leading, type Leading } from '../../numeric/leading.ts';
import { principalPart } from '../../numeric/principal-part.ts';
import { sparseFromDense } from '../../numeric/sparse.ts';
import type { Finding } from '../../spec/finding.ts';

export function lifeCycle({ model }: CompiledModel): readonly Finding[] {
  const told = new Map<string, Finding>();
  model.patches.forEach((patch, p) => {
    const finding = judge(patch.name, cycleIn(model, p));
    if (finding !== null && !told.has(finding.details?.reason ?? '')) told.set(finding.details?.reason ?? '', finding);
  });
  return [...told.values()];
}

function cycleIn(model: Model, patch: number): Leading {
  const n = model.classes.length;
  const values = patchYear({ model, patch, multipliers: multipliersAtRest(model) });
  const present = presentClasses(model);
  const kept = model.classes.flatMap((_, c) => (present[c] === 1 ? [c] : []));
  return leading(principalPart(sparseFromDense({ rows: n, columns: n, values }), kept));
}

function judge(patch: string, { growthRate, irreducible, period, blocks }: Leading): Finding | null {
  if (growthRate === 0) return note(`In ${patch} no class leads back to itself: the animals only age`, noReturn);
  if (!irreducible) {
    const message = `In ${patch} the life cycle falls into ${String(blocks.length)} parts that do not all reach one another`;
    return note(message, parts);
  }
  if (period <= 1) return null;
  const message = `In ${patch} all loops of the life cycle take a multiple of ${String(period)} years`;
  return { ...note(message, swings), severity: 'warning' };
}

const noReturn =
  'Nobody is born, or no newborn reaches a class that breeds: everyone is gone after as many years as there are classes.';
const parts =
  'There are classes that never breed again, or that nobody comes to; the growth rate is that of the fastest part, and the long run may depend on who is there at the start (Caswell 2001).';
const swings = 'Numbers keep swinging with that period and never settle (an imprimitive matrix; Caswell 2001).';

function note(message: string, reason: string): Finding {
  return { severity: 'note', code: 'life-cycle', message, path: ['year'], part: 'key', details: { reason } };
}
