// The eleven design concepts, each with what this model says to it.
import type { Model } from '../../model/model.ts';
import type { RunResults } from '../../results/results.ts';
import type { Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import { finished } from '../answer.ts';
import { list } from '../section/section.ts';

export function designConcepts(model: Model, results: RunResults): Markup {
  return list('concepts', [
    ['Basic principles', 'a matrix population model in several patches, run with whole animals and chance.'],
    ['Emergence', 'abundance, risk and which patches are in use follow from the rates, the movement and chance.'],
    ['Adaptation', 'none: animals do not choose in answer to their state.'],
    ['Objectives', 'none.'],
    ['Learning', 'none.'],
    ['Prediction', 'none.'],
    ['Sensing', 'none of the animals; rates answer to the number present where crowding is on.'],
    ['Interaction', interaction(model)],
    ['Stochasticity', stochasticity(model, results)],
    ['Collectives', 'the animals of a patch, which share its rates.'],
    ['Observation', 'at each count: animals in each patch and in all, the outcomes, and the patches in use.'],
  ]);
}

function interaction({ phases, crowding }: Model): string {
  const crowded = crowding.length > 0 || phases.some((phase) => phase.kind === 'ceiling');
  const within = crowded ? 'animals of a patch compete through crowding' : 'none within a patch';
  const linked = phases.some((phase) => phase.kind === 'dispersal');
  return `${within}; ${linked ? 'patches are linked by movement' : 'patches are not linked'}.`;
}

function stochasticity({ variation, catastrophes }: Model, results: RunResults): string {
  const single = 'births, deaths, fates and movement of single animals are drawn (demographic chance)';
  const years = variation === null ? '' : '; rates differ from year to year (environmental chance)';
  const rare = catastrophes.length === 0 ? '' : `; ${catastrophes.map(({ name }) => name).join(', ')} strike by chance`;
  return `${single}${years}${rare}; ${plain(finished(results))} futures come from one seed, ${results.seed}.`;
}
