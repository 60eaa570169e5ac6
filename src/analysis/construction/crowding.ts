// Crowding that can never act, since it counts nobody where it is read.
import { readingPhase, multipliersAtRest } from '../../compile/multipliers.ts';
import { patchYear } from '../../compile/patch-year.ts';
import type { Compiled } from '../../compile/year-map.ts';
import type { Model } from '../../model/model.ts';
import { presentClasses } from '../../compile/present-classes.ts';
import type { Finding } from '../../spec/finding.ts';

export function uncountedCrowding({ model }: Compiled): readonly Finding[] {
  return model.crowding.flatMap((crowding, k) => {
    const reading = readingPhase(model, k);
    if (!Number.isFinite(reading) || model.patches.some((_, p) => counts(model, { k, reading, patch: p }))) return [];
    const phase = model.phases[reading]?.name ?? '';
    return [
      {
        severity: 'warning',
        code: 'uncounted-capacity',
        message: `The crowding counts nobody: none of its classes is there before \`${phase}\`, where it is read`,
        path: [crowding.name, 'counted'],
        details: {
          fix: `Count classes that are there before \`${phase}\`, or move \`count\` or \`ageing\` in \`year\`.`,
          reason:
            'It is read once a year, at the start of the first phase that it changes; there its count is always 0.',
        },
      },
    ];
  });
}

interface Place {
  readonly k: number;
  readonly reading: number;
  readonly patch: number;
}

/** Whether animals of every class that the count can hold bring anyone counted to the phase where crowding is read. */
function counts(model: Model, { k, reading, patch }: Place): boolean {
  const n = model.classes.length;
  const before = patchYear({ model, patch, multipliers: multipliersAtRest(model) }, reading);
  const present = presentClasses(model);
  const weights = model.crowding[k]?.counted;
  for (let to = 0; to < n; to++) {
    if ((weights?.[to] ?? 0) === 0) continue;
    for (let from = 0; from < n; from++) if (present[from] === 1 && (before[to * n + from] ?? 0) > 0) return true;
  }
  return false;
}
