// A way between two patches that changes, or a new one.
import * as Type from 'typebox';
import { cost } from '../cost.ts';
import { effect, measuredEffect } from '../effect.ts';
import { Name } from '../values.ts';
import { when } from './when.ts';

export const LinkAction = Type.Object(
  {
    kind: Type.Literal('link', { description: 'A way between two patches changes, or is new.', examples: ['link'] }),
    between: Type.Tuple([Name, Name], {
      title: 'two patches',
      description: 'The two patches that the link joins, in both directions.',
      examples: ['[North fen, Long holm]'],
    }),
    dispersal: Type.Optional(
      Type.String({
        ...Name,
        title: 'a dispersal',
        description: 'The dispersal whose animals use it; without it, every one.',
        examples: ['natal'],
      }),
    ),
    'crossing-death': Type.Optional(
      effect({ description: 'Of those that cross, the share that dies of it.', examples: ['{ set: 0.12 }'] }),
    ),
    'turn-back': Type.Optional(
      effect({ description: 'Of those that take this way, the share that turns back.', examples: ['{ times: 0.5 }'] }),
    ),
    distance: Type.Optional(
      measuredEffect(
        'length',
        { description: 'How long the way is to those that go it.', examples: ['{ times: 0.6 }'] },
        ['4 km', '1 km'],
      ),
    ),
    share: Type.Optional(
      effect({
        description: 'Where the dispersal has a table of shares: the share that goes this way, in both directions.',
        examples: ['{ set: 0.1 }'],
      }),
    ),
    ...when,
    ...cost,
  },
  {
    additionalProperties: false,
    title: 'a link',
    description: 'A corridor, a crossing or a barrier: a way between two patches that changes, or a new one.',
  },
);
