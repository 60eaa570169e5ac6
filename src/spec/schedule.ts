// A schedule, such as `{ 2027: 0.3, 2032: 0.4, between: steps }`, as the expression over `year` that it stands for. Before its
// first year it has the first number, after its last the last.
import type { Ast, Span } from './expression/ast.ts';
import { add, compare, divide, multiply, number, subtract } from './expression/build.ts';
import { printExpression } from './expression/print.ts';
import { readMeasure, dimensionWords, type Dimension } from './quantity.ts';
import type { SourceMap, SourceNode } from './text/source.ts';

const here: Span = { offset: 0, length: 0 };

/** Keys that are years and `between`, and nothing else. */
export function isSchedule(node: SourceNode): node is SourceMap {
  if (node.kind !== 'map' || node.entries.length < 2) return false;
  return (
    node.entries.some((entry) => entry.key === 'between') &&
    node.entries.every((entry) => entry.key === 'between' || isYear(entry.key))
  );
}

export function isYear(text: string): boolean {
  return /^\d{1,6}$/u.test(text);
}

/** The expression as text, in the base unit of what its numbers measure. */
export function expressionOf(node: SourceMap): string {
  const between = node.entries.find((entry) => entry.key === 'between')?.value;
  const straight = between?.kind === 'scalar' && between.source === 'straight line';
  const steps = node.entries
    .filter((entry) => isYear(entry.key))
    .map((entry) => ({ year: Number(entry.key), value: measureOf(entry.value) }))
    .sort((a, b) => a.year - b.year);
  return printExpression(straight ? alongLine(steps) : inSteps(steps));
}

interface Step {
  readonly year: number;
  readonly value: Ast;
}

const dimensions = Object.keys(dimensionWords).filter((key): key is Dimension => Object.hasOwn(dimensionWords, key));

/** Which unit the key takes was checked before: a number has one meaning whatever it measures. */
function measureOf(node: SourceNode): Ast {
  const text = node.kind === 'scalar' ? node.source : '';
  for (const dimension of ['share' as const, ...dimensions]) {
    const read = readMeasure(text, dimension);
    if (read.ok) return read.ast;
  }
  return number(0, here);
}

const year: Ast = { kind: 'name', name: 'year', span: here };

/** Halves the years, so that a long schedule does not nest deeply. */
function inSteps(steps: readonly Step[]): Ast {
  const [first] = steps;
  if (first === undefined) return number(0, here);
  if (steps.length === 1) return first.value;
  const half = Math.ceil(steps.length / 2);
  return before(steps[half]?.year ?? first.year, inSteps(steps.slice(0, half)), inSteps(steps.slice(half)));
}

function before(limit: number, then: Ast, otherwise: Ast): Ast {
  return { kind: 'if', condition: compare('<', year, number(limit, here), here), then, otherwise, span: here };
}

function alongLine(steps: readonly Step[]): Ast {
  const [first] = steps;
  const last = steps.at(-1);
  if (first === undefined || last === undefined) return number(0, here);
  const lines = steps.slice(1).map((to, i) => ({ to, from: steps[i] ?? first }));
  const after = { year: last.year, value: last.value };
  return before(first.year, first.value, inSteps([...lines.map(lineFrom), after]));
}

function lineFrom({ from, to }: { readonly from: Step; readonly to: Step }): Step {
  const share = divide(subtract(year, number(from.year, here), here), number(to.year - from.year, here), here);
  const rise = subtract(to.value, from.value, here);
  return { year: from.year, value: add(from.value, multiply(rise, share, here), here) };
}
