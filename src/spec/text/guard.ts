// What a file must be before anyone tries to read it as YAML: text, of a size that can be read in a second.
import type { Diagnostic } from '../../diagnostic/diagnostic.ts';
import { tell } from '../../diagnostic/tell.ts';
import { mostCharacters } from './limits.ts';
import { placeAt, type SourceText } from './source.ts';

/** Everything but tab, line feed, carriage return before a line feed, and printable characters. */
const strange = /[\u0000-\u0008\u000B\u000C\u000E-\u001F\u007F\uFFFD\uFFFE\uFFFF]|\r(?!\n)|\p{Cs}/u;

export function checkText(source: SourceText): Diagnostic | undefined {
  const start = placeAt({ ...source, text: source.text.slice(0, 200) }, { offset: 0, length: 1 });
  if (source.text.length > mostCharacters) {
    return tell('error', 'file-too-large', 'The file is too large to be a spec', {
      place: start,
      found: `${String(Math.round(source.text.length / 1e6))} million characters`,
      expected: `at most ${String(mostCharacters / 1e6)} million`,
      fix: 'Put long tables into files of their own and name those in the spec.',
    });
  }
  if (source.text.trim() === '') {
    return tell('error', 'file-empty', 'The file is empty', {
      place: start,
      fix: 'Begin with `skein: 1`, or let `skein new` write a small model to start from.',
    });
  }
  return strangeCharacter(source);
}

function strangeCharacter(source: SourceText): Diagnostic | undefined {
  const match = strange.exec(source.text);
  if (match === null) return undefined;
  const code = match[0].codePointAt(0) ?? 0;
  return tell('error', 'file-not-text', 'The file is not plain text in UTF-8', {
    place: placeAt(source, { offset: match.index, length: 1 }),
    found: `the character U+${code.toString(16).toUpperCase().padStart(4, '0')}`,
    fix: code === 13 ? 'Save it with usual line ends.' : 'Save it as plain text in UTF-8.',
  });
}
