// Code blocks of the README, so that what is printed there is what runs.
import { readFileSync } from 'node:fs';

const text = readFileSync(new URL('../../README.md', import.meta.url), 'utf8');

/** The block of this language in which a word stands. */
export function codeBlock(language: string, word: string): string {
  const blocks = [...text.matchAll(new RegExp(`^\`\`\`${language}\\n(.*?)^\`\`\`$`, 'gms'))].map(
    (match) => match[1] ?? '',
  );
  const found = blocks.find((block) => block.includes(word));
  if (found === undefined) throw new Error(`The README has no block in ${language} with ${word}.`);
  return found;
}
