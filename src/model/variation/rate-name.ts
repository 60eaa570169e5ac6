// How a rate is named where it is varied or multiplied: by its phase, or by what a plain phase of the language holds.
import type { SpecPath } from '../../spec/document.ts';
import type { ScaledPart } from '../chance.ts';
import { tellUnknown, type Context } from '../context.ts';
import type { Phase, RateTable } from '../model.ts';

export interface NamedRates {
  readonly phase: number;
  readonly part: ScaledPart;
}

export function findRates(phases: readonly Phase[], name: string): NamedRates | null {
  return named(phases).find(([known]) => known === name)?.[1] ?? null;
}

export function tellNoRates(context: Context, name: string, path: SpecPath, phases: readonly Phase[]): void {
  const known = [...named(phases).map(([one]) => one), ...Object.keys(context.spec.parameters ?? {})];
  tellUnknown(context, { code: 'unknown-rate', what: 'rate or parameter', name, known, path, part: 'key' });
}

function named(phases: readonly Phase[]): readonly (readonly [string, NamedRates])[] {
  return phases.flatMap((phase, index): readonly (readonly [string, NamedRates])[] => {
    switch (phase.kind) {
      case 'survival':
        return [[phase.name, { phase: index, part: 'survival' }]];
      case 'breeding':
        return [[phase.name === 'breeding' ? 'births' : phase.name, { phase: index, part: 'births' }]];
      case 'demography':
        return [
          ['fates', { phase: index, part: 'fates' }],
          ['births', { phase: index, part: 'births' }],
        ];
      case 'dispersal':
        return [[phase.name, { phase: index, part: 'leaving' }]];
      default:
        return [];
    }
  });
}

/** What such a rate is called: `survival of adult`. */
export function rateWords(context: Pick<Context, 'classes'>, name: string, c: number): string {
  return `${name} of ${context.classes[c] ?? ''}`;
}

/** Mean of a rate in a patch; for a matrix the sum of the column. */
export function meanRate(phase: Phase, part: ScaledPart, { classes, epoch, patch, c }: RatePlace): number {
  const table = tableOf(phase, part)?.epochs;
  const values = table?.[Math.min(epoch, table.length - 1)];
  if (values === undefined) return 0;
  if (phase.kind !== 'demography') return values[patch * classes + c] ?? 0;
  let sum = 0;
  for (let to = 0; to < classes; to++) sum += values[(patch * classes + to) * classes + c] ?? 0;
  return sum;
}

export interface RatePlace {
  readonly classes: number;
  readonly epoch: number;
  readonly patch: number;
  readonly c: number;
}

export function tableOf(phase: Phase, part: ScaledPart): RateTable | null {
  switch (phase.kind) {
    case 'survival':
      return part === 'survival' ? phase.survival : null;
    case 'breeding':
      return part === 'births' ? phase.births : null;
    case 'dispersal':
      return part === 'leaving' ? phase.leaving : null;
    case 'demography':
      return part === 'fates' ? phase.fates : part === 'births' ? phase.births : null;
    default:
      return null;
  }
}
