// Which entrance each trial of a level begins at: all equally often, and the rest drawn without replacement, so that every
// entrance has the same expected number of trials.
import { keyOfName } from '../../compile/image/keys.ts';
import type { Entrance } from '../../kernel/trials.ts';
import { uniformAt } from '../../machine/random.ts';

const ofAssignment = keyOfName('entrance of a trial');

export interface Assignment {
  readonly trials: number;
  readonly seed: number;
  /** Which of all assignments under this seed it is. */
  readonly words: readonly [number, number];
}

export function assigned(entrances: readonly Entrance[], { trials, seed, words }: Assignment): readonly Entrance[] {
  const all = Math.floor(trials / entrances.length);
  const chosen = Array.from({ length: all }, () => entrances).flat();
  const left = [...entrances];
  for (let i = 0; chosen.length < trials; i++) {
    const uniform = uniformAt({ seed, words: [words[0], words[1], ofAssignment] }, i);
    const picked = i + Math.floor(uniform * (left.length - i));
    const [one, other] = [left[i], left[picked]];
    if (one === undefined || other === undefined) break;
    [left[i], left[picked]] = [other, one];
    chosen.push(other);
  }
  return chosen;
}
