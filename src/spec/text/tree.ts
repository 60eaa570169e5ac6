// Text to tree: YAML and JSON, which is a part of it.
import { Composer, type Document } from 'yaml';
import { Collector } from '../../diagnostic/collector.ts';
import type { Diagnostic } from '../../diagnostic/diagnostic.ts';
import { tell } from '../../diagnostic/tell.ts';
import { checkText } from './guard.ts';
import { readNode } from './nodes.ts';
import { placeAt, type SourceNode, type SourceText } from './source.ts';
import { syntaxDiagnostics } from './syntax.ts';
import { readTokens } from './tokens.ts';

export interface Tree {
  /** Missing where the text could not be read at all. */
  readonly root?: SourceNode;
  readonly diagnostics: readonly Diagnostic[];
}

export function readTree(source: SourceText): Tree {
  const refused = checkText(source);
  if (refused !== undefined) return { diagnostics: [refused] };
  const pass = readTokens(source);
  if (pass.fatal) return pass;
  // Every word stays text: what it means is decided here, by the same rule for every place.
  const composer = new Composer({ schema: 'failsafe', uniqueKeys: false, prettyErrors: false, logLevel: 'silent' });
  const [document, ...others] = [...composer.compose(pass.tokens, true, source.text.length)];
  const wrong = syntaxDiagnostics(
    [document, ...others].flatMap((one) => one?.errors ?? []),
    source,
  );
  if (wrong.length > 0) return { diagnostics: withoutEchoes([...pass.diagnostics, ...wrong]) };
  const extra = others.slice(0, 1).map((one) => anotherDocument(one, source));
  const found = new Collector();
  found.add(...pass.diagnostics, ...extra);
  const whole = { offset: 0, length: 1 };
  const root = readNode(document?.contents, whole, { source, found });
  return { root, diagnostics: found.all };
}

/** A bracket that is not closed, or a tab, makes nonsense of what follows: only these are told where there are any. */
function withoutEchoes(list: readonly Diagnostic[]): readonly Diagnostic[] {
  const root = list.filter((one) => one.code === 'yaml-tab' || one.message.endsWith('is not closed'));
  return root.length > 0 ? root : list;
}

function anotherDocument(document: Document.Parsed, source: SourceText): Diagnostic {
  return tell('error', 'yaml-documents', 'A second document begins here', {
    place: placeAt(source, { offset: document.range[0], length: 1 }),
    found: '---',
    expected: 'one spec in a file',
  });
}
