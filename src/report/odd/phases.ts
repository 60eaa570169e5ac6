// What one phase of the year does, in a sentence.
import type { BreedingPhase, Model, Phase } from '../../model/model.ts';
import { litterWords, matingWords } from '../breeding-words.ts';
import { handlingWords } from '../handling-words.ts';
import { mark, type Content, type Markup } from '../../view/markup.ts';
import { names } from '../section/section.ts';

export function phaseWords(phase: Phase, model: Model): Markup {
  return mark`<strong><bdi>${phase.name}</bdi></strong>: ${act(phase, model)}`;
}

function act(phase: Phase, model: Model): Content {
  switch (phase.kind) {
    case 'count':
      return 'the animals are counted; thresholds are looked at here, and the year ends.';
    case 'breeding':
      return mark`young are born, ${youngWords(phase)}, and enter ${classNames(model, phase.into)}.`;
    case 'survival':
      return 'each animal survives or dies by itself (binomial).';
    case 'ageing':
      return 'animals go on to their next class; where only a share goes on, each does so by itself.';
    case 'demography':
      return `the entries of a whole-year matrix act at once: each animal has one fate (multinomial), and bears young by a
Poisson number.`;
    case 'take':
    case 'move':
    case 'add':
      return mark`<bdi>${handlingWords(phase, model)}</bdi>; animals are drawn without replacement, never more than there are.`;
    case 'dispersal':
      return mark`a share of ${classNames(model, phase.moves)} sets out; each leaver ends in one other patch or dies on the
way (multinomial).`;
    case 'ceiling':
      return mark`where more animals of ${classNames(model, phase.counted)} are present than the patch can hold, ${surplusWords[phase.takes ?? 'at random']}.`;
  }
}

function youngWords({ offspring, mating }: BreedingPhase): string {
  const litters =
    offspring === undefined ? 'a Poisson number around the sum over their mothers' : litterWords(offspring);
  return mating === undefined ? litters : `${litters}; ${matingWords(mating)}`;
}

const surplusWords = {
  'at random': 'the surplus is removed at random',
  'youngest first': 'the surplus is removed, the youngest first',
  nobody:
    'the surplus waits: it lives on, and in each breeding from here on no more than the capacity breed, drawn at random',
} as const;

/** The classes with a weight above 0. */
export function classNames(model: Model, weights: ArrayLike<number>): Markup {
  const chosen = model.classes.filter((_, c) => (weights[c] ?? 0) > 0);
  if (chosen.length === model.classes.length && chosen.length > 1) return mark`all classes`;
  return mark`${names(chosen)}`;
}
