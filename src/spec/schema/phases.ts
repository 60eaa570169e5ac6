// The phases that a study names itself: each stands at the top level under its own name with a `kind`.
import * as Type from 'typebox';
import { byClass, classList, expression, Name, orFile, quantity, timed } from './values.ts';

export const Kernel = Type.Object(
  {
    shape: Type.Union(
      [Type.Literal('exponential'), Type.Literal('gaussian'), Type.Literal('2Dt'), Type.Literal('exponential power')],
      {
        description:
          'How the density of arrivals in the plane falls with r = distance / scale: exp(-r), exp(-r^2), (1 + r^2)^-b, or exp(-r^c).',
        examples: ['exponential'],
      },
    ),
    mean: Type.Optional(
      quantity('length', {
        description: 'Mean distance moved in the plane (for the exponential kernel twice its scale).',
        examples: ['4 km'],
      }),
    ),
    scale: Type.Optional(
      quantity('length', { description: 'Scale of the kernel, instead of its mean.', examples: ['2 km'] }),
    ),
    'shape-number': Type.Optional(
      expression({
        description: 'b of the 2Dt (above 1; above 1.5 where a mean is given), c of the exponential power (above 0).',
        examples: [2.5],
      }),
    ),
    reach: Type.Optional(quantity('length', { description: 'Nobody moves further than this.', examples: ['25 km'] })),
  },
  {
    additionalProperties: false,
    description: 'How likely a patch is reached by its distance.',
    examples: ['{ shape: exponential, mean: 4 km, reach: 25 km }'],
  },
);

/** From patch to patch: the share of the animals present that goes there. */
export const Shares = orFile(
  Type.Record(
    Type.String(),
    Type.Record(
      Type.String(),
      expression({ description: 'Share of the animals present.', examples: [0.1], 'x-unit': 'share' }),
      { 'x-key': 'TO' },
    ),
    { title: 'patches with the shares that go to other patches', 'x-key': 'FROM' },
  ),
  {
    title: 'patches with the shares that go to other patches, or a CSV file with the columns from, to, share',
    description:
      'From patch to patch, the share of the animals present that goes there; instead of leaving, kernel and attraction.',
    examples: ['North fen: { Long holm: 0.1 }'],
  },
);

const CrossingLink = Type.Object(
  {
    between: Type.Tuple([Name, Name], {
      title: 'two patches',
      description: 'The two patches that the link joins, in both directions.',
      examples: ['[North fen, Long holm]'],
    }),
    distance: Type.Optional(
      quantity('length', {
        description: 'Length of this way, instead of the distance of the patches.',
        examples: ['6 km'],
      }),
    ),
    'distance-times': Type.Optional(
      expression({
        description: 'The distance times this is the length of this way.',
        examples: [0.6],
        default: 1,
      }),
    ),
    'distance-add': Type.Optional(
      quantity('length', {
        description: 'So much longer is this way than the distance, once that is multiplied.',
        examples: ['1 km'],
        default: 0,
      }),
    ),
    'crossing-death': Type.Optional(
      expression({
        description: 'Of those that cross, the share that dies of it (a road), besides all other dangers of the way.',
        examples: [0.4],
        default: 0,
        'x-unit': 'share',
      }),
    ),
    'turn-back': Type.Optional(
      expression({
        description: 'Of those that take this way, the share that turns back before crossing and stays at home.',
        examples: [0.5],
        default: 0,
        'x-unit': 'share',
      }),
    ),
  },
  { additionalProperties: false, title: 'a link: { between: […], … }' },
);

const leaving = {
  description: 'Share that sets out, for all classes or by class.',
  examples: ['natal_leaving'],
  'x-unit': 'share',
};

export const Dispersal = Type.Object(
  {
    kind: Type.Literal('dispersal', { description: 'Animals move between patches.', examples: ['dispersal'] }),
    classes: classList({ description: 'Classes that move.', examples: ['[newborn]'] }),
    leaving: Type.Optional(
      Type.Union([timed(leaving), byClass(leaving)], {
        title: 'a number, an expression, or classes with one each',
        ...leaving,
      }),
    ),
    distance: Type.Optional(
      Type.Literal('straight', {
        description: 'How distance is measured.',
        examples: ['straight'],
        default: 'straight',
      }),
    ),
    'distance-between': Type.Optional(
      Type.Union([Type.Literal('centroids'), Type.Literal('nearest edges')], {
        description: 'From where to where: the middles of two patches, or the nearest points of their outlines.',
        examples: ['nearest edges'],
        default: 'centroids',
      }),
    ),
    kernel: Type.Optional(Kernel),
    attraction: Type.Optional(
      expression({
        description: 'Weight of a patch as a target, over its attributes; without it all patches attract alike.',
        examples: ['capacity ^ 0.5'],
      }),
    ),
    leavers: Type.Optional(
      Type.Union([Type.Literal('all arrive'), Type.Literal('may miss')], {
        description:
          'Whether all who leave reach some patch, or the kernel is a density over the plane and those who hit no patch are lost. Must be said with a kernel.',
        examples: ['all arrive'],
      }),
    ),
    hazard: Type.Optional(
      quantity('per-length', {
        description: 'Danger of the way: of those who travel d km, exp(-hazard * d) survive.',
        examples: ['0.03 per km'],
        default: 0,
      }),
    ),
    'survival-on-the-way': Type.Optional(
      expression({
        description: 'Share that survives the way, however long it is.',
        examples: [0.9],
        default: 1,
        'x-unit': 'share',
      }),
    ),
    shares: Type.Optional(Shares),
    links: Type.Optional(
      Type.Array(CrossingLink, {
        minItems: 1,
        title: 'a list of links',
        description: 'Ways between two patches that are unlike all others: longer, deadly, or shunned.',
        examples: ['- { between: [North fen, Long holm], crossing-death: 0.4, turn-back: 0.5 }'],
      }),
    ),
  },
  {
    additionalProperties: false,
    title: 'a dispersal',
    description: 'Movement between patches, under a name of its own.',
  },
);

