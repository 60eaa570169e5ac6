// Reads and evaluates an expression that must be right, for tests.
import { evaluate, type Evaluated } from '../../../src/spec/expression/evaluate.ts';
import { parseExpression } from '../../../src/spec/expression/parse.ts';
import type { Ast } from '../../../src/spec/expression/ast.ts';
import { pinned } from '../../../src/machine/pinned.ts';

export type Names = Readonly<Record<string, number>>;

export function read(text: string): Ast {
  const parsed = parseExpression(text);
  if (!parsed.ok) throw new Error(`${text}: ${parsed.error.message}`);
  return parsed.ast;
}

export function evaluated(ast: Ast, names: Names = {}): Evaluated {
  return evaluate(ast, (name) => names[name], pinned);
}

export function valueOf(ast: Ast, names: Names = {}): number {
  const result = evaluated(ast, names);
  if (!result.ok) throw new Error(result.fault.message);
  return result.value;
}

/** The tree without its places, to compare trees that were written differently. */
export function bare(ast: Ast): unknown {
  return JSON.parse(JSON.stringify(ast, (key, value: unknown) => (key === 'span' ? undefined : value)));
}
