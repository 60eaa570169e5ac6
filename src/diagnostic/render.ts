// Diagnostics as text for a person: where, what, the line itself, and what to do about it.
import type { Diagnostic, Severity } from './diagnostic.ts';
import { excerptOf } from './excerpt.ts';
import { paintsOf, type Paint, type Paints } from './paint.ts';
import { visible, widthOf } from './visible.ts';

export interface RenderOptions {
  readonly colour: boolean;
  /** Columns of the terminal. */
  readonly width: number;
}

/** All of a list, a blank line between them, and how many there are of each. */
export function renderDiagnostics(list: readonly Diagnostic[], options: RenderOptions): string {
  if (list.length === 0) return '';
  const paint = paintsOf(options.colour);
  const width = Math.max(40, options.width);
  return `${list.map((one) => renderOne(one, paint, width)).join('\n')}\n${countOf(list)}\n`;
}

function renderOne(one: Diagnostic, paint: Paints, width: number): string {
  const lines = [headerOf(one, paint), ...wrap(sentence(one.message), width, '  ')];
  if (one.place !== undefined) {
    const number = String(one.place.line);
    const { line, carets } = excerptOf(one.place, width - number.length - 6);
    const margin = ' '.repeat(number.length);
    lines.push(
      '',
      `  ${paint.dim(`${number} |`)} ${line}`,
      `  ${paint.dim(`${margin} |`)} ${inSeverity(one, paint)(carets)}`,
    );
  }
  const details = detailsOf(one, width);
  if (details.length > 0) lines.push('', ...details);
  return `${lines.map((line) => line.trimEnd()).join('\n')}\n`;
}

function sentence(message: string): string {
  return /[.?!]$/u.test(message) ? message : `${message}.`;
}

function headerOf(one: Diagnostic, paint: Paints): string {
  const where =
    one.place === undefined ? [] : [`${one.place.file}:${String(one.place.line)}:${String(one.place.column)}`];
  return [...where.map(visible), inSeverity(one, paint)(one.severity), paint.dim(one.code)].join(' ');
}

const colours = { error: 'red', warning: 'yellow', note: 'cyan' } as const satisfies Record<Severity, keyof Paints>;

function inSeverity(one: Diagnostic, paint: Paints): Paint {
  return paint[colours[one.severity]];
}

function detailsOf(one: Diagnostic, width: number): readonly string[] {
  const rows: readonly (readonly [string, string | undefined])[] = [
    ['found', one.found],
    ['expected', one.expected],
    ['nearest', one.nearest],
    ['to do', one.fix],
    ['because', one.reason],
  ];
  return rows.flatMap(([label, text]) => {
    if (text === undefined) return [];
    const [first, ...rest] = wrap(text, width, ' '.repeat(12));
    return [`  ${label.padEnd(10)}${(first ?? '').trimStart()}`, ...rest];
  });
}

/** Breaks at blanks; a word longer than the line stays whole. */
function wrap(text: string, width: number, margin: string): readonly string[] {
  const lines: string[] = [];
  let line = margin;
  for (const word of visible(text).split(' ')) {
    const full = widthOf(line) + 1 + widthOf(word) > width && line !== margin;
    if (full) lines.push(line);
    line = full || line === margin ? margin + word : `${line} ${word}`;
  }
  return [...lines, line];
}

function countOf(list: readonly Diagnostic[]): string {
  const count = (severity: Severity): string[] => {
    const number = list.filter((one) => one.severity === severity).length;
    return number === 0 ? [] : [`${String(number)} ${severity}${number === 1 ? '' : 's'}`];
  };
  return [...count('error'), ...count('warning'), ...count('note')].join(', ');
}
