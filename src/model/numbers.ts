// Values of expressions: over named parameters, the attributes of a patch, and the year.
import { pinned } from '../machine/pinned.ts';
import { nearestName } from '../diagnostic/nearest.ts';
import type { SpecPath } from '../spec/document.ts';
import type { Ast } from '../spec/expression/ast.ts';
import { derivative } from '../spec/expression/derivative.ts';
import { evaluate, type Fault } from '../spec/expression/evaluate.ts';
import { namesIn } from '../spec/expression/names.ts';
import { replaceNames } from '../spec/expression/replace.ts';
import type { Finding } from '../spec/finding.ts';
import { readMeasure, type Dimension } from '../spec/quantity.ts';
import type { Resampled } from './chance.ts';
import { ResampledYears } from './resampled.ts';

/** A number of a patch, or the expression that it is written as. */
export type Attribute =
  number | { readonly expression: string; readonly path: SpecPath; readonly dimension: Dimension };

export type Attributes = ReadonlyMap<string, Attribute>;

/** Where an expression is evaluated. `attributes` are those of the patch at hand. */
export interface Where {
  readonly year: number;
  readonly attributes?: Attributes;
  /** How to call the patch in an error. */
  readonly patch?: string;
  /** What a unit behind the number may measure; plain numbers and shares take `%`. */
  readonly dimension?: Dimension;
}

export interface NamedExpression {
  readonly name: string;
  readonly expression: number | string;
  readonly path: SpecPath;
}

export interface Use {
  readonly expression: string;
  readonly path: SpecPath;
  readonly dimension: Dimension;
}

/** What drives rates from outside. */
export interface Drivers {
  /** Of each driver that follows the calendar, the value in a calendar year of the model. */
  readonly dated: ReadonlyMap<string, (year: number) => number>;
  readonly resampled: Resampled | null;
}

/** What expressions read besides named numbers, and where mistakes are told. */
export interface Surroundings {
  /** By patch. */
  readonly attributes: readonly Attributes[];
  readonly drivers: Drivers;
  readonly findings: Finding[];
}

/** Evaluates expressions and tells each mistake once, however many patches and years meet it. */
export class Numbers {
  readonly #parameters = new Map<string, { readonly ast: Ast; readonly path: SpecPath }>();
  readonly #parsed = new Map<string, Ast | null>();
  readonly #told = new Set<string>();
  readonly #findings: Finding[];
  readonly #attributeNames: ReadonlySet<string>;
  /** By name what patches write that is more than a number. */
  readonly #writtenAttributes = new Map<string, Ast[]>();
  /** Attributes that are being worked out, to see one that is made from itself. */
  readonly #open = new Set<string>();
  readonly #uses = new Map<string, Use>();
  readonly #drivers: Drivers['dated'];
  readonly #resampled: ResampledYears;
  /** Numbers that are read once a year; all others are read once and for all. */
  readonly #yearly = new Set<string>();
  readonly #slopes = new Map<Ast, Map<string, Ast>>();
  #year = NaN;
  #memo = new Map<string, number | undefined>();

  constructor(parameters: readonly NamedExpression[], { attributes, drivers, findings }: Surroundings) {
    this.#findings = findings;
    this.#attributeNames = new Set(attributes.flatMap((own) => [...own.keys()]));
    this.#drivers = drivers.dated;
    this.#resampled = new ResampledYears(drivers.resampled);
    for (const [name, one] of attributes.flatMap((own) => [...own])) {
      if (typeof one === 'number') continue;
      const ast = this.#parse(one.expression, one.path, one.dimension);
      if (ast !== null) this.#writtenAttributes.set(name, [...(this.#writtenAttributes.get(name) ?? []), ast]);
    }
    for (const { name, expression, path } of parameters) {
      const ast = this.#parse(expression, path);
      if (ast !== null) this.#parameters.set(name, { ast, path });
    }
    this.#refuseCycles();
  }

  /** The value, over resampled years their mean, or NaN after telling why there is none. */
  value(expression: number | string, path: SpecPath, where: Where): number {
    if (typeof expression === 'number') return expression;
    this.#uses.set(path.join('\0'), { expression, path, dimension: where.dimension ?? 'share' });
    const ast = this.#parse(expression, path, where.dimension);
    if (ast === null || this.#isDatedWrongly(ast, path, where.attributes)) return NaN;
    return this.#overYears(ast, () => {
      const result = evaluate(ast, (name) => this.#lookUp(name, where), pinned);
      if (result.ok) return result.value;
      this.#tell(result.fault, path, where);
      return NaN;
    });
  }

