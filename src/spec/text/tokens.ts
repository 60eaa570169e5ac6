// The first pass over YAML: it counts and measures, so that nothing of a size or depth that could harm goes further, and
// finds the marks of YAML that have no meaning in a spec.
import { Lexer, Parser, type CST } from 'yaml';
import { Collector } from '../../diagnostic/collector.ts';
import type { Diagnostic } from '../../diagnostic/diagnostic.ts';
import { tell, type Details } from '../../diagnostic/tell.ts';
import type { DiagnosticCode } from '../../diagnostic/codes.ts';
import { deepest, mostMarks, mostTokens } from './limits.ts';
import { placeAt, type SourceText } from './source.ts';

export interface TokenPass {
  readonly tokens: readonly CST.Token[];
  /** Errors and warnings; with `fatal` there is no use in going on. */
  readonly diagnostics: readonly Diagnostic[];
  readonly fatal: boolean;
}

export function readTokens(source: SourceText): TokenPass {
  const parser = new Parser();
  const tokens: CST.Token[] = [];
  let marks = 0;
  let all = 0;
  let offset = 0;
  for (const lexeme of new Lexer().lex(source.text)) {
    if (!/^[\s\u0002\u001f\u0018]*$/u.test(lexeme) && !lexeme.startsWith('#')) marks++;
    if (marks > mostMarks || ++all > mostTokens) return stopped(tooMany(source, offset));
    tokens.push(...parser.next(lexeme));
    if (!/^[\u0002\u001f\u0018]$/u.test(lexeme)) offset += lexeme.length;
  }
  tokens.push(...parser.end());
  return inspect(tokens, source);
}

function stopped(diagnostic: Diagnostic): TokenPass {
  return { tokens: [], diagnostics: [diagnostic], fatal: true };
}

function tooMany(source: SourceText, offset: number): Diagnostic {
  return tell('error', 'file-too-large', 'The file holds too much for a spec', {
    place: placeAt(source, { offset, length: 1 }),
    found: `more than ${String(mostMarks)} words and marks, or ${String(mostTokens)} with blanks and line ends`,
    fix: 'Put long tables into files of their own and name those in the spec.',
  });
}

/** Looks at every token once, without recursion: depth is what it guards against. */
function inspect(tokens: readonly CST.Token[], source: SourceText): TokenPass {
  const found = new Collector();
  const stack = tokens.map((token) => ({ token, depth: 0 })).reverse();
  for (let next = stack.pop(); next !== undefined; next = stack.pop()) {
    const { token, depth } = next;
    if (depth > deepest) return stopped(tooDeep(source, token.offset));
    const diagnostic = judge(token, source);
    if (diagnostic !== undefined) found.add(diagnostic);
    for (const child of childrenOf(token).toReversed()) {
      stack.push({ token: child, depth: isCollection(token) ? depth + 1 : depth });
    }
  }
  return { tokens, diagnostics: found.all, fatal: false };
}

function tooDeep(source: SourceText, offset: number): Diagnostic {
  return tell('error', 'yaml-nesting', 'Sections and lists are nested too deeply', {
    place: placeAt(source, { offset, length: 1 }),
    expected: `at most ${String(deepest)} within each other`,
  });
}

function isCollection(token: CST.Token): token is CST.BlockMap | CST.BlockSequence | CST.FlowCollection {
  return token.type === 'block-map' || token.type === 'block-seq' || token.type === 'flow-collection';
}

function childrenOf(token: CST.Token): readonly CST.Token[] {
  if (token.type === 'document') return [...token.start, ...present(token.value), ...(token.end ?? [])];
  if (!isCollection(token)) return 'end' in token ? (token.end ?? []) : [];
  return token.items.flatMap((item) => [
    ...item.start,
    ...present(item.key),
    ...(item.sep ?? []),
    ...present(item.value),
  ]);
}

function present(token: CST.Token | null | undefined): readonly CST.Token[] {
  return token === null || token === undefined ? [] : [token];
}

function judge(token: CST.Token, source: SourceText): Diagnostic | undefined {
  const error = (code: DiagnosticCode, message: string, details: Details): Diagnostic => {
    const length = 'source' in token ? token.source.length : 1;
    return tell('error', code, message, { place: placeAt(source, { offset: token.offset, length }), ...details });
  };
  switch (token.type) {
    case 'anchor':
    case 'alias':
      return error('yaml-alias', 'Anchors (&) and aliases (*) have no meaning in a spec', {
        found: token.source,
        fix: 'Give a number that is used twice a name under `parameters`; put quotes around a text that begins so.',
      });
    case 'tag':
      return error('yaml-tag', 'A tag (!) has no meaning in a spec', {
        found: token.source,
        fix: 'Leave it out, or put quotes around a text that begins so.',
      });
    case 'directive':
      return error('yaml-directive', 'A directive (%) has no meaning in a spec', {
        found: token.source,
        fix: 'Leave the line out.',
      });
    case 'flow-collection':
      return unclosed(token, source);
    case 'single-quoted-scalar':
    case 'double-quoted-scalar':
      return unclosedQuote(token, source);
    case 'scalar':
      return cutName(token, source);
    default:
      return undefined;
  }
}

/** The library tells of this only where the text ends or the next section begins. */
function unclosed(token: CST.FlowCollection, source: SourceText): Diagnostic | undefined {
  if (token.end.some((mark) => mark.type === 'flow-map-end' || mark.type === 'flow-seq-end')) return undefined;
  const open = token.start.source;
  return tell('error', 'yaml-syntax', `This ${open} is not closed`, {
    place: placeAt(source, { offset: token.offset, length: 1 }),
    expected: `a ${open === '{' ? '}' : ']'} where it ends`,
    fix: 'A blank and # begin a comment, which may hide the end: put quotes around a name with #.',
  });
}

function unclosedQuote(token: CST.FlowScalar, source: SourceText): Diagnostic | undefined {
  const quote = token.source.charAt(0);
  if (token.source.length > 1 && token.source.endsWith(quote)) return undefined;
  return tell('error', 'yaml-syntax', `This ${quote} is not closed`, {
    place: placeAt(source, { offset: token.offset, length: 1 }),
    expected: `another ${quote} where the text ends`,
  });
}

/** `North #2` is read as `North`: a blank and # begin a comment. */
function cutName(token: CST.FlowScalar, source: SourceText): Diagnostic | undefined {
  const comment = token.end?.find((mark) => mark.type === 'comment');
  if (comment === undefined || !/^#[\p{L}\p{N}]{1,4}\s*$/u.test(comment.source)) return undefined;
  if (/^[-.\d]/u.test(token.source)) return undefined;
  return tell('warning', 'comment-in-name', 'What follows # is a comment and not part of the name', {
    place: placeAt(source, { offset: comment.offset, length: comment.source.length }),
    found: token.source,
    fix: `If it belongs to the name, write "${token.source} ${comment.source.trim()}"; if not, put a blank after #.`,
  });
}
