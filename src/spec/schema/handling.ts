// What people do with animals at a place in the year: take, move, release. Each stands under a name of its own.
import * as Type from 'typebox';
import { unsureByClass, unsureExpression } from './unsure.ts';
import { classList, expression, Name, patchOrMore, type KeyWords } from './values.ts';

const Years = Type.Union(
  [
    Type.Array(Type.Integer(), { minItems: 1, uniqueItems: true, title: 'a list of years' }),
    Type.Object(
      {
        from: Type.Optional(
          Type.Integer({ description: 'The first year; without it, the first of all.', examples: [2029] }),
        ),
        until: Type.Optional(
          Type.Integer({ description: 'The last year; without it, the last of all.', examples: [2035] }),
        ),
      },
      { additionalProperties: false, title: '{ from: …, until: … }' },
    ),
  ],
  {
    title: 'a list of years, or { from: …, until: … }',
    description: 'In which years it is done; without it, in every year.',
    examples: ['[2027, 2028]'],
  },
);

const amount = (what: string, example: string | number, unit: string) => {
  const words = { description: what, examples: [example], 'x-unit': unit };
  return Type.Optional(
    Type.Union([unsureExpression(words), unsureByClass(words)], {
      title: 'a number, an expression, or classes with one each',
      ...words,
    }),
  );
};

const quota = {
  classes: Type.Optional(
    classList({
      description: 'Classes that are taken, all alike at random; not needed where numbers are by class.',
      examples: ['[adult]'],
    }),
  ),
  number: amount('How many animals, together or by class; `all` for all that are there.', 'adult: 6', 'animals'),
  share: amount('Which share of the animals, together or by class.', 0.1, 'share'),
  counted: Type.Optional(
    Type.Union([Type.Literal('each patch'), Type.Literal('as a whole')], {
      description:
        'Whether the number, the share or the excess is that of each patch, or of all its patches together. Must be said where there are several.',
      examples: ['each patch'],
    }),
  ),
  years: Type.Optional(Years),
};

const living = (words: KeyWords) =>
  Type.Optional(
    Type.Union([unsureExpression(words), unsureByClass(words)], {
      title: 'a number, an expression, or classes with one each',
      ...words,
    }),
  );

const survival = {
  'handling-survival': living({
    description: 'Share that survives being caught and brought, of all or by class; classes that are not named have 1.',
    examples: [0.95],
    default: 1,
    'x-unit': 'share',
  }),
  'first-year-survival': living({
    description:
      'Share of those brought that does not die of being new, beside all usual deaths, of all or by class. It is taken away at once, since animals are not followed one by one.',
    examples: [0.8],
    default: 1,
    'x-unit': 'share',
  }),
};

const homing = {
  homing: Type.Optional(
    unsureExpression({
      description: 'Of those that live through it, the share that goes back at once to where it was caught.',
      examples: [0.2],
      default: 0,
      'x-unit': 'share',
    }),
  ),
};

export const Take = Type.Object(
  {
    kind: Type.Literal('take', { description: 'People take animals out.', examples: ['take'] }),
    ...quota,
    'share-of-excess': Type.Optional(
      unsureExpression({
        description: 'Which share of the animals above a level, given by `over`.',
        examples: [0.25],
        'x-unit': 'share',
      }),
    ),
    over: Type.Optional(
      expression({
        description: 'The count of the classes taken above which there is an excess.',
        examples: [200],
        'x-unit': 'animals',
      }),
    ),
    in: Type.Optional(patchOrMore('Patches where animals are taken; without it, all.', 'North fen')),
  },
  {
    additionalProperties: false,
    title: 'a take',
    description:
      'A harvest at its place in the year: animals are drawn without replacement, never more than there are; what is lacking is reported as shortfall.',
  },
);

export const Move = Type.Object(
  {
    kind: Type.Literal('move', { description: 'People bring animals from patch to patch.', examples: ['move'] }),
    from: patchOrMore('Where they are caught.', 'Long holm'),
    to: Type.String({ ...Name, title: 'a patch', description: 'Where they are set free.', examples: ['North fen'] }),
    ...quota,
    ...survival,
    ...homing,
  },
  {
    additionalProperties: false,
    title: 'a move',
    description: 'Animals caught in some patches and set free in another, at its place in the year.',
  },
);

export const Add = Type.Object(
  {
    kind: Type.Literal('add', { description: 'People release animals from outside.', examples: ['add'] }),
    in: patchOrMore('Where they are released.', 'Saltmarsh'),
    number: unsureByClass({
      description: 'How many of each class, in each of these patches.',
      examples: [10],
      'x-unit': 'animals',
    }),
    years: Type.Optional(Years),
    ...survival,
  },
  {
    additionalProperties: false,
    title: 'a release',
    description: 'Animals released from outside the model, at its place in the year.',
  },
);
