// Text that becomes part of a page. Every string that is put into `mark` is escaped, for HTML and SVG alike, between tags
// and in quoted attributes; only what `mark` itself made goes in as it is.

export class Markup {
  readonly text: string;
  constructor(text: string) {
    this.text = text;
  }
}

export type Content = string | number | Markup | null | readonly Content[];

/** Numbers are coordinates: they are written with two decimals at most. Format those meant for readers beforehand. */
export function mark(parts: TemplateStringsArray, ...contents: readonly Content[]): Markup {
  let text = parts[0] ?? '';
  contents.forEach((content, i) => {
    text += write(content) + (parts[i + 1] ?? '');
  });
  return new Markup(text);
}

/** Characters that mean something to a parser, and those that no XML may hold. */
export function escape(text: string): string {
  return text.replace(unsafe, (character) => entities[character] ?? '\uFFFD');
}

const unsafe = /[&<>"'`\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f-\u009f\ufffe\uffff]|\p{Cs}/gu;
const entities: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
  '`': '&#96;',
};

function write(content: Content): string {
  if (content === null) return '';
  if (content instanceof Markup) return content.text;
  if (typeof content === 'string') return escape(content);
  if (typeof content === 'number') return String(Math.round(content * 100) / 100);
  return content.map(write).join('');
}
