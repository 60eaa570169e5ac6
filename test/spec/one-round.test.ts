// Mistakes of shape and wrong names are told in one round, in the order of the file, and no name is called wrong that is only cut out.
import { describe, expect, test } from 'vitest';
import { checkText } from '../mistakes/check-text.ts';

const fine = `skein: 1
study: { title: Hares }
years: 10
patches: [{ name: Fen, capacity: 60 }, { name: Holm, capacity: 20 }]
counts: females
classes: [newborn, adult]
oldest: open-ended
parameters: { litter: 2.4, shelter: { value: 0.7 } }
survival: { newborn: 0.4, adult: shelter }
births: { adult: litter, female-share: 0.5 }
year: [count, breeding, survival, natal, ageing]
natal: { kind: dispersal, classes: [newborn], shares: { Fen: { Holm: 0.1 }, Holm: { Fen: 0.1 } } }
start: { table: { Fen: { adult: 30 } } }
outcomes:
  few: { of: [adult], in: Fen, below: 5 }
`;

function told(...changes: readonly (readonly [string, string])[]): readonly (readonly [number, string])[] {
  const text = changes.reduce((before, [from, to]) => {
    expect(before).toContain(from);
    return before.replace(from, to);
  }, fine);
  return checkText(text, 'hares.yaml')
    .filter((one) => one.severity === 'error')
    .map((one) => [one.place?.line ?? 0, one.code] as const);
}

test('the text itself has no mistake', () => {
  expect(told()).toEqual([]);
});

test('a wrong type and wrong names, in the order of the file', () => {
  const changes = [
    ['years: 10', 'years: many'],
    ['survival: { newborn: 0.4, adult: shelter }', 'survival: { newborn: 0.4, adlt: sheltr, adult: shelter }'],
    ['in: Fen, below: 5', 'in: Fenn, below: five'],
    ['few:', 'many: { of: [yearling], below: 3 }\n  few:'],
  ] as const;
  expect(told(...changes)).toEqual([
    [3, 'wrong-type'],
    [9, 'unknown-class'],
    [15, 'unknown-class'],
    [16, 'unknown-patch'],
    [16, 'wrong-type'],
  ]);
});

describe('what is cut out is not missed', () => {
  test('a parameter whose value has no sense', () => {
    expect(told(['shelter: { value: 0.7 }', 'shelter: { value: [] }'])).toEqual([[8, 'wrong-type']]);
  });

  test('a phase that is not whole', () => {
    expect(told(['kind: dispersal, classes: [newborn]', 'kind: dispersal, classes: 4'])).toEqual([
      [12, 'unknown-word'],
    ]);
  });

  test('a patch without a sense', () => {
    expect(told(['{ name: Holm, capacity: 20 }', '{ name: Holm, at: here }']).map(([, code]) => code)).toEqual([
      'wrong-type',
    ]);
  });

  test('a section that cannot be read at all', () => {
    expect(told(['outcomes:\n', 'outcomes: 4\nin: 3\nsleep:\n']).map(([, code]) => code)).not.toContain(
      'unknown-phase',
    );
  });
});

test('where classes, patches or the year cannot be read, only the shape is told', () => {
  expect(told(['classes: [newborn, adult]', 'classes: 3'], ['adult: shelter', 'adlt: shelter'])).toEqual([
    [6, 'wrong-type'],
  ]);
});
