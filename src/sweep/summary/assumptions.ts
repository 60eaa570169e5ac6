// What the numbers of sensitivity take for granted, in words.
import type { DesignName } from '../design/design.ts';

interface Drawn {
  readonly runs: boolean;
  /** Whether plans are told apart. */
  readonly told: boolean;
}

export function assumptionsOf(design: DesignName, { runs, told }: Drawn): readonly string[] {
  const own: Readonly<Record<DesignName, readonly string[]>> = {
    grid: [ranksAssume, explainedAssumes],
    list: [ranksAssume, explainedAssumes],
    'latin hypercube': [ranksAssume, explainedAssumes],
    sobol: [ranksAssume, explainedAssumes],
    'one at a time': [
      'One number at a time says nothing of what two do together, and holds around the model as it stands only.',
    ],
    'sobol indices': [
      'Shares of the variance (Saltelli et al. 2010, Jansen 1999) take the numbers as independent of each other and every value of their ranges as it is drawn; they answer to the ranges that were given. Bands are from drawing the rows again (95 %).',
    ],
    morris: [
      'Screening (Morris 1991) ranks; it does not share out a variance. Effects are over the whole range of a number. A spread as large as the mean size says that the number acts together with others or not along a line.',
    ],
  };
  const noise =
    'Every point has the same futures (common random numbers). What comes from the number of replicates is told apart by running each point in two halves: products of one half with the other hold no noise on average.';
  return [...own[design], ...(runs ? [noise] : []), ...(told ? [toldAssumes] : [])];
}

/** What telling plans apart rests on. */
export const toldAssumes =
  'Plans are told apart at a point where the 95 % interval of their paired difference does not hold 0 (of chances by Bonett & Price 2012, else by Student’s t), at each point by itself: of a hundred points at which two plans are equally good about five tell them apart by chance.';
const ranksAssume =
  'Partial rank correlations hold where the measure only rises or only falls with a number; noise of replicates draws them towards 0.';
const explainedAssumes =
  'The share of the variance between the values of one number takes the numbers as independent of each other, and leaves out what they do together.';
