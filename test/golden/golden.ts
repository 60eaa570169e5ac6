// Texts that were looked at and accepted. UPDATE_GOLDEN=1 accepts what there is now; then read the difference and commit it.
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { expect } from 'vitest';

export const accepting = process.env['UPDATE_GOLDEN'] === '1';

/** Fails where the text is another one, or where none was accepted yet. */
export function expectGolden(file: URL, text: string): void {
  if (accepting) {
    mkdirSync(dirname(file.pathname), { recursive: true });
    if (!existsSync(file) || readFileSync(file, 'utf8') !== text) writeFileSync(file, text);
  }
  const accepted = existsSync(file) ? readFileSync(file, 'utf8') : null;
  expect(text, `${file.pathname}; UPDATE_GOLDEN=1 accepts the new text`).toBe(accepted);
}
