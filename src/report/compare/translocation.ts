// What must be said of every plan that handles animals: the steps before a translocation, the source's own risk, when to stop,
// and who decides on a take.
import type { Comparison, SourceRisk } from '../../compare/results.ts';
import { whole } from '../../view/number.ts';
import { handledWords } from '../handled-words.ts';
import { between, change, seenChance } from './words.ts';

/** After the guidelines of IUCN/SSC (2013), in our own words and from memory. */
export const translocationSteps: readonly string[] = [
  'Ask first whether moving animals is the right thing at all: what causes the decline, and what else would help.',
  'Write down the goal, the objectives, and how anyone will see that they are reached.',
  'Look at what it needs: habitat and climate at the release site, founders that the source can spare, health and welfare of the animals, people who live there, law, money.',
  'Weigh the risks: to the source, to the release site and what lives there, of disease, of genes, to people, of money lost.',
  'Plan release and transport: who, how many, when, where, in what state.',
  'Write an exit rule before the first animal is caught: at what signs the work stops or is turned back.',
  'Watch both places long enough to know, go on caring for them, and publish what came of it.',
];

/** Of each plan, what its takes, moves and releases came to, and how many animals they looked for in vain. */
export function handledByPlan({ scenarios, years }: Comparison, animals: string): readonly string[] {
  return scenarios.flatMap(({ name, handled }) =>
    handledWords({ handled, years }, animals).map(([phase, words]) => `“${name}”, ${phase}: ${words}.`),
  );
}

/** Of each move, for its source: what each plan with it does there, and then when to stop. */
export function sourcesWords({ sources, replicates }: Comparison, animals: string): readonly string[] {
  const moves = new Map<string, SourceRisk[]>();
  for (const one of sources) {
    const key = JSON.stringify([one.action, one.source]);
    moves.set(key, [...(moves.get(key) ?? []), one]);
  }
  return [...moves.values()].flatMap((plans) => [
    ...plans.map((one) => sourceWords(one, animals, replicates)),
    ...plans.slice(0, 1).map((one) => exitWords(one, animals)),
  ]);
}

/** `futures` are those of each plan. */
function sourceWords(
  { scenario, action, source, change: found }: SourceRisk,
  animals: string,
  futures: number,
): string {
  const { before, after } = found.everEmpty;
  return `“${scenario}” takes animals from ${source} (“${action}”): at the end ${change({ of: 'animals', estimate: found.animals.estimate })} ${animals} there (95\u00a0%: ${between('animals', found.animals)}); the chance that ${source} stands empty at some count is ${seenChance(after, futures)} with the plan and ${seenChance(before, futures)} without it (difference in points: ${change({ of: 'chance', estimate: found.everEmptyChange.estimate })}, 95\u00a0%: ${between('chance', found.everEmptyChange)}).`;
}

/** The same for every plan with the move, since it rests on futures without it. */
function exitWords({ source, stopBelow, year }: SourceRisk, animals: string): string {
  return `An exit rule to start from: stop catching when fewer than ${whole(Math.max(1, stopBelow))} ${animals} are counted in ${source}. Without the plan 95 of 100 futures count more there in ${year}, so fewer is no bad luck that the model foresees. The rule is for the permit and the people responsible to set.`;
}

export function hasMoves({ scenarios }: Comparison): boolean {
  return scenarios.some(({ handled }) => handled.some(({ does }) => does === 'move' || does === 'add'));
}

export function hasTakes({ scenarios }: Comparison): boolean {
  return scenarios.some(({ handled }) => handled.some(({ does }) => does === 'take'));
}

export const takeWords =
  'How many animals may be taken, by whom and when, is decided by the wildlife authority under the law of the place, from counts made there; a quota of this model is an input to that decision and no licence.';
