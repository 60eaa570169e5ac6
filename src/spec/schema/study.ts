import * as Type from 'typebox';
import { text } from './values.ts';

export const Study = Type.Object(
  {
    title: text({ description: 'What the study is called.', examples: ['Reed hare on the Harrow Levels'] }),
    question: Type.Optional(
      text({
        description: 'The decision that the model is for.',
        examples: ['Which of four plans keeps the hare, for 400,000 crowns?'],
      }),
    ),
    by: Type.Optional(text({ description: 'Who made it.', examples: ['Fen office'] })),
    for: Type.Optional(text({ description: 'Who asked for it.', examples: ['Harrow water board'] })),
    date: Type.Optional(text({ description: 'When it was made.', examples: ['2026-03-01'] })),
    status: Type.Optional(
      Type.Union([Type.Literal('draft'), Type.Literal('final'), Type.Literal('accepted-assumptions')], {
        description: 'How far the study has come.',
        examples: ['draft'],
      }),
    ),
    invented: Type.Optional(
      Type.Boolean({ description: 'True where the places and numbers are made up.', examples: [true] }),
    ),
  },
  {
    additionalProperties: false,
    description: 'What the study is, for whom, and by whom.',
    examples: ['{ title: Reed hare on the Harrow Levels, by: Fen office }'],
  },
);
