// What an editor that knows the published schema says: every model that comes with the tool is fine, and what shape alone can
// refuse is refused.
import { readFileSync, readdirSync } from 'node:fs';
import { expect, test } from 'vitest';
import { parse } from 'yaml';
import { readSpec } from '../../src/spec/read.ts';
import { publishedValidator } from './published-validator.ts';

const validate = publishedValidator();
const models = new URL('../../models/', import.meta.url);
const specimens = new URL('../mistakes/', import.meta.url);

function yamlIn(folder: URL): readonly string[] {
  return readdirSync(folder).filter((file) => file.endsWith('.yaml'));
}

test.each(yamlIn(models))('%s is fine', (file) => {
  const value: unknown = parse(readFileSync(new URL(file, models), 'utf8'));
  expect(validate(value) || validate.errors).toBe(true);
});

/** Mistakes of shape, as the reader tells them. */
const ofShape = new Set(['unknown-key', 'unknown-kind', 'missing-kind', 'missing-key', 'missing-value', 'wrong-type']);
for (const code of ['unknown-word', 'out-of-range', 'wrong-length', 'repeated-item']) ofShape.add(code);

const shaped = yamlIn(specimens).filter((file) => {
  const { diagnostics } = readSpec(readFileSync(new URL(file, specimens), 'utf8'), file);
  return diagnostics.some((one) => one.severity === 'error' && ofShape.has(one.code));
});

test.each(shaped)('%s is refused', (file) => {
  const value: unknown = parse(readFileSync(new URL(file, specimens), 'utf8'), { strict: false });
  expect(validate(value)).toBe(false);
});

test('there are specimens of every mistake of shape', () => {
  expect(shaped.length).toBeGreaterThanOrEqual(ofShape.size);
});
