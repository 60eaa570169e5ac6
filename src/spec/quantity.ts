// Numbers with a unit, such as `4 km`: any expression and a unit behind it, brought to the base units km, km², years and shares.
import type { Ast, Span } from './expression/ast.ts';
import { divide, multiply, number } from './expression/build.ts';
import type { ExpressionError } from './expression/failure.ts';
import { parseExpression } from './expression/parse.ts';

export type Dimension = 'length' | 'area' | 'share' | 'per-length' | 'time';

/** How many of the base unit one of it is: `times`, or one over it: `over`, so that 140 ha is 1.4 km² to the last bit. */
interface Unit {
  readonly words: readonly string[];
  readonly times?: number;
  readonly over?: number;
}

/** The first unit is the base unit, which a bare number has. */
const units: Readonly<Record<Dimension, readonly Unit[]>> = {
  length: [{ words: ['km'] }, { words: ['m'], over: 1000 }],
  area: [{ words: ['km2', 'km²', 'km^2'] }, { words: ['ha'], over: 100 }, { words: ['m2', 'm²', 'm^2'], over: 1e6 }],
  share: [{ words: [] }, { words: ['%'], over: 100 }],
  'per-length': [{ words: ['per km', '/km', '/ km'] }, { words: ['per m', '/m', '/ m'], times: 1000 }],
  time: [{ words: ['year', 'years'] }, { words: ['month', 'months'], over: 12 }],
};

/** What a quantity is called and which units it takes, in words. */
export const dimensionWords: Readonly<Record<Dimension, string>> = {
  length: 'a distance in km or m, such as `4 km`',
  area: 'an area in ha, km2 or m2, such as `140 ha`',
  share: 'a share between 0 and 1, or in %, such as `3 %`',
  'per-length': 'a number per km or per m, such as `0.03 per km`',
  time: 'a time in years or months, such as `1 year`',
};

export interface UnitError {
  readonly code: 'wrong-unit';
  readonly message: string;
  readonly span: Span;
  readonly found: string;
  readonly expected: string;
  readonly fix?: string;
}

export type Measured =
  { readonly ok: true; readonly ast: Ast } | { readonly ok: false; readonly error: ExpressionError | UnitError };

export type Quantified =
  { readonly ok: true; readonly value: number } | { readonly ok: false; readonly error: ExpressionError | UnitError };

/** A plain number with or without a unit, in the base unit of its dimension. */
export function readQuantity(text: string | number, dimension: Dimension): Quantified {
  const measured = readMeasure(text, dimension);
  if (!measured.ok) return measured;
  const { ast } = measured;
  if (ast.kind === 'number') return { ok: true, value: ast.value };
  if (ast.kind === 'negate' && ast.of.kind === 'number') return { ok: true, value: -ast.of.value };
  const message = 'A plain number is needed here';
  return unitError({ message, span: ast.span, found: String(text), expected: dimensionWords[dimension] });
}

/** A length of time in years, null where it is not a whole number of them from 1. */
export function readWholeYears(text: string | number): number | null {
  const read = readQuantity(text, 'time');
  return read.ok && Number.isInteger(read.value) && read.value >= 1 ? read.value : null;
}

/** An expression with or without a unit, as an expression in the base unit of its dimension. */
export function readMeasure(text: string | number, dimension: Dimension): Measured {
  const parts = typeof text === 'number' ? undefined : splitUnit(text);
  const known = units[dimension].find((one) => parts !== undefined && one.words.includes(parts.unit));
  const bare = parseExpression(text);
  // `0.03/km` reads as a division, too: the unit comes first. All other units follow a number without a sign.
  if (parts === undefined || (bare.ok && !(known !== undefined && parts.unit.startsWith('/')))) return bare;
  const amount = parseExpression(parts.amount);
  if (!amount.ok) return bare;
  if (known !== undefined) return { ok: true, ast: scaled(amount.ast, known) };
  const span = { offset: parts.offset, length: parts.unit.length };
  const message = 'This unit does not fit here';
  return unitError({ message, span, found: parts.unit, expected: dimensionWords[dimension] });
}

function unitError(details: Omit<UnitError, 'code'>): { readonly ok: false; readonly error: UnitError } {
  return { ok: false, error: { code: 'wrong-unit', ...details } };
}

/** Units are short: only the end of a text is looked at, however long it is. */
const unitAtEnd = /(?<=[^\s/])\s{0,9}((?:per\s{1,9}|\/\s{0,9})?[\p{L}%°][\p{L}²]{0,19}(?:\^?2)?)$/u;
const longestUnit = 60;

/** A number or expression and the unit behind it, which is empty where it has none. */
export function amountAndUnit(text: string): { readonly amount: string; readonly unit: string } {
  const parts = parseExpression(text).ok ? undefined : splitUnit(text);
  return parts === undefined ? { amount: text, unit: '' } : { amount: parts.amount.trim(), unit: parts.unit };
}

interface UnitSplit {
  readonly amount: string;
  readonly unit: string;
  readonly offset: number;
}

function splitUnit(text: string): UnitSplit | undefined {
  const trimmed = text.trimEnd();
  const before = Math.max(0, trimmed.length - longestUnit);
  const match = unitAtEnd.exec(trimmed.slice(before));
  const unit = match?.[1];
  if (match === null || unit === undefined) return undefined;
  const offset = trimmed.length - unit.length;
  return { amount: text.slice(0, before + match.index), unit: unit.replace(/\s+/gu, ' '), offset };
}

/** Numbers are brought to the base unit at once, other expressions by a factor in the tree. */
function scaled(ast: Ast, unit: Unit): Ast {
  const { times = 1, over = 1 } = unit;
  if (ast.kind === 'number') return number((ast.value * times) / over, ast.span);
  if (ast.kind === 'negate' && ast.of.kind === 'number') return number((-ast.of.value * times) / over, ast.span);
  return divide(multiply(ast, number(times, ast.span), ast.span), number(over, ast.span), ast.span);
}
