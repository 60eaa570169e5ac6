// How the animals at the first count come about.
import type { Model } from '../../model/model.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';

export function initialWords(model: Model): Markup {
  const calm = model.catastrophes.length === 0 ? null : mark`<p>No catastrophe is on at the start.</p>`;
  return mark`${animalWords(model)}${calm}`;
}

function animalWords({ start }: Model): Markup {
  switch (start.by) {
    case 'table':
      return mark`<p>Every run starts from the same table of animals by patch and class, ${plain(sum(start.animals))} in all.</p>`;
    case 'total': {
      const spread =
        start.spread === 'stable within patch'
          ? 'with the stable spread over classes within each patch, shared between patches by what they can hold, else equally'
          : 'with the stable spread of the whole system over patches and classes';
      return mark`<p>Every run starts from the same ${plain(start.total)} animals, ${spread}, made whole by largest remainder.</p>`;
    }
    case 'counted': {
      const rest =
        start.rest === 'none'
          ? 'no animals of other classes are added'
          : 'the classes that were not counted are added by the stable spread within each patch';
      return mark`<p>Every run starts from the animals counted in each patch, ${plain(sum(start.counted))} in all; ${rest}. Numbers are made whole by largest remainder.</p>`;
    }
  }
}

function sum(animals: Float64Array): number {
  return animals.reduce((total, count) => total + count, 0);
}
