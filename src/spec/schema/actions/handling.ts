// What is done to animals: the same as the phases of these kinds, with their place in the year and their cost.
import * as Type from 'typebox';
import { cost } from '../cost.ts';
import { Add, Move, Take } from '../handling.ts';
import { Name } from '../values.ts';

/** Where in the year something is done to animals. */
const place = {
  before: Type.Optional(
    Type.String({
      ...Name,
      title: 'a phase',
      description: 'The phase before which it is done.',
      examples: ['breeding'],
    }),
  ),
  after: Type.Optional(
    Type.String({
      ...Name,
      title: 'a phase',
      description: 'The phase after which it is done; one of `before` and `after` must be said.',
      examples: ['natal'],
    }),
  ),
};

export const TakeAction = Type.Object(
  { ...Take.properties, ...place, ...cost },
  {
    additionalProperties: false,
    title: 'a take',
    description: 'Animals are taken out in some years, at a place in the year.',
  },
);
export const MoveAction = Type.Object(
  { ...Move.properties, ...place, ...cost },
  {
    additionalProperties: false,
    title: 'a move',
    description: 'Animals are caught in some patches and set free in another, in some years.',
  },
);
export const AddAction = Type.Object(
  { ...Add.properties, ...place, ...cost },
  { additionalProperties: false, title: 'a release', description: 'Animals are released from outside, in some years.' },
);
