// How conditions name the rates that they scale: by the phase, or by what a plain phase of the language holds.
import type { SpecPath } from '../spec/document.ts';
import { tellUnknown, type Context } from './context.ts';
import type { Phase, RatePart } from './model.ts';

export interface NamedRate {
  /** Index of the phase in the year. */
  readonly phase: number;
  readonly part: RatePart;
}

export interface RateName {
  readonly rate: string;
  readonly path: SpecPath;
  readonly phases: readonly Phase[];
}

/** The rate of this name, or null after telling that there is none. */
export function rateCalled(context: Context, { rate, path, phases }: RateName): NamedRate | null {
  const known = ratesByName(phases);
  const found = known.find(([name]) => name === rate);
  if (found !== undefined) return found[1];
  const names = known.map(([name]) => name);
  tellUnknown(context, {
    code: 'unknown-rate',
    what: 'rate in this year called',
    name: rate,
    known: names,
    path,
    part: 'key',
  });
  return null;
}

/** Several names may mean one rate. */
function ratesByName(phases: readonly Phase[]): readonly (readonly [string, NamedRate])[] {
  return phases.flatMap((phase, index): readonly (readonly [string, NamedRate])[] => {
    switch (phase.kind) {
      case 'survival':
        return [[phase.name, { phase: index, part: 'survival' }]];
      case 'breeding': {
        const births: NamedRate = { phase: index, part: 'births' };
        return phase.name === 'breeding'
          ? [
              ['births', births],
              ['breeding', births],
            ]
          : [[phase.name, births]];
      }
      case 'demography': {
        const fates: NamedRate = { phase: index, part: 'fates' };
        return [
          ['births', { phase: index, part: 'births' }],
          ['fates', fates],
          ['survival', fates],
        ];
      }
      case 'count':
      case 'ageing':
      case 'dispersal':
      case 'ceiling':
      case 'take':
      case 'move':
      case 'add':
        return [];
    }
  });
}
