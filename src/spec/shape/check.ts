// A tree of values against a shape. Every mistake is told at its place, in words that name the key.
import { nearestName } from '../../diagnostic/nearest.ts';
import type { SourceEntry, SourceList, SourceMap, SourceNode, SourceScalar } from '../text/source.ts';
import { checkFormat, checkName } from './format.ts';
import { put, type Report, type Subject } from './report.ts';
import { checkScalar, tellWrongType } from './scalar.ts';
import { isSeveral, knownKeys, shapeOfKey, sortOf, type Shape } from './shape.ts';
import { checkUnion } from './union.ts';
import { expectationOf } from './words.ts';

export function checkShape(node: SourceNode, shape: Shape, subject: Subject, report: Report): void {
  if (node.kind === 'hole') return;
  if (node.file !== undefined && node.file !== report.source) {
    const span = { ...node.span, length: Math.max(1, node.span.length) };
    checkShape(node, shape, { ...subject, span }, { ...report, source: node.file });
    return;
  }
  if (shape.anyOf !== undefined) checkUnion(node, shape, { subject, report, check: checkShape });
  else if (node.kind === 'map' && sortOf(shape) === 'map') checkMap(node, shape, subject, report);
  else if (node.kind === 'list' && sortOf(shape) === 'list') checkList(node, shape, subject, report);
  else if (node.kind === 'scalar') checkScalar(node, shape, subject, report);
  else tellWrongType(node, shape, subject, report);
}

export function subjectOf(entry: SourceEntry): Subject {
  return { label: entry.key, span: entry.keySpan };
}

export function checkMap(map: SourceMap, shape: Shape, subject: Subject, report: Report): void {
  for (const entry of map.entries) {
    if (report.found.full) return;
    checkEntry(entry, shape, entry.file === undefined ? report : { ...report, source: entry.file });
  }
  for (const key of shape.required ?? []) {
    if (!map.entries.some((entry) => entry.key === key)) tellMissingKey(key, shape, subject, report);
  }
}

function checkEntry(entry: SourceEntry, shape: Shape, report: Report): void {
  const known = shapeOfKey(shape, entry.key);
  if (known === undefined) {
    tellUnknownKey(entry, Object.keys(knownKeys(shape)), report);
    return;
  }
  if (!Object.hasOwn(knownKeys(shape), entry.key)) checkOwnKey(entry, shape, report);
  checkShape(entry.value, known, subjectOf(entry), report);
}

/** A key that the author chose: a name, and perhaps a slip in a key of the language. */
function checkOwnKey(entry: SourceEntry, shape: Shape, report: Report): void {
  const { key, keySpan, plain } = entry;
  const scalar: SourceScalar = { kind: 'scalar', value: key, source: key, plain, span: keySpan };
  if (shape.propertyNames?.format === undefined) checkName(scalar, report);
  else checkFormat(scalar, shape.propertyNames.format, subjectOf(entry), report);
  const nearest = nearestName(key, Object.keys(knownKeys(shape)));
  if (nearest === undefined) return;
  put(
    report,
    { severity: 'warning', code: 'near-key', message: `\`${key}\` is taken for a name of your own`, span: keySpan },
    { nearest, fix: `Write \`${nearest}\` if that is meant.` },
  );
}

export function tellUnknownKey(entry: SourceEntry, known: readonly string[], report: Report): void {
  const nearest = nearestName(entry.key, known);
  const few = known.length > 0 && known.length <= 12 ? known.map((key) => `\`${key}\``).join(', ') : undefined;
  put(
    report,
    { code: 'unknown-key', message: `\`${entry.key}\` is not a key of this section`, span: entry.keySpan },
    {
      nearest,
      expected: nearest === undefined ? few : undefined,
      // `{ once: 90,000 }` is the key `once` and a key `000`.
      fix: /^\d{3}$/u.test(entry.key)
        ? 'If it ends a number, write that without commas between its digits.'
        : undefined,
    },
  );
}

function tellMissingKey(key: string, shape: Shape, subject: Subject, report: Report): void {
  const known = shapeOfKey(shape, key);
  const example = known?.examples?.[0];
  put(
    report,
    {
      code: 'missing-key',
      message: `${subject.label === '' ? 'The spec' : `\`${subject.label}\``} needs \`${key}\``,
      span: subject.span,
    },
    {
      expected: known === undefined ? undefined : expectationOf(known),
      fix: typeof example === 'string' ? `Add a line such as \`${key}: ${example}\`.` : undefined,
      reason: known?.description,
    },
  );
}

function checkList(list: SourceList, shape: Shape, subject: Subject, report: Report): void {
  const { minItems = 0, maxItems = Infinity, items } = shape;
  const [least, most] = isSeveral(items) ? [items.length, items.length] : [minItems, maxItems];
  const number = list.items.length;
  if (number < least || number > most) {
    const message = `\`${subject.label}\` has too ${number < least ? 'few' : 'many'} items`;
    const bound = number < least ? `at least ${String(least)}` : `at most ${String(most)}`;
    const expected = isSeveral(items) ? expectationOf(shape) : bound;
    put(report, { code: 'wrong-length', message, span: subject.span }, { found: String(number), expected });
  }
  for (const [index, item] of list.items.entries()) {
    if (report.found.full) return;
    const own = isSeveral(items) ? items[index] : items;
    const span = item.span.length > 0 ? item.span : subject.span;
    if (own !== undefined) checkShape(item, own, { label: subject.label, span }, report);
  }
  if (shape.uniqueItems === true) tellRepeated(list, subject, report);
}

function tellRepeated(list: SourceList, subject: Subject, report: Report): void {
  const seen = new Set<string>();
  for (const item of list.items) {
    if (item.kind !== 'scalar' || report.found.full) continue;
    if (seen.has(item.source)) {
      put(report, {
        code: 'repeated-item',
        message: `\`${item.source}\` stands twice in \`${subject.label}\``,
        span: item.span,
      });
    }
    seen.add(item.source);
  }
}
