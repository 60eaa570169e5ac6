// Rates or named numbers that change.
import * as Type from 'typebox';
import { cost } from '../cost.ts';
import { effect } from '../effect.ts';
import { patchOrMore } from '../values.ts';
import { when } from './when.ts';

const rateEffect = {
  description: 'What becomes of the rate of this class.',
  examples: ['{ times: 1.1 }'],
};

export const ChangeAction = Type.Object(
  {
    kind: Type.Literal('change', { description: 'Rates or named numbers change.', examples: ['change'] }),
    parameters: Type.Optional(
      Type.Record(
        Type.String(),
        effect({ description: 'What becomes of the named number.', examples: ['{ add: 0.04 }'] }),
        {
          title: 'parameters with an effect each',
          description: 'Named numbers that change, wherever they stand.',
          examples: ['adult_survival: { add: 0.04 }'],
          'x-key': 'PARAMETER',
        },
      ),
    ),
    rates: Type.Optional(
      Type.Record(Type.String(), Type.Record(Type.String(), effect(rateEffect), { 'x-key': 'CLASS' }), {
        title: 'phases with classes with an effect each',
        description: 'Rates by phase and class: survival, births, or the share that leaves in a dispersal.',
        examples: ['survival: { newborn: { times: 1.1 } }'],
        'x-key': 'PHASE',
      }),
    ),
    in: Type.Optional(patchOrMore('Patches in which the rates change; without it, all.', 'Saltmarsh')),
    ...when,
    ...cost,
  },
  {
    additionalProperties: false,
    title: 'a change',
    description: 'Rates or named numbers that change, for all that rests on them.',
  },
);
