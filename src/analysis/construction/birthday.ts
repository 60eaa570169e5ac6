// Young that set out on the day they are born.
import type { CompiledModel } from '../../pipeline.ts';
import type { BreedingPhase, DispersalPhase, Model } from '../../model/model.ts';
import type { Finding } from '../../spec/finding.ts';

export function birthdayDispersal({ model }: CompiledModel): readonly Finding[] {
  return model.phases.flatMap((phase, at) => {
    if (phase.kind !== 'breeding') return [];
    const moving = firstMove(model, phase, at);
    if (moving === null) return [];
    const finding: Finding = {
      severity: 'warning',
      code: 'birthday-dispersal',
      message: `Those born in \`${phase.name}\` set out in \`${moving.name}\` before any survival`,
      path: ['year'],
      part: 'key',
      details: {
        found: model.year.join(', '),
        fix: `Let the survival of the first year stand before \`${moving.name}\`, or let an older class set out.`,
        reason:
          'Few animals leave on their birthday: too many set out, and they meet the dangers of their first year at another place than where they were born.',
      },
    };
    return [finding];
  });
}

/** The dispersal in which the young leave before they have lived through anything. */
function firstMove(model: Model, { into }: BreedingPhase, at: number): DispersalPhase | null {
  for (const phase of [...model.phases.slice(at + 1), ...model.phases.slice(0, at)]) {
    if (phase.kind === 'survival' || phase.kind === 'demography' || phase.kind === 'ageing') return null;
    if (phase.kind === 'dispersal' && into.some((share, c) => share > 0 && leaves(phase, c))) return phase;
  }
  return null;
}

function leaves({ moves, leaving }: DispersalPhase, c: number): boolean {
  if (moves[c] !== 1) return false;
  return leaving.epochs.some((epoch) => epoch.some((share, i) => i % moves.length === c && share > 0));
}
