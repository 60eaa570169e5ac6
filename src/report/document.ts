// The page around the sections: one file, nothing from outside. Its policy lets run only the one script whose hash it names.
import { createHash } from 'node:crypto';
import { mark, Markup, type Content } from '../view/markup.ts';

export interface Document {
  readonly title: string;
  readonly style: string;
  /** Null where nothing in the page moves. */
  readonly program: Program | null;
  /**
   * What stands in the page, given data and script, which it puts behind what readers first act on: they need not wait for
   * the rest of a long page.
   */
  readonly body: (program: Markup) => Content;
}

export interface Program {
  readonly script: string;
  /** Goes into the page as JSON for the script. */
  readonly data: unknown;
}

export function writeDocument({ title, style, program, body }: Document): string {
  const code = program?.script.replaceAll('</script', '<\\/script').replaceAll('<!--', '<\\!--');
  const policy = [
    "default-src 'none'",
    ...(code === undefined ? [] : [`script-src '${hash(code)}'`]),
    `style-src '${hash(style)}'`,
    'img-src data: blob:',
    "base-uri 'none'",
    "form-action 'none'",
  ].join('; ');
  const page = mark`<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${new Markup(policy)}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="referrer" content="no-referrer">
<title>${title}</title>
<style>${new Markup(style)}</style>
</head>
<body>
<a class="skip" href="#answer">Go to the answer</a>
<main>${body(code === undefined ? new Markup('') : scripts(code, program?.data))}</main>
</body>
</html>
`;
  return page.text;
}

function scripts(code: string, data: unknown): Markup {
  return mark`
<script type="application/json" id="view">${new Markup(inScript(data))}</script>
<script>${new Markup(code)}</script>
`;
}

/** JSON that no text inside can end or open a tag from. */
export function inScript(data: unknown): string {
  return JSON.stringify(data).replace(
    /[<>&\u2028\u2029]/g,
    (one) => `\\u${one.charCodeAt(0).toString(16).padStart(4, '0')}`,
  );
}

function hash(text: string): string {
  return `sha256-${createHash('sha256').update(text, 'utf8').digest('base64')}`;
}
