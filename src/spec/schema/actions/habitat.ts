// Habitat that is made better or worse, lost, or made anew.
import * as Type from 'typebox';
import { cost } from '../cost.ts';
import { effect, measuredEffect } from '../effect.ts';
import { InlinePatch, PatchAttribute } from '../patches.ts';
import { Name, patchOrMore } from '../values.ts';
import { when } from './when.ts';

export const HabitatAction = Type.Object(
  {
    kind: Type.Literal('habitat', { description: 'Habitat changes, comes or goes.', examples: ['habitat'] }),
    in: Type.Optional(patchOrMore('Patches that change.', 'Saltmarsh')),
    capacity: Type.Optional(
      effect({
        description: 'How many animals the patch has room for.',
        examples: ['{ add: 80 }'],
        'x-unit': 'animals',
      }),
    ),
    area: Type.Optional(
      measuredEffect('area', { description: 'Size of the patch.', examples: ['{ add: 12 ha }'] }, ['140 ha', '12 ha']),
    ),
    quality: Type.Optional(
      Type.Record(
        Type.String(),
        effect({ description: 'What becomes of this attribute of the patch.', examples: ['{ times: 1.5 }'] }),
        {
          title: 'attributes of the patches with an effect each',
          description: 'Attributes of the patch that expressions use by their names.',
          examples: ['cover: { set: 0.8 }'],
          'x-key': 'ATTRIBUTE',
        },
      ),
    ),
    lost: Type.Optional(
      Type.Literal(true, {
        description:
          'The patch is no habitat any more from the year `from` on: who lives there then dies, and nobody goes there.',
        examples: [true],
      }),
    ),
    new: Type.Optional(
      Type.Object(InlinePatch.properties, {
        additionalProperties: PatchAttribute,
        propertyNames: { format: 'identifier' },
        'x-key': 'ATTRIBUTE',
        'x-brief': true,
        title: 'a patch: { name: …, at: […], … }',
        description: 'A patch that is there from the year `from` on, empty at first; described as under `patches`.',
        examples: ['{ name: New mere, at: [11.8, 8.4], area: 60 ha, capacity: 40 }'],
      }),
    ),
    like: Type.Optional(
      Type.String({
        ...Name,
        title: 'a patch',
        description: 'The patch whose rates under `in` the new one has, too; without it, the rates of every patch.',
        examples: ['Saltmarsh'],
      }),
    ),
    ...when,
    ...cost,
  },
  {
    additionalProperties: false,
    title: 'habitat',
    description: 'Habitat that is made better or worse, lost, or made anew.',
  },
);
