// One value against the shape of a text, a number or true and false.
import { nearestName } from '../../diagnostic/nearest.ts';
import type { SourceNode, SourceScalar } from '../text/source.ts';
import { checkFormat, isStrangeNumber } from './format.ts';
import { put, type Report, type Subject } from './report.ts';
import { sortOf, type Shape } from './shape.ts';
import { either, expectationOf } from './words.ts';

export function checkScalar(scalar: SourceScalar, shape: Shape, subject: Subject, report: Report): void {
  if (scalar.value === null) tellMissing(shape, subject, report);
  else if (shape.const !== undefined) checkWord(scalar, [shape], subject, report);
  else if (sortOf(shape) === 'text') checkTextual(scalar, shape, subject, report);
  else if (sortOf(shape) === 'number') checkNumber(scalar, shape, subject, report);
  else if (sortOf(shape) === 'truth' && typeof scalar.value === 'boolean') return;
  else tellWrongType(scalar, shape, subject, report);
}

/** One of the words that the key takes. */
export function checkWord(scalar: SourceScalar, words: readonly Shape[], subject: Subject, report: Report): void {
  if (words.some((word) => word.const === scalar.value)) return;
  put(
    report,
    { code: 'unknown-word', message: `\`${subject.label}\` does not take this`, span: scalar.span },
    {
      found: scalar.source,
      expected: either(words.map(expectationOf)),
      nearest: nearestName(
        scalar.source,
        words.map((word) => String(word.const)),
      ),
    },
  );
}

function tellMissing(shape: Shape, subject: Subject, report: Report): void {
  put(
    report,
    { code: 'missing-value', message: `\`${subject.label}\` has no value`, span: subject.span },
    { expected: expectationOf(shape) },
  );
}

function checkTextual(scalar: SourceScalar, shape: Shape, subject: Subject, report: Report): void {
  if (typeof scalar.value !== 'string') tellQuotes(scalar, subject, report);
  else if (scalar.value.length < (shape.minLength ?? 0)) tellMissing(shape, subject, report);
  else if (shape.format !== undefined) checkFormat(scalar, shape.format, subject, report);
}

function tellQuotes(scalar: SourceScalar, subject: Subject, report: Report): void {
  const read = typeof scalar.value === 'number' ? `the number ${String(scalar.value)}` : `\`${String(scalar.value)}\``;
  put(
    report,
    {
      code: 'needs-quotes',
      message: `\`${subject.label}\` takes a text, and this is read as ${read}`,
      span: scalar.span,
    },
    { found: scalar.source, fix: `If it is a name or a text, write "${scalar.source}".` },
  );
}

function checkNumber(scalar: SourceScalar, shape: Shape, subject: Subject, report: Report): void {
  const { value } = scalar;
  if (typeof value !== 'number') {
    if (typeof value === 'string' && isStrangeNumber(scalar, subject, report)) return;
    tellWrongType(scalar, shape, subject, report);
    return;
  }
  if (takesNumber(shape, value)) return;
  put(
    report,
    { code: 'out-of-range', message: `\`${subject.label}\` is outside its limits`, span: scalar.span },
    { found: scalar.source, expected: expectationOf(shape), fix: percentInstead(value, shape) },
  );
}

/** Whether a number is of the sort and within the limits of a shape of numbers. */
export function takesNumber(shape: Shape, value: number): boolean {
  const whole = shape.type !== 'integer' || Number.isInteger(value);
  return whole && Number.isFinite(value) && within(value, shape);
}

function percentInstead(value: number, { minimum, maximum }: Shape): string | undefined {
  if (minimum !== 0 || maximum !== 1 || !(value > 1 && value <= 100)) return undefined;
  return `If percent was meant, write ${value} % or ${value / 100}.`;
}

function within(value: number, shape: Shape): boolean {
  const { minimum = -Infinity, maximum = Infinity } = shape;
  const { exclusiveMinimum = -Infinity, exclusiveMaximum = Infinity } = shape;
  return value >= minimum && value <= maximum && value > exclusiveMinimum && value < exclusiveMaximum;
}

/** A value of another sort than the shape takes. */
export function tellWrongType(node: SourceNode, shape: Shape, subject: Subject, report: Report): void {
  put(
    report,
    {
      code: 'wrong-type',
      message: `\`${subject.label}\` takes another sort of value`,
      span: node.kind === 'scalar' ? node.span : subject.span,
    },
    {
      found: foundIn(node),
      expected: expectationOf(shape),
      fix: adviceFor(node, shape),
    },
  );
}

function foundIn(node: SourceNode): string {
  if (node.kind === 'map') return 'keys with values';
  if (node.kind === 'list') return 'a list';
  return node.kind === 'scalar' ? node.source : 'nothing';
}

function adviceFor(node: SourceNode, shape: Shape): string | undefined {
  if (node.kind !== 'scalar') return undefined;
  if (sortOf(shape) === 'list') return `Write a list: [${node.source}].`;
  const [, number, behind] = /^(-?\d[\d.]*)\s{0,9}(\S{0,20})$/u.exec(node.source) ?? [];
  if (sortOf(shape) !== 'number' || number === undefined) return undefined;
  const { 'x-unit': own } = shape;
  if (behind === '%' && (own === undefined || own === 'share')) return `Write it as a share: ${Number(number) / 100}.`;
  const unit = own === undefined ? '' : `, in ${own}`;
  return `Write the number alone, without quotes or a unit${unit}: ${number}.`;
}
