// What a plan may do, and what it costs. Actions change numbers of the model from a year on, or do something to animals at a
// place in the year; a scenario is a list of them.
import { Type } from 'typebox';
import { effect, measuredEffect } from './effect.ts';
import { Add, Move, Take } from './handling.ts';
import { InlinePatch, PatchAttribute } from './patches.ts';
import { expression, Name, quantity, text } from './values.ts';

const Year = (description: string, example: number) =>
  Type.Optional(Type.Integer({ description, examples: [example] }));

/** When an effect holds. */
const when = {
  from: Year('The first year of the effect; without it, the first of all.', 2029),
  until: Year('The last year of the effect; without it, the last of all.', 2040),
  over: Type.Optional(
    quantity('time', {
      description:
        'How long the effect grows, in equal steps: of 8 years an eighth in the first, all from the eighth on. Without it, all at once.',
      examples: ['8 years'],
    }),
  ),
};

const money = (description: string, example: string | number) => {
  const words = { description, examples: [example], 'x-unit': 'the currency' };
  return Type.Optional(
    Type.Union(
      [
        expression(words),
        Type.Array(expression(words), {
          minItems: 2,
          maxItems: 2,
          title: 'two numbers, the least and the most',
        }),
      ],
      { title: 'a number, an expression, or the least and the most that it may be', ...words },
    ),
  );
};

export const Cost = Type.Object(
  {
    once: money('Paid in the first year of the action.', 120_000),
    yearly: money('Paid in every year of the action.', 3000),
    'per-animal': money('Paid for each animal handled, in every future as many as there are in it.', 900),
    'per-km': money('Paid once for each kilometre of a link.', 20_000),
  },
  {
    additionalProperties: false,
    title: 'a cost: { once: …, yearly: …, per-animal: …, per-km: … }',
    description: 'What the action costs, at the prices of one year. An income is a cost below zero.',
    examples: ['{ once: 120000, yearly: 3000 }'],
  },
);

const cost = { cost: Type.Optional(Cost) };

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

export const HabitatAction = Type.Object(
  {
    kind: Type.Literal('habitat', { description: 'Habitat changes, comes or goes.', examples: ['habitat'] }),
    in: Type.Optional(
      Type.Union([Name, Type.Array(Name, { minItems: 1, uniqueItems: true })], {
        title: 'a patch or a list of patches',
        description: 'Patches that change.',
        examples: ['Saltmarsh'],
      }),
    ),
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
    in: Type.Optional(
      Type.Union([Name, Type.Array(Name, { minItems: 1, uniqueItems: true })], {
        title: 'a patch or a list of patches',
        description: 'Patches in which the rates change; without it, all.',
        examples: ['Saltmarsh'],
      }),
    ),
    ...when,
    ...cost,
  },
  {
    additionalProperties: false,
    title: 'a change',
    description: 'Rates or named numbers that change, for all that rests on them.',
  },
);

/** The same as the phases of these kinds, with their place in the year and their cost. */
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

export const actionSchemas = {
  link: LinkAction,
  take: TakeAction,
  move: MoveAction,
  add: AddAction,
  habitat: HabitatAction,
  change: ChangeAction,
} as const;

export const Action = Type.Union([LinkAction, TakeAction, MoveAction, AddAction, HabitatAction, ChangeAction], {
  title: 'an action: { kind: …, … }',
});

export const Actions = Type.Record(Type.String(), Action, {
  title: 'names with an action each',
  description: 'What can be done, each under a name of its own. Alone they do nothing: scenarios name them.',
  examples: ['hedgerow: { kind: link, between: [North fen, Long holm], crossing-death: { set: 0.12 }, from: 2029 }'],
  'x-key': 'ACTION',
  'x-brief': true,
});

export const Scenarios = Type.Record(
  Type.String(),
  Type.Array(Name, { uniqueItems: true, title: 'a list of actions' }),
  {
    title: 'names with a list of actions each',
    description:
      'Plans to compare, each a list of actions. The scenario `as now`, without any action, is always there and is not written.',
    examples: ['hedge and moves: [hedgerow, moves]'],
    'x-key': 'SCENARIO',
  },
);

export const Money = Type.Object(
  {
    currency: text({ description: 'The currency of all costs.', examples: ['crowns'] }),
    'price-year': Type.Optional(
      Type.Integer({ description: 'The year of whose prices all costs are.', examples: [2026] }),
    ),
    discount: Type.Optional(
      Type.Union([Type.Number({ minimum: 0, maximum: 1 }), Type.String({ minLength: 1, format: 'share' })], {
        title: 'a share, such as `3 %`',
        description: 'By how much money of a year later is worth less; the first year is not discounted.',
        examples: ['3 %'],
        default: 0,
        'x-unit': 'share a year',
      }),
    ),
  },
  {
    additionalProperties: false,
    description: 'What costs are told in. Needed where an action has a cost.',
    examples: ['{ currency: crowns, price-year: 2026, discount: 3 % }'],
  },
);
