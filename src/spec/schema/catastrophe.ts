// Catastrophes, and good years by the same means: rare events that strike some or all patches.
import * as Type from 'typebox';
import { byClass, expression, Name, quantity } from './values.ts';

const reach = {
  description: 'Which patches are struck: all, only the one where it begins, or those within a radius of it.',
  examples: ['{ radius: 8 km }'],
};

export const Catastrophe = Type.Object(
  {
    kind: Type.Literal('catastrophe', { description: 'A rare event.', examples: ['catastrophe'] }),
    chance: Type.String({
      minLength: 1,
      format: 'chance',
      title: 'a chance per patch or per landscape',
      description:
        'Chance a year, or in a `generation`. `per patch`: that one begins in a given patch; `per landscape`: that one begins somewhere, each patch being as likely.',
      examples: ['0.04 per patch'],
    }),
    generation: Type.Optional(
      quantity('time', {
        description:
          'The chance is that of at least one in so long a time, as studies of many species state it: a year has 1 - (1 - chance)^(1 / years).',
        examples: ['5 years'],
        default: '1 year',
      }),
    ),
    reach: Type.Union(
      [
        Type.Literal('everywhere'),
        Type.Literal('one patch'),
        Type.Object(
          { radius: quantity('length', { description: 'Patches up to this far are struck.', examples: ['8 km'] }) },
          { additionalProperties: false, title: '{ radius: … }' },
        ),
      ],
      { title: '`everywhere`, `one patch` or { radius: … }', ...reach },
    ),
    'begins-in': Type.Optional(
      Type.Array(Name, {
        minItems: 1,
        uniqueItems: true,
        title: 'a list of patches',
        description: 'Patches in which it can begin; without it, all.',
        examples: ['[Saltmarsh, Crane pool]'],
      }),
    ),
    multiplies: Type.Optional(
      Type.Record(
        Type.String(),
        byClass({
          description: 'What the rate of each class is multiplied by in a struck patch; above 1 for good years.',
          examples: [0.3],
          'x-unit': 'times',
        }),
        {
          title: 'rates with what they are multiplied by',
          description:
            'Rates by class (`survival`, `births`, `fates`, or a phase by its name; for a dispersal its leavers) and what they are multiplied by.',
          examples: ['{ survival: { newborn: 0.3, adult: 0.8 } }'],
          'x-key': 'RATE',
        },
      ),
    ),
    takes: Type.Optional(
      byClass({
        description: 'Share of each class that dies where it stands in `year`.',
        examples: [0.5],
        'x-unit': 'share',
      }),
    ),
    capacity: Type.Optional(
      Type.Object(
        {
          times: expression({
            description: 'What capacities are multiplied by in a struck patch.',
            examples: [0.4],
            'x-unit': 'times',
          }),
          for: quantity('time', { description: 'How long, from the year of the strike on.', examples: ['5 years'] }),
        },
        {
          additionalProperties: false,
          title: '{ times: …, for: … }',
          description: 'Capacity of crowding and ceilings that is lost for some years.',
          examples: ['{ times: 0.4, for: 5 years }'],
        },
      ),
    ),
    lasts: Type.Optional(
      quantity('time', {
        description: 'For how many years rates are multiplied and animals taken.',
        examples: ['2 years'],
        default: '1 year',
      }),
    ),
    wait: Type.Optional(
      quantity('time', {
        description: 'At least so many years lie between one beginning and the next, in the same patch or landscape.',
        examples: ['10 years'],
        default: '1 year',
      }),
    ),
  },
  {
    additionalProperties: false,
    title: 'a catastrophe',
    description: 'A rare event under a name of its own; in `year` where it takes animals at its place.',
  },
);
