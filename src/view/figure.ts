// The frame of every figure: an SVG that stands alone (no style sheet, no script) and says in words what it shows.
import type { Size } from './contract.ts';
import { mark, Markup, type Content } from './markup.ts';
import { paper, sans } from './palette.ts';

export interface FigureWords {
  /** Short name, read first. */
  readonly title: string;
  /** What is to be seen, in a sentence or two. */
  readonly description: string;
}

export interface FigureKind {
  /** Its parts are read one by one, not as one picture. */
  readonly live?: boolean;
  /** One of hundreds: its label alone says what it shows. */
  readonly brief?: boolean;
  /** Where the first and the last year stand, in pixels. */
  readonly years?: readonly [number, number];
}

export function figure(size: Size, words: FigureWords, content: Content, kind: FigureKind = {}): Markup {
  const label = `${words.title}. ${words.description}`;
  const years = kind.years === undefined ? null : mark` data-left="${kind.years[0]}" data-right="${kind.years[1]}"`;
  const box = mark`viewBox="0 0 ${size.width} ${size.height}" width="${size.width}" height="${size.height}"`;
  const role = mark`role="${kind.live === true ? 'group' : 'img'}" aria-label="${label}"`;
  const said = kind.brief === true ? null : mark`<title>${words.title}</title><desc>${words.description}</desc>`;
  return mark`<svg xmlns="http://www.w3.org/2000/svg" ${box} ${role}${years} font-family="${family}" font-size="13">
${said}<rect width="${size.width}" height="${size.height}" fill="${paper}"/>${content}</svg>`;
}

/** Its quotes are single ones, and stand in double ones. */
const family = new Markup(sans);

/** About how wide a text of this size stands, without a browser to ask. */
export function textWidth(text: string, fontSize: number): number {
  let width = 0;
  for (const character of text) width += narrow.test(character) ? 0.32 : character > '\u2e80' ? 1 : 0.57;
  return width * fontSize;
}

const narrow = /[ iljtfrI.,:;'|()[\]!1]/;

/** A text that fits, cut with an ellipsis where it must be. */
export function fitText(text: string, fontSize: number, width: number): string {
  if (textWidth(text, fontSize) <= width) return text;
  const characters = [...text];
  while (characters.length > 1 && textWidth(`${characters.join('')}…`, fontSize) > width) characters.pop();
  return `${characters.join('').trimEnd()}…`;
}
