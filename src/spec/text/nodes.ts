// From what the YAML library composed to a tree of our own: every value with its place, and every trap told.
import { isMap, isScalar, isSeq, Scalar, type YAMLMap, type YAMLSeq } from 'yaml';
import type { Collector } from '../../diagnostic/collector.ts';
import { tell } from '../../diagnostic/tell.ts';
import type { Span } from '../expression/ast.ts';
import { cutPieces, joined, textOf } from './commas.ts';
import { plainValue } from './scalar.ts';
import { placeAt, type SourceEntry, type SourceNode, type SourceScalar, type SourceText } from './source.ts';

/** Gathers diagnostics while it reads. */
export interface NodeReader {
  readonly source: SourceText;
  readonly found: Collector;
}

/** `where` is the place of a node that YAML left out. Depth was bounded before. */
export function readNode(node: unknown, where: Span, reader: NodeReader): SourceNode {
  if (isScalar(node)) return readScalar(node, where);
  if (isSeq(node)) return readList(node, where, reader);
  if (isMap(node)) return readMap(node, where, reader);
  if (node === null || node === undefined) {
    return { kind: 'scalar', value: null, source: '', plain: true, span: where };
  }
  return { kind: 'hole', span: where };
}

function spanOf(node: { readonly range?: readonly [number, number, number] | null | undefined }, where: Span): Span {
  const range = node.range;
  return range === null || range === undefined ? where : { offset: range[0], length: range[1] - range[0] };
}

function readScalar(node: Scalar, where: Span): SourceScalar {
  const source = typeof node.value === 'string' ? node.value : '';
  const plain = node.type === undefined || node.type === Scalar.PLAIN;
  const written = spanOf(node, where);
  // A word that was left out has no length: it is shown at what it belongs to.
  const span = plain && source === '' ? where : written;
  return { kind: 'scalar', value: plain ? plainValue(source) : source, source, plain, span };
}

function readList(node: YAMLSeq, where: Span, reader: NodeReader): SourceNode {
  const span = spanOf(node, where);
  const read = node.items.map((item) => readNode(item, { offset: span.offset, length: 1 }, reader));
  const items: SourceNode[] = [];
  for (let i = 0; i < read.length; i++) {
    const item = read[i];
    if (item === undefined) continue;
    const scalarAt = (after: number): SourceScalar | undefined => {
      const next = read[i + after];
      return next?.kind === 'scalar' ? next : undefined;
    };
    const pieces = node.flow === true && item.kind === 'scalar' ? cutPieces(item, scalarAt) : undefined;
    if (pieces === undefined || item.kind !== 'scalar') {
      items.push(item);
      continue;
    }
    items.push(mend(pieces, item, reader));
    i += pieces.length - 1;
  }
  return { kind: 'list', items, span };
}

function mend(pieces: readonly SourceScalar[], first: SourceScalar, reader: NodeReader): SourceScalar {
  const whole = joined(pieces, first);
  reader.found.add(
    tell('error', 'comma-in-braces', 'A comma inside braces or square brackets cuts this expression', {
      place: placeAt(reader.source, whole.span),
      found: pieces.map((piece) => `\`${piece.source}\``).join(' and '),
      fix: `Put quotes around it: "${textOf(pieces)}".`,
    }),
  );
  return whole;
}

function readMap(node: YAMLMap, where: Span, reader: NodeReader): SourceNode {
  const span = spanOf(node, where);
  const pairs = node.items.map((pair) => {
    const key = readNode(pair.key, { offset: span.offset, length: 1 }, reader);
    return { key, bare: pair.value === null, value: pair.value };
  });
  const entries: SourceEntry[] = [];
  for (let i = 0; i < pairs.length; i++) {
    const pair = pairs[i];
    if (pair === undefined) continue;
    const value = readNode(pair.value, pair.key.span, reader);
    const bareKeyAt = (after: number): SourceScalar | undefined => {
      const next = pairs[i + after];
      return next?.bare === true && next.key.kind === 'scalar' ? next.key : undefined;
    };
    const pieces = node.flow === true && value.kind === 'scalar' ? cutPieces(value, bareKeyAt) : undefined;
    const whole = pieces === undefined || value.kind !== 'scalar' ? value : mend(pieces, value, reader);
    addEntry(entries, pair.key, whole, reader);
    i += (pieces?.length ?? 1) - 1;
  }
  tellRepeated(entries, reader);
  return { kind: 'map', entries, span };
}

function addEntry(entries: SourceEntry[], key: SourceNode, value: SourceNode, reader: NodeReader): void {
  const place = placeAt(reader.source, key.span);
  if (key.kind !== 'scalar' || key.source === '') {
    reader.found.add(
      tell('error', 'yaml-key', 'A key must be a word or a name', {
        place,
        fix: 'Put quotes around a key that begins with a bracket or another mark.',
      }),
    );
  } else if (key.plain && key.source === '<<') {
    reader.found.add(
      tell('error', 'yaml-merge', 'A merge key (<<) has no meaning in a spec', {
        place,
        fix: 'Write the keys out, or give numbers that are used twice names under `parameters`.',
      }),
    );
  } else if (key.source === '__proto__') {
    reader.found.add(tell('error', 'unusable-name', 'This name cannot be used', { place, found: key.source }));
  } else {
    entries.push({ key: key.source, keySpan: key.span, plain: key.plain, value });
  }
}

function tellRepeated(entries: readonly SourceEntry[], reader: NodeReader): void {
  const first = new Map<string, SourceEntry>();
  for (const entry of entries) {
    if (reader.found.full) return;
    const before = first.get(entry.key);
    if (before === undefined) {
      first.set(entry.key, entry);
      continue;
    }
    const line = placeAt(reader.source, before.keySpan).line;
    reader.found.add(
      tell('error', 'duplicate-key', `\`${entry.key}\` stands twice in this section`, {
        place: placeAt(reader.source, entry.keySpan),
        fix: `Leave out one of them; the first is in line ${String(line)}.`,
      }),
    );
  }
}
