// Texts that have a form of their own: names, identifiers, expressions and quantities.
import { pinned } from '../../machine/pinned.ts';
import { readChance } from '../chance.ts';
import { reservedWords, type Ast } from '../expression/ast.ts';
import { evaluate } from '../expression/evaluate.ts';
import { namesIn } from '../expression/names.ts';
import { dimensionWords, readMeasure, type Dimension } from '../quantity.ts';
import { isYear } from '../schedule.ts';
import { isAmbiguousWord } from '../text/scalar.ts';
import { spanWithin, type SourceScalar } from '../text/source.ts';
import { put, type Report, type Subject } from './report.ts';

/** Checks the text of a scalar against a format of the schema. */
export function checkFormat(scalar: SourceScalar, format: string, subject: Subject, report: Report): void {
  if (format === 'name') checkName(scalar, report);
  else if (format === 'identifier') checkIdentifier(scalar, report);
  else if (format === 'chance') checkChance(scalar, subject, report);
  else if (format === 'year') checkYear(scalar, report);
  else if (format === 'expression') checkExpression(scalar, subject, report);
  else if (isDimension(format) && !isStrangeNumber(scalar, subject, report)) checkQuantity(scalar, format, report);
}

function isDimension(format: string): format is Dimension {
  return Object.hasOwn(dimensionWords, format);
}

function checkYear({ source, span }: SourceScalar, report: Report): void {
  if (isYear(source)) return;
  put(
    report,
    { code: 'not-a-year', message: `\`${source}\` is not a year`, span },
    { expected: 'a calendar year, such as 2027' },
  );
}

const longestName = 100;

export function checkName(scalar: SourceScalar, report: Report): void {
  const { source, span } = scalar;
  if (source.length > longestName || /[\p{Cc}\p{Cf}\p{Zl}\p{Zp}\p{Co}]/u.test(source) || source !== source.trim()) {
    put(
      report,
      { code: 'unusable-name', message: 'This name cannot be used', span },
      { expected: `at most ${String(longestName)} visible characters, without blanks at its ends` },
    );
  } else if (scalar.plain && isAmbiguousWord(source)) {
    put(
      report,
      { severity: 'warning', code: 'quote-word', message: `\`${source}\` is a name here`, span },
      { reason: 'Other programs that read YAML take it for true, false or nothing.', fix: `Write "${source}".` },
    );
  }
}

const reserved: ReadonlySet<string> = new Set(reservedWords);

function checkIdentifier(scalar: SourceScalar, report: Report): void {
  const { source, span } = scalar;
  if (reserved.has(source)) {
    put(
      report,
      { code: 'unusable-name', message: `\`${source}\` has a meaning of its own in expressions`, span },
      { fix: 'Choose another name.' },
    );
  } else if (source.length > longestName || !/^[\p{L}_][\p{L}\p{M}\p{N}_]*$/u.test(source)) {
    const better = source.trim().replace(/[^\p{L}\p{M}\p{N}_]+/gu, '_');
    put(
      report,
      { code: 'unusable-name', message: 'This name cannot stand in an expression', span },
      {
        found: source,
        expected: `a letter, then letters, digits and _, at most ${String(longestName)}`,
        ...(/^[\p{L}_]/u.test(better) ? { fix: `Write \`${better.slice(0, longestName)}\`.` } : {}),
      },
    );
  }
}

/** Expressions are numbers without a unit; only % may stand behind one. */
function checkExpression(scalar: SourceScalar, subject: Subject, report: Report): void {
  if (!isStrangeNumber(scalar, subject, report)) checkQuantity(scalar, 'share', report);
}

/** A share that says what it is a chance of. */
function checkChance(scalar: SourceScalar, subject: Subject, report: Report): void {
  const read = readChance(scalar.source);
  if (read === null) {
    const { span } = scalar;
    const message = `\`${subject.label}\` does not say what it is the chance of`;
    put(
      report,
      { code: 'wrong-unit', message, span },
      { found: scalar.source, expected: '`0.04 per patch` or `0.04 per landscape`' },
    );
  } else checkExpression({ ...scalar, source: read.amount, value: read.amount }, subject, report);
}

function checkQuantity(scalar: SourceScalar, dimension: Dimension, report: Report): void {
  const read = readMeasure(scalar.source, dimension);
  if (read.ok) {
    checkConstant(read.ast, scalar, report);
    return;
  }
  const { code, message, span, expected, ...details } = read.error;
  const words = dimension === 'share' ? 'a number or an expression without a unit' : dimensionWords[dimension];
  const wanted = expected === undefined || code === 'wrong-unit' ? words : expected;
  const where = spanWithin(scalar, span, report.source);
  put(report, { code, message, span: where }, { ...details, expected: wanted });
}

/** What needs no names has its value already here, or none. */
function checkConstant(ast: Ast, scalar: SourceScalar, report: Report): void {
  if (namesIn(ast).length > 0) return;
  const result = evaluate(ast, () => undefined, pinned);
  if (result.ok || result.fault.code === 'unknown-name') return;
  const { code, message, span } = result.fault;
  put(report, { code, message, span: spanWithin(scalar, span, report.source) });
}

/** Numbers in forms that YAML readers, or people, disagree about. True if it told one. */
export function isStrangeNumber(scalar: SourceScalar, subject: Subject, report: Report): boolean {
  const { source, span } = scalar;
  const digits = source.replaceAll('_', '');
  if (/^\+\s*[\d.]+(?:[eE][+-]?\d+)?$/u.test(digits)) {
    put(
      report,
      {
        code: 'relative-change',
        message: `\`${subject.label}\` takes a number without a plus`,
        span,
      },
      {
        found: source,
        fix: `Write ${digits.slice(1).trim()}. A change by so much is { add: ${digits.slice(1).trim()} }, where changes are taken.`,
      },
    );
    return true;
  }
  const other = /^[-+]?0[xob][\da-f]+$/iu.test(source) || /^[-+]?\.(?:inf|nan)$/iu.test(source);
  const underscored = source.includes('_') && /^-?\d[\d.]*(?:e[-+]?\d+)?$/iu.test(digits);
  if (!other && !underscored) return false;
  put(
    report,
    { code: 'number-format', message: 'This is no number here', span },
    {
      found: source,
      expected: 'digits with at most one point: 1000, 0.74 or 1e3',
      ...(underscored ? { fix: `Write ${digits}.` } : {}),
    },
  );
  return true;
}
