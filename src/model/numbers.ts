// Values of expressions: over named parameters, the attributes of a patch, and the year.
import { pinned } from '../machine/pinned.ts';
import type { SpecPath } from '../spec/document.ts';
import type { Ast } from '../spec/expression/ast.ts';
import { derivative } from '../spec/expression/derivative.ts';
import { evaluate, type Fault } from '../spec/expression/evaluate.ts';
import { namesIn } from '../spec/expression/names.ts';
import type { Finding } from '../spec/finding.ts';
import type { Dimension } from '../spec/quantity.ts';
import type { Resampled } from './chance.ts';
import { Definitions, type Attributes, type NamedExpression } from './definitions.ts';
import { NumberMistakes } from './number-mistakes.ts';
import { ResampledYears } from './resampled.ts';

/** Where an expression is evaluated. `attributes` are those of the patch at hand. */
export interface Where {
  readonly year: number;
  readonly attributes?: Attributes;
  /** How to call the patch in an error. */
  readonly patch?: string;
  /** What a unit behind the number may measure; plain numbers and shares take `%`. */
  readonly dimension?: Dimension;
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

/** Evaluates expressions; each mistake is told once, however many patches and years meet it. */
export class Numbers {
  readonly #definitions: Definitions;
  readonly #mistakes: NumberMistakes;
  /** Attributes that are being worked out, to see one that is made from itself. */
  readonly #open = new Set<string>();
  readonly #uses = new Map<string, Use>();
  readonly #drivers: Drivers['dated'];
  readonly #resampled: ResampledYears;
  /** Numbers that are read once a year; all others are read once and for all. */
  readonly #yearly = new Set<string>();
  readonly #slopes = new Map<Ast, Map<string, Ast>>();
  /** Names that values were asked to rest on, of each part that is traced. */
  readonly #traces = new Set<Set<string>>();
  #year = NaN;
  #memo = new Map<string, number | undefined>();

  constructor(parameters: readonly NamedExpression[], { attributes, drivers, findings }: Surroundings) {
    this.#mistakes = new NumberMistakes(findings);
    this.#definitions = new Definitions(parameters, attributes, this.#mistakes);
    this.#drivers = drivers.dated;
    this.#resampled = new ResampledYears(drivers.resampled);
  }

