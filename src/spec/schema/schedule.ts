// Numbers that change with the calendar year, written as what they are from a year on.
import * as Type from 'typebox';

/** Becomes an expression over `year` before anyone looks at it. */
export interface ScheduleRef {
  readonly between: 'steps' | 'straight line';
  readonly isSchedule: true;
}

/** `format` is that of a single number in the same place. */
export function schedule(format: string) {
  const value = Type.Union([Type.Number(), Type.String({ minLength: 1, format })], {
    description: 'The number from that year on.',
    examples: [0.4],
  });
  const shape = Type.Object(
    {
      between: Type.Union([Type.Literal('steps'), Type.Literal('straight line')], {
        description: 'Between two of the years: the earlier number holds, or the number goes over in a straight line.',
        examples: ['steps'],
      }),
    },
    {
      additionalProperties: value,
      propertyNames: { format: 'year' },
      'x-key': 'YEAR',
      'x-brief': true,
      'x-schedule': true,
      title: 'years with a number each: { 2027: …, 2032: …, between: steps }',
    },
  );
  return Object.assign(Type.Unsafe<ScheduleRef>(shape), { type: 'object' } as const);
}
