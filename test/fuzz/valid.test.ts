// Any spec without a mistake compiles, prints, and reads back to the same spec and the same bytes.
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { renderDiagnostics } from '../../src/diagnostic/render.ts';
import { compileSpec } from '../../src/pipeline.ts';
import { locateFinding } from '../../src/spec/finding.ts';
import { printSpec } from '../../src/spec/print.ts';
import { readSpec } from '../../src/spec/read.ts';
import { runsOf } from './length.ts';
import { anyValidSpec } from './valid-specs.ts';

test('all compile, print and read back', () => {
  let crowded = 0;
  fc.assert(
    fc.property(anyValidSpec, (spec) => {
      const printed = printSpec(spec);
      const { document, diagnostics } = readSpec(printed, 'valid.yaml');
      if (document === undefined) throw new Error(renderDiagnostics(diagnostics, { colour: false, width: 100 }));
      expect(document.spec).toEqual(spec);
      expect(printSpec(document.spec)).toBe(printed);
      const [first, again] = [compileSpec(spec), compileSpec(document.spec)];
      const errors = first.findings.filter((one) => one.severity === 'error');
      expect(
        errors.map((one) => renderDiagnostics([locateFinding(document, one)], { colour: false, width: 100 })),
      ).toEqual([]);
      expect(new Uint8Array(again.compiled?.image ?? new ArrayBuffer(0))).toEqual(
        new Uint8Array(first.compiled?.image ?? new ArrayBuffer(1)),
      );
      if (first.compiled?.model.crowding.length === 1) crowded++;
    }),
    { seed: 4211, numRuns: runsOf(150) },
  );
  expect(crowded).toBeGreaterThan(0);
});
