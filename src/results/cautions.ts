// What every reader should know before trusting a number of this model.
import { isHandling } from '../compile/image/handling.ts';
import type { Model } from '../model/model.ts';
import { basisWords } from './basis.ts';

/** `plans` are all models of a comparison, so that one caution names what any of them does with animals. */
export function standingCautions(model: Model, plans: readonly Model[] = [model]): readonly string[] {
  return [
    `Rank plans by these numbers rather than trust a risk as it stands: errors that plans share mostly cancel in a comparison,
never in an absolute number.`,
    `A run looks ${model.steps} years ahead. Errors of prediction grow fast beyond about a fifth of the length of the counts
that a model rests on (Fieberg & Ellner 2000); compare the two lengths.`,
    `The model leaves out: ${leftOut(model).join(', ')}.`,
    ...movement(model),
    `How strongly good and bad years strike all patches together often moves the risk more than movement does; look at it
before trusting that patches back each other up.`,
    basisWords(model),
    handling(plans),
  ].map((text) => text.replaceAll('\n', ' '));
}

/** What the models themselves have people do with animals, if anything. */
function handling(models: readonly Model[]): string {
  const named = new Set(models.flatMap(({ phases }) => phases.filter(isHandling).map(({ name }) => `“${name}”`)));
  if (named.size === 0) {
    return `Moving, taking or releasing animals needs permits, local law, qualified judgement and the process of IUCN/SSC (2013) for
conservation translocations. What a model says is one input to it.`;
  }
  return `In this model people take, move or release animals (${[...named].join(', ')}). None of it may be done because a model says
so: ask the wildlife authority, hold the permits, keep the law of the place, hear qualified people, follow IUCN/SSC (2013) for
conservation translocations, and count before and after. What a model says is one input to it.`;
}

function leftOut({ crowding, phases, variation, catastrophes }: Model): readonly string[] {
  const allee = crowding.some((one) => one.alleeHalf.some((half) => half > 0));
  const crowded = crowding.length > 0 || phases.some((phase) => phase.kind === 'ceiling');
  return [
    'disease',
    'inbreeding',
    'a trend of the climate',
    ...(allee ? [] : ['trouble in finding mates when few are left (Allee effects)']),
    ...(crowded ? [] : ['crowding']),
    ...(variation === null ? ['year-to-year variation of the rates'] : []),
    ...(catastrophes.length === 0 ? ['catastrophes'] : []),
  ];
}

function movement({ phases }: Model): readonly string[] {
  const rules = phases.flatMap((phase) =>
    phase.kind === 'dispersal' && phase.rule.by === 'kernel' ? [phase.rule] : [],
  );
  if (rules.length === 0) return [];
  const lost = rules.some((rule) => rule.leavers === 'may miss');
  const all =
    'All leavers are taken to head for some patch, however far; isolation costs only what dying on the way costs.';
  const miss = 'Leavers may miss every patch and are then lost: isolation costs animals.';
  return [`${lost ? miss : all} The worth of a link depends on this choice.`];
}
