// What the YAML library finds wrong with the text, in an ecologist's words.
import type { ErrorCode, YAMLError } from 'yaml';
import type { Diagnostic, Place } from '../../diagnostic/diagnostic.ts';
import { tell } from '../../diagnostic/tell.ts';
import { lineAt, placeAt, type SourceText } from './source.ts';

interface Words {
  readonly message: string;
  readonly fix?: string;
}

const indent =
  'Lines of one section begin in the same column; what belongs to a key stands further right, after blanks.';
const brackets = 'Close every [ with ] and every { with }, and put a comma between items.';
const quoting = 'Put quotes around a text that holds a colon, a bracket, a comma or another mark.';

const twoKeys = 'Two keys stand on one line, or the line is indented wrongly';
const noComma = 'A comma is missing, or a text holds a colon';
const notAKey = 'This is not a key: a key stands on one line, with a colon and a blank after it';

const words: Readonly<Partial<Record<ErrorCode, Words>>> = {
  BAD_DQ_ESCAPE: { message: 'A backslash in double quotes begins something unknown', fix: 'Use single quotes.' },
  BAD_INDENT: { message: 'The line is indented wrongly', fix: indent },
  BAD_SCALAR_START: { message: 'A text cannot begin with this mark', fix: quoting },
  BLOCK_AS_IMPLICIT_KEY: { message: twoKeys, fix: `${indent} ${quoting}` },
  BLOCK_IN_FLOW: { message: noComma, fix: `${brackets} ${quoting}` },
  KEY_OVER_1024_CHARS: { message: 'A key is too long', fix: brackets },
  MISSING_CHAR: { message: 'A mark is missing', fix: `${brackets} A key needs a colon and a blank after it.` },
  MULTILINE_IMPLICIT_KEY: { message: notAKey, fix: 'Write `key: value`.' },
  UNEXPECTED_TOKEN: { message: 'This does not belong here', fix: `${indent} ${quoting}` },
};

/** What does not belong somewhere, by its first character. */
const unexpected: Readonly<Record<string, Words>> = {
  '}': { message: 'This bracket was never opened', fix: brackets },
  ']': { message: 'This bracket was never opened', fix: brackets },
  ',': { message: 'An item is missing before this comma', fix: brackets },
};

/** Follow from anchors, tags and directives, which are told by themselves. */
const toldElsewhere: ReadonlySet<ErrorCode> = new Set([
  ...(['ALIAS_PROPS', 'BAD_ALIAS', 'BAD_DIRECTIVE', 'BAD_PROP_ORDER'] as const),
  ...(['MULTIPLE_ANCHORS', 'MULTIPLE_TAGS', 'TAG_RESOLVE_FAILED', 'BAD_COLLECTION_TYPE'] as const),
]);

/** One for each line: a mistake of YAML often draws others after it. */
export function syntaxDiagnostics(errors: readonly YAMLError[], source: SourceText): readonly Diagnostic[] {
  const told = new Map<number, Diagnostic>();
  for (const error of errors) {
    if (toldElsewhere.has(error.code)) continue;
    const line = lineAt(source, error.pos[0]);
    if (!told.has(line)) told.set(line, translate(error, source));
  }
  return [...told.values()];
}

function translate(error: YAMLError, source: SourceText): Diagnostic {
  const [start, end] = error.pos;
  const place = placeAt(source, { offset: start, length: end - start });
  if (error.code === 'TAB_AS_INDENT' || /^[ ]*\t/u.test(place.text)) {
    return tell('error', 'yaml-tab', 'A tab indents this line', {
      place,
      fix: 'Use blanks to indent, two for each level.',
    });
  }
  const marked = place.text.charAt(place.column - 1);
  const mark = error.code === 'UNEXPECTED_TOKEN' ? unexpected[marked] : undefined;
  const known = mark ?? (afterQuote(error, place) ? quoteEnds : words[error.code]);
  const comment = /\s#/u.test(place.text) ? ' A blank and # begin a comment: put quotes around a name with #.' : '';
  return tell('error', 'yaml-syntax', known?.message ?? 'The text cannot be read as YAML', {
    place,
    found: asked(error.message),
    fix: `${known?.fix ?? quoting}${comment}`,
  });
}

const quoteEnds: Words = {
  message: 'The text in quotes ended before this',
  fix: 'Put double quotes around a text with an apostrophe.',
};

function afterQuote(error: YAMLError, place: Place): boolean {
  return error.code === 'UNEXPECTED_TOKEN' && /["']$/u.test(place.text.slice(0, place.column - 1));
}

/** The library names what is missing or too much in its first words; the rest is for programmers. */
function asked(message: string): string | undefined {
  const missing = /Missing (?:closing )?(\S+)|must end with a (\S+)|must be separated by (\S+)/u.exec(message);
  const mark = missing?.[1] ?? missing?.[2] ?? missing?.[3];
  return mark === undefined ? undefined : `no ${mark.replace(/[.]$/u, '')} where one is needed`;
}
