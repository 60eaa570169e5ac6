// A patch that declines alone has no number at which it stands still: the spec must say what crowding does there.
import { describe, expect, test } from 'vitest';
import { buildBlock } from '../../src/compile/block.ts';
import { runYear } from '../../src/compile/year-map.ts';
import { compileText, tryText } from './compile-text.ts';
import { framed } from './frame.ts';
import { rowsOf } from './measure.ts';

/** Every animal of Source has 1.5 young and dies; of Sink 0.8. */
function declining(rule: string): string {
  return framed(
    `classes: [animal]
demography: { births: [[1.5]] }
in: { Sink: { demography: { births: [[0.8]] } } }
year: [count, demography]
crowding: { form: beverton-holt, changes: { births: all }, counted: all, capacity: capacity${rule} }
start: { table: { Source: { animal: 40 }, Sink: { animal: 90 } } }
`,
    { patches: '[{ name: Sink, capacity: 30 }, { name: Source, capacity: 40 }]' },
  );
}

/** Animals in Sink a year after there were so many. */
function nextInSink(text: string, animals: number): number {
  return runYear(compileText(text), Float64Array.of(animals, 0)).after[0]!;
}

test('unsaid, it is an error that names the patch and gives the choices', () => {
  const { compiled, diagnostics } = tryText(declining(''));
  expect(compiled).toBeNull();
  expect(diagnostics.map((one) => one.code)).toEqual(['declining-patch']);
  expect(diagnostics[0]?.message).toContain('Sink declines alone (growth 0.8000 a year)');
  expect(diagnostics[0]?.expected).toContain('`where-declining: none`');
});

describe('said', () => {
  test('none: no crowding there, however many there are', () => {
    const text = declining(', where-declining: none');
    for (const animals of [3, 30, 900]) expect(nextInSink(text, animals)).toBeCloseTo(0.8 * animals, 12);
    expect(compileText(text).coefficients[0]?.form).toEqual(['none', 'beverton-holt']);
  });

  test('ceiling: as many as there is room for have young', () => {
    const text = declining(', where-declining: ceiling');
    expect(nextInSink(text, 20)).toBeCloseTo(16, 12);
    expect(nextInSink(text, 30)).toBeCloseTo(24, 12);
    for (const animals of [60, 900]) expect(nextInSink(text, animals)).toBeCloseTo(24, 12);
  });

  test('as in another patch: its multiplier at the own capacity', () => {
    const text = declining(', where-declining: { as: Source }');
    // Source stands still at g = 1 / 1.5; Sink has that g at 30 animals: a = 0.5 / 30 (derived).
    for (const animals of [3, 30, 900]) {
      expect(nextInSink(text, animals)).toBeCloseTo((0.8 * animals) / (1 + (0.5 / 30) * animals), 10);
    }
  });

  test('as in a patch that declines itself is an error', () => {
    const { diagnostics } = tryText(declining(', where-declining: { as: Sink }'));
    expect(diagnostics.map((one) => one.code)).toEqual(['declining-patch']);
  });

  test('no rule changes anything in the patch that grows, or near zero', () => {
    for (const rule of ['none', 'ceiling', '{ as: Source }']) {
      const compiled = compileText(declining(`, where-declining: ${rule}`));
      expect(runYear(compiled, Float64Array.of(0, 40)).after[1]).toBeCloseTo(40, 12);
      expect(rowsOf(buildBlock(compiled, 'zero').matrix)).toEqual([
        [0.8, 0],
        [0, 1.5],
      ]);
    }
  });
});
