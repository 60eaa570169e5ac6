// What a plan may do. Actions change numbers of the model from a year on, or do something to animals at a
// place in the year; a scenario is a list of them.
import * as Type from 'typebox';
import { ChangeAction } from './actions/change.ts';
import { HabitatAction } from './actions/habitat.ts';
import { AddAction, MoveAction, TakeAction } from './actions/handling.ts';
import { LinkAction } from './actions/link.ts';
import { Name } from './values.ts';

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