  /** The mean over all resampled years where the expression rests on them, else what it is. */
  #overYears(ast: Ast, valueInYear: () => number): number {
    if (!this.#resampled.names.some((name) => this.#namesBehind(ast).has(name))) return valueInYear();
    const mean = this.#resampled.mean(() => {
      this.#memo = new Map();
      return valueInYear();
    });
    this.#memo = new Map();
    return mean;
  }

  /** True where the value can differ between years. */
  varies(expression: number | string, path: SpecPath, dimension?: Dimension): boolean {
    const ast = this.#parse(expression, path, dimension);
    this.#yearly.add(JSON.stringify(path));
    return ast !== null && this.#dated(ast) !== undefined;
  }

  /** The name by which an expression depends on the year, if it does. */
  #dated(ast: Ast, attributes?: Attributes): string | undefined {
    return [...this.#namesBehind(ast, attributes)].find((name) => name === 'year' || this.#drivers.has(name));
  }

  /** Every place where an expression was asked for its value. */
  uses(): readonly Use[] {
    return [...this.#uses.values()];
  }

  /** All names that the value rests on, those behind its parameters included. */
  behind({ expression, path, dimension }: Use): readonly string[] {
    const ast = this.#parse(expression, path, dimension);
    return ast === null ? [] : [...this.#namesBehind(ast)];
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
    const ast = this.#parse(expression, path);
    const replace = (name: string): Ast | null => {
      const [written] = attributes === undefined ? [] : this.#attributesCalled(name, attributes);
      if (written !== undefined) return replaceNames(written, replace);
      const parameter = keep.has(name) ? undefined : this.#parameters.get(name);
      return parameter === undefined ? null : replaceNames(parameter.ast, replace);
    };
    return ast === null ? null : replaceNames(ast, replace);
  }

  /** A number that is read once cannot change with the year: better told than frozen in its first year. */
  #isDatedWrongly(ast: Ast, path: SpecPath, attributes: Attributes | undefined): boolean {
    const key = JSON.stringify(path);
    if (this.#yearly.has(key)) return false;
    const name = this.#dated(ast, attributes);
    if (name === undefined) {
      // With attributes the next patch may be another matter.
      if (attributes === undefined || this.#writtenAttributes.size === 0) this.#yearly.add(key);
      return false;
    }
    if (this.#told.has(key)) return true;
    this.#told.add(key);
    this.#findings.push({
      severity: 'error',
      code: 'fixed-in-time',
      message: `This number is the same in all years, and \`${name}\` changes with the year`,
      path,
      details: { expected: 'a number or an expression that does not depend on the year' },
    });
    return true;
  }

  /** The exact derivative of the value by a named parameter, through all that is made from it; NaN where it has none. */
  slope(expression: number | string, path: SpecPath, where: Where, parameter: string): number {
    if (typeof expression === 'number') return 0;
    const ast = this.#parse(expression, path, where.dimension);
    if (ast === null || !this.#namesBehind(ast).has(parameter)) return 0;
    return this.#overYears(ast, () => this.#slopeOf(ast, where, parameter));
  }

  #slopeOf(ast: Ast, where: Where, parameter: string): number {
    let sum = 0;
    for (const name of namesIn(ast)) {
      const inner = this.#slopeOfName(name, where, parameter);
      if (inner === 0) continue;
      const outer = evaluate(this.#derivative(ast, name), (one) => this.#lookUp(one, where), pinned);
      sum += inner * (outer.ok ? outer.value : NaN);
    }
    return sum;
  }

  #slopeOfName(name: string, where: Where, parameter: string): number {
    if (name === 'year') return 0;
    const attribute = where.attributes?.get(name);
    if (typeof attribute === 'number') return 0;
    if (attribute !== undefined)
      return this.slope(attribute.expression, attribute.path, { ...where, ...attribute }, parameter);
    if (name === parameter) return 1;
    const made = this.#parameters.get(name);
    if (made === undefined || !this.#namesBehind(made.ast).has(parameter)) return 0;
    return this.#slopeOf(made.ast, { year: where.year }, parameter);
  }

  #derivative(ast: Ast, name: string): Ast {
    const known = this.#slopes.get(ast) ?? new Map<string, Ast>();
    this.#slopes.set(ast, known);
    const found = known.get(name) ?? derivative(ast, name);
    known.set(name, found);
    return found;
  }

  #parse(expression: number | string, path: SpecPath, dimension: Dimension = 'share'): Ast | null {
    const key = `${dimension}:${expression}`;
    const known = this.#parsed.get(key);
    if (known !== undefined) return known;
    const parsed = readMeasure(expression, dimension);
    this.#parsed.set(key, parsed.ok ? parsed.ast : null);
    if (parsed.ok) return parsed.ast;
    const { message, ...details } = parsed.error;
    const { code, span, ...told } = details;
    this.#findings.push({ severity: 'error', code, message, path, span, details: told });
    return null;
  }

  #lookUp(name: string, where: Where): number | undefined {
    if (name === 'year') return where.year;
    const driver = this.#drivers.get(name);
    if (driver !== undefined) return driver(where.year);
    const resampled = this.#resampled.value(name);
    if (resampled !== undefined) return resampled;
    const attribute = where.attributes?.get(name);
    if (attribute !== undefined) return typeof attribute === 'number' ? attribute : this.attribute(name, where);
    return this.#parameter(name, where.year);
  }

  /** The number of a patch called so, if it has one. */
  attribute(name: string, where: Where): number | undefined {
    const attribute = where.attributes?.get(name);
    if (typeof attribute !== 'object') return attribute;
    if (this.#open.has(name)) {
      this.#tellCycle(name, attribute.path, [...this.#open]);
      return NaN;
    }
    this.#open.add(name);
    const ast = this.#parse(attribute.expression, attribute.path, attribute.dimension);
    const result = ast === null ? null : evaluate(ast, (inner) => this.#lookUp(inner, where), pinned);
    this.#open.delete(name);
    if (result?.ok === false) this.#tell(result.fault, attribute.path, where);
    return result?.ok === true ? result.value : NaN;
  }

  #parameter(name: string, year: number): number | undefined {
    if (year !== this.#year) {
      this.#year = year;
      this.#memo = new Map();
    }
    if (this.#memo.has(name)) return this.#memo.get(name);
    const parameter = this.#parameters.get(name);
    if (parameter === undefined) return undefined;
    const result = evaluate(parameter.ast, (inner) => this.#lookUp(inner, { year }), pinned);
    if (!result.ok) this.#tell(result.fault, parameter.path, { year });
    const value = result.ok ? result.value : NaN;
    this.#memo.set(name, value);
    return value;
  }

  /** With the attributes of one patch, or whatever any patch has. */
  #namesBehind(ast: Ast, attributes?: Attributes): ReadonlySet<string> {
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

  #attributesCalled(name: string, attributes: Attributes | undefined): readonly Ast[] {
    if (attributes === undefined) return this.#writtenAttributes.get(name) ?? [];
    const own = attributes.get(name);
    if (typeof own !== 'object') return [];
    const ast = this.#parse(own.expression, own.path, own.dimension);
    return ast === null ? [] : [ast];
  }

  #refuseCycles(): void {
    const cyclic = [...this.#parameters].filter(([name, { ast }]) => this.#namesBehind(ast).has(name));
    for (const [name, { path }] of cyclic) {
      this.#tellCycle(
        name,
        path,
        cyclic.map(([one]) => one),
      );
      this.#parameters.set(name, { ast: { kind: 'number', value: 1, span: { offset: 0, length: 0 } }, path });
    }
  }

  #tellCycle(name: string, path: SpecPath, names: readonly string[]): void {
    const key = JSON.stringify(path);
    if (this.#told.has(key)) return;
    this.#told.add(key);
    this.#findings.push({
      severity: 'error',
      code: 'parameter-cycle',
      message: `The ${path[0] === 'parameters' ? 'parameter' : 'attribute'} \`${name}\` is made from itself`,
      path,
      details: { found: names.join(', '), fix: 'Give one of them a number of its own.' },
    });
  }

  #tell(fault: Fault, path: SpecPath, where: Where): void {
    const key = JSON.stringify([path, fault.code, fault.span]);
    if (this.#told.has(key)) return;
    this.#told.add(key);
    const { code, message, span } = fault;
    if (code !== 'unknown-name') {
      const inPatch = where.patch === undefined ? '' : ` in ${where.patch}`;
      this.#findings.push({ severity: 'error', code, message: message + inPatch, path, span });
      return;
    }
    this.#findings.push({ severity: 'error', code, ...this.#unknown(fault.name ?? '', where), path, span });
  }

  #unknown(name: string, where: Where): Pick<Finding, 'message' | 'details'> {
    if (this.#attributeNames.has(name)) {
      if (where.patch === undefined) {
        return {
          message: `\`${name}\` belongs to a patch and cannot be read here`,
          details: { found: name, expected: 'a number, a parameter or `year`' },
        };
      }
      return {
        message: `The patch \`${where.patch}\` has no \`${name}\``,
        details: { fix: `Give every patch its \`${name}\`.` },
      };
    }
    const known = [
      ...this.#parameters.keys(),
      ...this.#attributeNames,
      ...this.#drivers.keys(),
      ...this.#resampled.names,
      'year',
    ];
    return {
      message: `There is no \`${name}\` here`,
      details: {
        found: name,
        expected: 'the name of a parameter, of an attribute of the patches, or `year`',
        nearest: nearestName(name, known),
        fix: `Add it under \`parameters\`, or correct the name.`,
      },
    };
  }
}