export const Ceiling = Type.Object(
  {
    kind: Type.Literal('ceiling', { description: 'A patch holds no more than its capacity.', examples: ['ceiling'] }),
    counted: classList({
      description: 'Classes that are counted, and removed where there are too many.',
      examples: ['[yearling, adult]'],
    }),
    capacity: expression({ description: 'How many may stay.', examples: ['capacity'], 'x-unit': 'animals' }),
    takes: Type.Union([Type.Literal('at random'), Type.Literal('youngest first'), Type.Literal('nobody')], {
      description:
        'Who is removed. Where it takes nobody the surplus waits: it lives on, and in each breeding between this place and the next no more than the capacity breed, drawn at random.',
      examples: ['at random'],
    }),
  },
  {
    additionalProperties: false,
    title: 'a ceiling',
    description: 'An upper limit at its place in the year, under a name of its own.',
  },
);

const counted = {
  title: 'a list of classes, `all`, or classes with weights',
  description: 'Whose number crowds: a list of classes, or classes with weights.',
  examples: ['{ yearling: 1, adult: 1 }'],
};

const crowdingKeys = {
  form: Type.Union(
    [
      Type.Literal('beverton-holt'),
      Type.Literal('ricker'),
      Type.Literal('theta'),
      Type.Literal('hassell'),
      Type.Literal('allee'),
    ],
    {
      description:
        'How rates fall with the number N: 1 / (1 + a N), exp(-b N), exp(-b N^s), (1 + a N)^-s with the shape number s; or `allee`: not at all, only the Allee factor acts.',
      examples: ['beverton-holt'],
    },
  ),
  'shape-number': Type.Optional(
    expression({
      description: 's of the forms theta and hassell, above zero: how sharply rates fall near the capacity.',
      examples: [2],
    }),
  ),
  changes: Type.Record(
    Type.String(),
    classList({ description: 'Classes whose rate falls.', examples: ['[newborn]'] }),
    {
      title: 'phases with lists of classes',
      description: 'Which rates fall: the phases, and the classes in each.',
      examples: ['{ survival: [newborn] }'],
      'x-key': 'PHASE',
    },
  ),
  counted: Type.Union(
    [
      Type.Record(Type.String(), Type.Number({ minimum: 0, description: 'Weight of the class.', examples: [1] }), {
        'x-key': 'CLASS',
      }),
      classList(counted),
    ],
    counted,
  ),
  capacity: Type.Optional(
    expression({
      description: 'The number at which an isolated patch stands still at mean rates. Must be said, but for `allee`.',
      examples: ['capacity'],
      'x-unit': 'animals',
    }),
  ),
  'allee-half': Type.Optional(
    expression({
      description: 'The number at which rates fall to half because mates or company are scarce: N / (N + half).',
      examples: [4],
      'x-unit': 'animals',
    }),
  ),
  'where-declining': Type.Optional(
    Type.Union(
      [
        Type.Literal('none'),
        Type.Literal('ceiling'),
        Type.Object(
          { as: Type.String({ ...Name, description: 'The patch whose crowding is used.', examples: ['North fen'] }) },
          { additionalProperties: false, title: '{ as: PATCH }' },
        ),
      ],
      {
        description:
          'What crowding does in a patch that declines alone: nothing, a ceiling at capacity, or as in another patch.',
        examples: ['ceiling'],
      },
    ),
  ),
};

export const Crowding = Type.Object(crowdingKeys, {
  additionalProperties: false,
  description: 'Rates that fall where animals are many.',
  examples: ['{ form: beverton-holt, changes: { survival: [newborn] }, counted: [adult], capacity: capacity }'],
});

/** A second crowding and more, each under a name of its own. It is a condition and does not stand in the year. */
export const NamedCrowding = Type.Object(
  {
    kind: Type.Literal('crowding', { description: 'Rates that fall where animals are many.', examples: ['crowding'] }),
    ...crowdingKeys,
  },
  {
    additionalProperties: false,
    title: 'a crowding',
    description: 'One more crowding, under a name of its own; it stands in no year, since it acts on phases.',
  },
);
