import { Type } from 'typebox';

export const Study = Type.Object(
  {
    title: Type.String({ minLength: 1, description: 'What the study is called.' }),
    question: Type.Optional(Type.String({ description: 'The decision that the model is for.' })),
    by: Type.Optional(Type.String({ description: 'Who made it.' })),
    for: Type.Optional(Type.String({ description: 'Who asked for it.' })),
    date: Type.Optional(Type.String({ description: 'When it was made.' })),
    status: Type.Optional(
      Type.Union([Type.Literal('draft'), Type.Literal('final'), Type.Literal('accepted-assumptions')], {
        description: 'How far the study has come.',
      }),
    ),
    invented: Type.Optional(Type.Boolean({ description: 'True where the places and numbers are made up.' })),
  },
  { additionalProperties: false },
);
