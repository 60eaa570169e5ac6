// An expression as instructions for the kernel's stack.
import * as layout from '../../../assembly/layout.ts';
import type { ArithmeticSign, Ast, Comparison, OneArgument, Truth } from '../../spec/expression/ast.ts';

/** Where names stand. */
export interface ExpressionNames {
  readonly slots: ReadonlyMap<string, number>;
  readonly attributes: ReadonlyMap<string, number>;
  /** Series by step beside the calendar year, which is 0. */
  readonly dated: ReadonlyMap<string, number>;
}

export interface Instructions {
  /** Pairs of instruction and operand. */
  readonly words: Int32Array;
  readonly constants: Float64Array;
}

const arithmetic: Readonly<Record<ArithmeticSign, number>> = {
  '+': layout.doAdd,
  '-': layout.doSubtract,
  '*': layout.doMultiply,
  '/': layout.doDivide,
  '^': layout.doPower,
};

const calls: Readonly<Record<OneArgument, number>> = { exp: layout.doExp, log: layout.doLog, sqrt: layout.doSqrt };

/** Null where it needs a deeper stack than the kernel has. */
export function instructionsOf(ast: Ast, names: ExpressionNames): Instructions | null {
  const writer = new Writer(names);
  writer.number(ast);
  if (writer.deepest > layout.deepestStack) return null;
  return { words: Int32Array.from(writer.words), constants: Float64Array.from(writer.constants) };
}

class Writer {
  readonly words: number[] = [];
  readonly constants: number[] = [];
  deepest = 0;
  #depth = 0;
  readonly #names: ExpressionNames;

  constructor(names: ExpressionNames) {
    this.#names = names;
  }

  /** An instruction that leaves `change` more numbers on the stack. */
  #put(instruction: number, operand: number, change: number): void {
    this.words.push(instruction, operand);
    this.#depth += change;
    this.deepest = Math.max(this.deepest, this.#depth);
  }

  #constant(value: number): void {
    this.constants.push(value);
    this.#put(layout.doConstant, this.constants.length - 1, 1);
  }

  number(node: Ast): void {
    switch (node.kind) {
      case 'number':
        this.#constant(node.value);
        return;
      case 'name':
        this.#name(node.name);
        return;
      case 'negate':
        this.number(node.of);
        this.#put(layout.doNegate, 0, 0);
        return;
      case 'arithmetic':
        this.number(node.left);
        this.number(node.right);
        this.#put(arithmetic[node.sign], 0, -1);
        return;
      case 'call':
        this.number(node.of);
        this.#put(calls[node.function], 0, 0);
        return;
      case 'extreme':
        node.of.forEach((part, i) => {
          this.number(part);
          if (i > 0) this.#put(node.pick === 'min' ? layout.doMinimum : layout.doMaximum, 0, -1);
        });
        return;
      case 'if':
        this.#truth(node.condition);
        this.number(node.then);
        this.number(node.otherwise);
        this.#put(layout.doChoose, 0, -2);
    }
  }

  #name(name: string): void {
    const slot = this.#names.slots.get(name);
    const attribute = this.#names.attributes.get(name);
    const dated = this.#names.dated.get(name);
    if (slot !== undefined) this.#put(layout.doSlot, slot, 1);
    else if (attribute !== undefined) this.#put(layout.doAttribute, attribute, 1);
    else if (dated !== undefined) this.#put(layout.doDated, dated, 1);
    else this.#put(layout.doYear, 0, 1);
  }

  #truth(node: Truth): void {
    switch (node.kind) {
      case 'not':
        this.#truth(node.of);
        this.#put(layout.doNot, 0, 0);
        return;
      case 'and':
      case 'or':
        this.#truth(node.left);
        this.#truth(node.right);
        this.#put(node.kind === 'and' ? layout.doAnd : layout.doOr, 0, -1);
        return;
      case 'compare':
        this.#comparison(node);
    }
  }

  #comparison({ sign, left, right }: Comparison): void {
    const turned = sign === '>' || sign === '>=';
    this.number(turned ? right : left);
    this.number(turned ? left : right);
    const equal = sign === '=' || sign === '!=';
    const strict = sign === '<' || sign === '>';
    this.#put(equal ? layout.doEqual : strict ? layout.doLess : layout.doAtMost, 0, -1);
    if (sign === '!=') this.#put(layout.doNot, 0, 0);
  }
}
