// The answer in sentences, the same on the page and in the terminal: what happens in how many futures, how sure the number
// is and of what, and whose call the risk is.
import { enoughDraws } from '../results/draws/intervals.ts';
import type { Chance, NoUnknown, OutcomeResult, RunResults } from '../results/results.ts';
import { of100, percent, plain, whole } from '../view/number.ts';

export interface Answer {
  /** The first sentence in three parts, the middle one to be stressed. */
  readonly lead: readonly [string, string, string];
  readonly meaning: string | null;
  readonly fromRuns: string | null;
  readonly fromUnknown: string | null;
  readonly abundance: string | null;
  readonly call: string;
}

/** `animals` is what one individual is called, 'females' or 'animals'. */
export function answer(results: RunResults, animals: string): Answer {
  const outcome = results.outcomes[0];
  const call = 'How much risk is acceptable is not a matter of calculation: it is for those who decide.';
  const abundance = abundanceSentence(results, animals);
  if (outcome === undefined) {
    const lead = ['No outcome was named in this model. ', abundance, ''] as const;
    return { lead, meaning: null, fromRuns: null, fromUnknown: null, abundance: null, call };
  }
  return {
    lead: leadOf(outcome, results),
    meaning: `“${outcome.name}” means: ${outcome.definition}.`,
    fromRuns: runsSentence(outcome.ever, results),
    fromUnknown: unknownSentence(outcome.ever, results),
    abundance,
    call,
  };
}

function leadOf(outcome: OutcomeResult, results: RunResults): Answer['lead'] {
  const by = ` by ${lastYear(results)}`;
  const { probability } = outcome.ever;
  const runs = plain(finished(results));
  if (probability === 0) return ['In ', `none of ${runs} futures`, ` does “${outcome.name}” happen${by}.`];
  if (probability === 1) return ['In ', `all of ${runs} futures`, ` “${outcome.name}” happens${by}.`];
  const futures = of100(probability);
  const about = /^\d/.test(futures) ? `about ${futures}` : futures;
  return ['In ', `${about} of 100 futures`, ` “${outcome.name}” happens${by}.`];
}

function runsSentence(chance: Chance, results: RunResults): string {
  const { lower, upper, level, method } = chance.interval;
  const { draws } = results;
  const all = `${plain(finished(results))} runs`;
  const runs = draws === undefined ? all : `${plain(draws.number - draws.failed)} draws, ${all}`;
  const how = `${plain(level * 100)}\u00a0%, ${method}`;
  if (chance.probability === 0) {
    return `${runs} without a case still allow a chance of up to ${percent(upper)} (${how}).`;
  }
  return `From the number of runs alone (${runs}), the chance lies between ${percent(lower)} and ${percent(upper)} (${how}).`;
}

function unknownSentence({ intervalFromUnknown, noUnknown }: Chance, { notDrawn, draws }: RunResults): string {
  if (notDrawn) {
    return `The model says how sure its numbers are, but what is not known was not drawn: \`--draws 200\` shows how far the answer
could move for that reason.`.replaceAll('\n', ' ');
  }
  const run = plain((draws?.number ?? 0) - (draws?.failed ?? 0));
  if (noUnknown !== undefined) return `${noneWords(noUnknown, run)}${failedDraws(draws)}`;
  if (intervalFromUnknown === null) {
    return `The model gives no uncertainty for its numbers, so how far the answer could move because they are not exactly known is
in none of the intervals here.`.replaceAll('\n', ' ');
  }
  const { lower, upper, level } = intervalFromUnknown;
  return `From what is not known about the numbers of the model, it lies between ${percent(lower)} and ${percent(upper)}
(${plain(level * 100)}\u00a0%, ${run} draws of them). No number of runs narrows that.${failedDraws(draws)}`.replaceAll(
    '\n',
    ' ',
  );
}

function noneWords(reason: NoUnknown, run: string): string {
  switch (reason) {
    case 'too few draws':
      return `What is not known about the numbers of the model was drawn ${run} times, too few to say how far the answer could move for that reason: from ${enoughDraws} draws on it is said.`;
    case 'nothing unknown':
      return 'No number that is not exactly known enters here: the draws of what is not known move nothing.';
    case 'within the noise':
      return `Over ${run} draws of what is not known it differs by no more than their numbers of runs explain.`;
  }
}

function failedDraws(draws: RunResults['draws']): string {
  if (draws === undefined || draws.failed === 0) return '';
  return ` ${plain(draws.failed)} of ${plain(draws.number)} draws are numbers that the model cannot have; they are left out and listed.`;
}

function abundanceSentence(results: RunResults, animals: string): string {
  const { whole: years } = results.abundance;
  const [first, last] = [years[0], years[years.length - 1]];
  if (first === undefined || last === undefined) return 'Nothing was counted.';
  const q = last.quantiles;
  const now = `The middle future ends with ${whole(q['0.5'])} ${animals} in ${last.year}, after ${whole(first.quantiles['0.5'])} at the start`;
  return `${now}; 90 of 100 futures end between ${whole(q['0.05'])} and ${whole(q['0.95'])}.`;
}

/** Runs that are in the numbers. */
export function finished(results: RunResults): number {
  return results.replicates - results.stopped.runs;
}

export function lastYear({ abundance, firstYear }: RunResults): number {
  return abundance.whole[abundance.whole.length - 1]?.year ?? firstYear;
}
