// `{ adult: min(1, x) }`: YAML cuts at every comma inside braces, also inside the brackets of an expression.
import type { SourceScalar } from './source.ts';

/** How many brackets stay open. */
export function openBrackets(text: string): number {
  let open = 0;
  for (const character of text) {
    if (character === '(') open++;
    if (character === ')' && open > 0) open--;
  }
  return open;
}

/** The pieces from `first` on that together close all brackets, or undefined where nothing was cut. */
export function cutPieces(
  first: SourceScalar,
  following: Iterable<SourceScalar | undefined>,
): readonly SourceScalar[] | undefined {
  if (!first.plain || openBrackets(first.source) === 0) return undefined;
  const pieces = [first];
  for (const piece of following) {
    if (piece === undefined || !piece.plain) return undefined;
    pieces.push(piece);
    if (openBrackets(textOf(pieces)) === 0) return pieces;
  }
  return undefined;
}

export function textOf(pieces: readonly SourceScalar[]): string {
  return pieces.map((piece) => piece.source).join(', ');
}

/** The expression as it was meant. */
export function joined(pieces: readonly SourceScalar[], first: SourceScalar): SourceScalar {
  const last = pieces.at(-1) ?? first;
  const length = last.span.offset + last.span.length - first.span.offset;
  const text = textOf(pieces);
  return { kind: 'scalar', value: text, source: text, plain: true, span: { offset: first.span.offset, length } };
}