  /** The value, over resampled years their mean, or NaN after telling why there is none. */
  value(expression: number | string, path: SpecPath, where: Where): number {
    if (typeof expression === 'number') return expression;
    this.#uses.set(path.join('\0'), { expression, path, dimension: where.dimension ?? 'share' });
    const ast = this.#definitions.parse(expression, path, where.dimension);
    if (ast !== null) this.#trace(ast);
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
    const { names } = this.#resampled;
    const behind = names.length > 0 ? this.#definitions.namesBehind(ast) : null;
    if (!names.some((name) => behind?.has(name))) return valueInYear();
    const mean = this.#resampled.mean(() => {
      this.#memo = new Map();
      return valueInYear();
    });
    this.#memo = new Map();
    return mean;
  }

  /** True where the value can differ between years. */
  varies(expression: number | string, path: SpecPath, dimension?: Dimension): boolean {
    const ast = this.#definitions.parse(expression, path, dimension);
    this.#yearly.add(JSON.stringify(path));
    return ast !== null && this.#dated(ast) !== undefined;
  }

  /** The name by which an expression depends on the year, if it does. */
  #dated(ast: Ast, attributes?: Attributes): string | undefined {
    return [...this.#definitions.namesBehind(ast, attributes)].find(
      (name) => name === 'year' || this.#drivers.has(name),
    );
  }

  /** Every place where an expression was asked for its value. */
  uses(): readonly Use[] {
    return [...this.#uses.values()];
  }

  /** All names that the value rests on, those behind its parameters included. */
  behind({ expression, path, dimension }: Use): readonly string[] {
    const ast = this.#definitions.parse(expression, path, dimension);
    return ast === null ? [] : [...this.#definitions.namesBehind(ast)];
  }

  /** See `Definitions`. */
  expanded(...asked: Parameters<Definitions['expanded']>): Ast | null {
    const ast = this.#definitions.parse(asked[0], asked[1]);
    if (ast !== null) this.#trace(ast);
    return this.#definitions.expanded(...asked);
  }

  /** With all names that the numbers rest on that were asked for meanwhile, whichever patch they were asked of. */
  traced<T>(make: () => T): { readonly made: T; readonly names: ReadonlySet<string> } {
    const names = new Set<string>();
    this.#traces.add(names);
    const made = make();
    this.#traces.delete(names);
    return { made, names };
  }

  #trace(ast: Ast): void {
    if (this.#traces.size === 0) return;
    const behind = this.#definitions.namesBehind(ast);
    for (const names of this.#traces) for (const name of behind) names.add(name);
  }

  /** A number that is read once cannot change with the year: better told than frozen in its first year. */
  #isDatedWrongly(ast: Ast, path: SpecPath, attributes: Attributes | undefined): boolean {
    const key = JSON.stringify(path);
    if (this.#yearly.has(key)) return false;
    const name = this.#dated(ast, attributes);
    if (name === undefined) {
      // With attributes the next patch may be another matter.
      if (attributes === undefined || !this.#definitions.someWritten) this.#yearly.add(key);
      return false;
    }
    this.#mistakes.tellDated(name, path);
    return true;
  }

  /** The exact derivative of the value by a named parameter, through all that is made from it; NaN where it has none. */
  slope(expression: number | string, path: SpecPath, where: Where, parameter: string): number {
    if (typeof expression === 'number') return 0;
    const ast = this.#definitions.parse(expression, path, where.dimension);
    if (ast !== null) this.#trace(ast);
    if (ast === null || !this.#definitions.namesBehind(ast).has(parameter)) return 0;
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
    if (attribute !== undefined) {
      // Within the year at hand: the mean over all years is taken around the whole.
      const ast = this.#definitions.parse(attribute.expression, attribute.path, attribute.dimension);
      const rests = ast !== null && this.#definitions.namesBehind(ast).has(parameter);
      return rests ? this.#slopeOf(ast, where, parameter) : 0;
    }
    if (name === parameter) return 1;
    const made = this.#definitions.parameter(name);
    if (made === undefined || !this.#definitions.namesBehind(made.ast).has(parameter)) return 0;
    return this.#slopeOf(made.ast, { year: where.year }, parameter);
  }

  #derivative(ast: Ast, name: string): Ast {
    const known = this.#slopes.get(ast) ?? new Map<string, Ast>();
    this.#slopes.set(ast, known);
    const found = known.get(name) ?? derivative(ast, name);
    known.set(name, found);
    return found;
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
    const written = this.#definitions.parse(attribute.expression, attribute.path, attribute.dimension);
    if (written !== null) this.#trace(written);
    if (this.#open.has(name)) {
      this.#mistakes.tellCycle(name, attribute.path, [...this.#open]);
      return NaN;
    }
    this.#open.add(name);
    const result = written === null ? null : evaluate(written, (inner) => this.#lookUp(inner, where), pinned);
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
    const parameter = this.#definitions.parameter(name);
    if (parameter === undefined) return undefined;
    const result = evaluate(parameter.ast, (inner) => this.#lookUp(inner, { year }), pinned);
    if (!result.ok) this.#tell(result.fault, parameter.path, { year });
    const value = result.ok ? result.value : NaN;
    this.#memo.set(name, value);
    return value;
  }

  #tell(fault: Fault, path: SpecPath, { patch }: Where): void {
    const { attributeNames, parameterNames } = this.#definitions;
    const drivers = [...this.#drivers.keys(), ...this.#resampled.names];
    this.#mistakes.tellFault(fault, path, {
      patch,
      known: { attributes: attributeNames, parameters: parameterNames, drivers },
    });
  }
}
