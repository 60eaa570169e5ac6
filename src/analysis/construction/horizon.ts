// A look ahead that is long beside what was counted.
import type { CompiledModel } from '../../pipeline.ts';
import type { Finding } from '../../spec/finding.ts';

export function longHorizon({ model }: CompiledModel): readonly Finding[] {
  const years = (model.observed?.counts ?? []).map(({ year }) => year);
  if (years.length === 0) return [];
  const counted = Math.max(...years) - Math.min(...years) + 1;
  if (model.steps <= counted) return [];
  return [
    {
      severity: 'note',
      code: 'long-horizon',
      message: `The model looks ${String(model.steps)} years ahead, and the counts hold ${String(counted)}`,
      path: ['years'],
      details: {
        fix: 'Compare plans rather than trust a risk as it stands, and look at the nearer years first.',
        reason:
          'Errors of prediction grow fast beyond about a fifth of the length of the counts (Fieberg & Ellner 2000).',
      },
    },
  ];
}
