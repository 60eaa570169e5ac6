// The eleven design concepts, each with what this model says to it.
import type { Model } from '../../model/model.ts';
import type { RunResults } from '../../results/results.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import { finished } from '../answer.ts';

export function designConcepts(model: Model, results: RunResults): Markup {
  const moving = model.phases.some((phase) => phase.kind === 'dispersal');
  const ceiling = model.phases.some((phase) => phase.kind === 'ceiling');
  const crowd = model.crowding.length > 0 || ceiling;
  const concepts: readonly (readonly [string, string])[] = [
    ['Basic principles', 'a matrix population model in several patches, run with whole animals and chance.'],
    ['Emergence', 'abundance, risk and which patches are in use follow from the rates, the movement and chance.'],
    ['Adaptation', 'none: animals do not choose in answer to their state.'],
    ['Objectives', 'none.'],
    ['Learning', 'none.'],
    ['Prediction', 'none.'],
    ['Sensing', 'none of the animals; rates answer to the number present where crowding is on.'],
    ['Interaction', interaction(crowd, moving)],
    [
      'Stochasticity',
      `births, deaths, fates and movement of single animals are drawn (demographic chance); ${plain(finished(results))} futures share one seed, ${String(results.seed)}.`,
    ],
    ['Collectives', 'the animals of a patch, which share its rates.'],
    [
      'Observation',
      'at each count: animals in each patch and in all, the outcomes named in the model, and the patches in use.',
    ],
  ];
  const items = concepts.map(([name, words]) => mark`<div><dt>${name}</dt><dd>${words}</dd></div>`);
  return mark`<dl class="concepts">${items}</dl>`;
}

function interaction(crowd: boolean, moving: boolean): string {
  const within = crowd ? 'animals of a patch compete through crowding' : 'none within a patch';
  return `${within}; ${moving ? 'patches are linked by movement' : 'patches are not linked'}.`;
}
