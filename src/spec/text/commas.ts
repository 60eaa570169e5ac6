// `{ adult: min(1, x) }`: YAML cuts at every comma inside braces, also inside the brackets of an expression.
import type { SourceScalar } from './source.ts';

/** How many brackets stay open after a text, when some were open before it. */
export function openBrackets(text: string, before = 0): number {
  let open = before;
  for (const character of text) {
    if (character === '(') open++;
    if (character === ')' && open > 0) open--;
  }
  return open;
}

/** An expression has at most so many commas. */
const mostPieces = 50;

/** The pieces from `first` on until all brackets are closed, or undefined where nothing was cut. */
export function cutPieces(
  first: SourceScalar,
  pieceAt: (index: number) => SourceScalar | undefined,
): readonly SourceScalar[] | undefined {
  let open = first.plain ? openBrackets(first.source) : 0;
  const pieces = [first];
  while (open > 0) {
    const piece = pieces.length < mostPieces ? pieceAt(pieces.length) : undefined;
    if (piece === undefined || !piece.plain) return undefined;
    pieces.push(piece);
    open = openBrackets(piece.source, open);
  }
  return pieces.length > 1 ? pieces : undefined;
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
