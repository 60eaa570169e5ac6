// What several effects make of one number, as an expression over `year`: first set, then times, then add, each in its years.
import type { Ast, Span, Truth } from '../expression/ast.ts';
import { add, compare, divide, multiply, number, subtract } from '../expression/build.ts';

/** The calendar years of an effect, and how many it takes to grow whole. */
export interface When {
  /** Null for the first year of all, and for the last. */
  readonly from: number | null;
  readonly until: number | null;
  readonly over: number;
}

export interface TimedEffect {
  readonly when: When;
  readonly set: Ast | null;
  readonly times: Ast | null;
  readonly add: Ast | null;
}

const here: Span = { offset: 0, length: 0 };
const one = number(1, here);
const nothing = number(0, here);
const year: Ast = { kind: 'name', name: 'year', span: here };

/**
 * value → set (in its years) → times the product of all factors → plus the sum of all additions. An effect that grows over n
 * years is k/n of itself in its kth year. `from` must be given for one that grows.
 */
export function composed(base: Ast, effects: readonly TimedEffect[]): Ast {
  let value = base;
  for (const { when, set } of effects) if (set !== null) value = during(when, toward(when, value, set), value);
  for (const { when, times } of effects) {
    if (times !== null && !isNumber(times, 1))
      value = multiply(value, during(when, toward(when, one, times), one), here);
  }
  for (const { when, add: more } of effects) {
    if (more !== null && !isNumber(more, 0))
      value = add(value, during(when, toward(when, nothing, more), nothing), here);
  }
  return value;
}

/** Whether two effects hold in the same year at some time. */
export function meet(a: When, b: When): boolean {
  const [from, until] = [
    Math.max(a.from ?? -Infinity, b.from ?? -Infinity),
    Math.min(a.until ?? Infinity, b.until ?? Infinity),
  ];
  return from <= until;
}

function isNumber(ast: Ast, value: number): boolean {
  return ast.kind === 'number' && ast.value === value;
}

/** From one number to another as the effect grows. */
function toward({ from, over }: When, before: Ast, after: Ast): Ast {
  if (over <= 1 || from === null) return after;
  const reached = divide(subtract(year, number(from - 1, here), here), number(over, here), here);
  const share: Ast = { kind: 'extreme', pick: 'min', of: [one, reached], span: here };
  return add(before, multiply(share, subtract(after, before, here), here), here);
}

function during({ from, until }: When, inside: Ast, outside: Ast): Ast {
  const begun = from === null ? null : compare('>=', year, number(from, here), here);
  const going = until === null ? null : compare('<=', year, number(until, here), here);
  const condition: Truth | null =
    begun !== null && going !== null ? { kind: 'and', left: begun, right: going, span: here } : (begun ?? going);
  return condition === null ? inside : { kind: 'if', condition, then: inside, otherwise: outside, span: here };
}
