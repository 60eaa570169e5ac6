// Text of a user's file made safe and plain to see on a terminal: nothing in it moves the cursor or turns the line around.

/** Controls, line separators, signs that turn the direction of writing, invisible signs and lone surrogates. */
const hidden = /[\p{Cc}\p{Zl}\p{Zp}\p{Cs}\p{Co}\u00AD\u061C\u200B\u200E\u200F\u202A-\u202E\u2060-\u206F\uFEFF]/u;

const wide =
  /[\u1100-\u115F\u2E80-\u303E\u3041-\uA4CF\uAC00-\uD7A3\uF900-\uFAFF\uFE30-\uFE6F\uFF00-\uFF60\uFFE0-\uFFE6\u{1F300}-\u{1FAFF}\u{20000}-\u{3FFFD}]/u;
const none = /[\p{M}\u200C\u200D]/u;

/** One character as it is shown: a tab as an arrow, a hidden one by its number. */
export function visibleCharacter(character: string): string {
  if (character === '\t') return '→';
  if (!hidden.test(character)) return character;
  return `\\u{${(character.codePointAt(0) ?? 0).toString(16)}}`;
}

export function visible(text: string): string {
  let shown = '';
  for (const character of text) shown += visibleCharacter(character);
  return shown;
}

/** Columns that a shown text takes on a terminal. */
export function widthOf(shown: string): number {
  let width = 0;
  for (const character of shown) {
    if (!none.test(character)) width += wide.test(character) ? 2 : 1;
  }
  return width;
}
