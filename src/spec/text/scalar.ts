// What a word of YAML means here: numbers, true, false, nothing; everything else is text.
import type { Plain } from './source.ts';

const decimal = /^-?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/u;

/** Only decimal numbers are numbers: `+80`, `1_000`, `0x1F` and `.inf` stay text, and are told where a number is needed. */
export function plainValue(source: string): Plain {
  if (source === '' || source === '~' || /^null$/iu.test(source)) return null;
  if (/^true$/iu.test(source)) return true;
  if (/^false$/iu.test(source)) return false;
  return decimal.test(source) ? Number(source) : source;
}

/** Words that some YAML readers take for true, false or nothing, and digits that they may read to another base. */
export function isAmbiguousWord(source: string): boolean {
  return /^(?:y|n|yes|no|on|off|true|false|null|~)$/iu.test(source);
}
