// What takes, moves and releases came to over the runs.
import { isHandling } from '../compile/image/handling.ts';
import type { Model } from '../model/model.ts';
import type { Counts } from './reduction/counts.ts';
import type { Reduction } from './reduction/reduction.ts';
import type { Amounts, HandledResult } from './results.ts';

export function summariseHandled({ phases, firstYear, steps }: Model, reduction: Reduction): readonly HandledResult[] {
  const { runs } = reduction;
  return phases.filter(isHandling).flatMap((phase, h): readonly HandledResult[] => {
    const totals = reduction.handled[h];
    if (totals === undefined) return [];
    const amounts = (counts: readonly Counts[], cell: number) => partsOf(counts, cell, runs);
    return [
      {
        phase: phase.name,
        does: phase.kind,
        byYear: Array.from({ length: steps }, (_, t) => ({ year: firstYear + t, ...amounts(totals.byStep, t) })),
        inAll: amounts(totals.inAll, 0),
      },
    ];
  });
}

function partsOf([handled, died, shortfall]: readonly Counts[], cell: number, runs: number): HandledResult['inAll'] {
  const amounts = (counts: Counts | undefined): Amounts => {
    if (counts === undefined) throw new Error('A take, move or release has three columns.');
    return counts.summary(cell, runs);
  };
  return { handled: amounts(handled), died: amounts(died), shortfall: amounts(shortfall) };
}
