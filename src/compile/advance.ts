// The share of a class that goes on at ageing.
import type { AgeingPhase } from '../model/model.ts';

export interface AgeingPlace {
  readonly patch: number;
  readonly class: number;
}

export function advanceAt({ advance, advanceIn }: AgeingPhase, { patch, class: c }: AgeingPlace): number {
  return (advanceIn === undefined ? advance[c] : advanceIn[patch * advance.length + c]) ?? 0;
}
