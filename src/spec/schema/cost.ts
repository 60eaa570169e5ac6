// What actions cost, and what costs are told in.
import * as Type from 'typebox';
import { expression, text } from './values.ts';

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

const Cost = Type.Object(
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

/** The key of what an action costs. */
export const cost = { cost: Type.Optional(Cost) };

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
