// What names in expressions stand for: parameters and the attributes that patches write as expressions, with all that lies behind them.
import type { SpecPath } from '../spec/document.ts';
import type { Ast } from '../spec/expression/ast.ts';
import { namesIn } from '../spec/expression/names.ts';
import { replaceNames } from '../spec/expression/replace.ts';
import { readMeasure, type Dimension } from '../spec/quantity.ts';
import type { NumberMistakes } from './number-mistakes.ts';

/** A number of a patch, or the expression that it is written as. */
export type Attribute =
  number | { readonly expression: string; readonly path: SpecPath; readonly dimension: Dimension };

export type Attributes = ReadonlyMap<string, Attribute>;

export interface NamedExpression {
  readonly name: string;
  readonly expression: number | string;
  readonly path: SpecPath;
}

interface Parameter {
  readonly ast: Ast;
  readonly path: SpecPath;
}

export class Definitions {
  readonly attributeNames: ReadonlySet<string>;
  readonly #parameters = new Map<string, Parameter>();
  /** By name what patches write that is more than a number. */
  readonly #writtenAttributes = new Map<string, Ast[]>();
  readonly #parsed = new Map<string, Ast | null>();
  readonly #mistakes: NumberMistakes;

  /** `attributes` by patch. Parameters that are made from themselves are told, and stand for 1. */
  constructor(parameters: readonly NamedExpression[], attributes: readonly Attributes[], mistakes: NumberMistakes) {
    this.#mistakes = mistakes;
    this.attributeNames = new Set(attributes.flatMap((own) => [...own.keys()]));
    for (const [name, one] of attributes.flatMap((own) => [...own])) {
      if (typeof one === 'number') continue;
      const ast = this.parse(one.expression, one.path, one.dimension);
      if (ast !== null) this.#writtenAttributes.set(name, [...(this.#writtenAttributes.get(name) ?? []), ast]);
    }
    for (const { name, expression, path } of parameters) {
      const ast = this.parse(expression, path);
      if (ast !== null) this.#parameters.set(name, { ast, path });
    }
    this.#refuseCycles();
  }

  parameter(name: string): Parameter | undefined {
    return this.#parameters.get(name);
  }

  get parameterNames(): readonly string[] {
    return [...this.#parameters.keys()];
  }

  /** Whether any patch writes an attribute as an expression. */
  get someWritten(): boolean {
    return this.#writtenAttributes.size > 0;
  }

  /** Null after telling, once, that it cannot be read. */
  parse(expression: number | string, path: SpecPath, dimension: Dimension = 'share'): Ast | null {
    const key = `${dimension}:${expression}`;
    const known = this.#parsed.get(key);
    if (known !== undefined) return known;
    const parsed = readMeasure(expression, dimension);
    this.#parsed.set(key, parsed.ok ? parsed.ast : null);
    if (parsed.ok) return parsed.ast;
    this.#mistakes.tellUnreadable(parsed.error, path);
    return null;
  }

  /** All names that an expression rests on, with the attributes of one patch, or whatever any patch has. */
  namesBehind(ast: Ast, attributes?: Attributes): ReadonlySet<string> {
    const found = new Set<string>();
    const open = [...namesIn(ast)];
    for (let name = open.pop(); name !== undefined; name = open.pop()) {
      if (found.has(name)) continue;
      found.add(name);
      const parameter = this.#parameters.get(name);
      if (parameter !== undefined) open.push(...namesIn(parameter.ast));
      for (const written of this.#attributesCalled(name, attributes)) open.push(...namesIn(written));
    }
    return found;
  }

  /**
   * The expression with every parameter but those kept replaced by what it stands for, and every attribute that the patch writes
   * as an expression; null where it cannot be read.
   */
  expanded(
    expression: number | string,
    path: SpecPath,
    { keep, attributes }: { readonly keep: ReadonlySet<string>; readonly attributes: Attributes | undefined },
  ): Ast | null {
    const ast = this.parse(expression, path);
    const replace = (name: string): Ast | null => {
      const [written] = attributes === undefined ? [] : this.#attributesCalled(name, attributes);
      if (written !== undefined) return replaceNames(written, replace);
      const parameter = keep.has(name) ? undefined : this.#parameters.get(name);
      return parameter === undefined ? null : replaceNames(parameter.ast, replace);
    };
    return ast === null ? null : replaceNames(ast, replace);
  }

  #attributesCalled(name: string, attributes: Attributes | undefined): readonly Ast[] {
    if (attributes === undefined) return this.#writtenAttributes.get(name) ?? [];
    const own = attributes.get(name);
    if (typeof own !== 'object') return [];
    const ast = this.parse(own.expression, own.path, own.dimension);
    return ast === null ? [] : [ast];
  }

  #refuseCycles(): void {
    const cyclic = [...this.#parameters].filter(([name, { ast }]) => this.namesBehind(ast).has(name));
    const names = cyclic.map(([one]) => one);
    for (const [name, { path }] of cyclic) {
      this.#mistakes.tellCycle(name, path, names);
      this.#parameters.set(name, { ast: { kind: 'number', value: 1, span: { offset: 0, length: 0 } }, path });
    }
  }
}
