// Landscapes with exchange in closed form: the whole spectrum of a ring and of alike islands, and sinks that persist by mixing.
import { describe, expect, test } from 'vitest';
import { buildBlock } from '../../src/compile/block.ts';
import { eigenvalues, modulus } from '../../src/numeric/eigenvalues.ts';
import { toDense } from '../../src/numeric/sparse.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';
import { largestDifference, pathOf } from '../pipeline/measure.ts';

interface Exchange {
  readonly patches: number;
  /** Share that leaves a patch, split evenly over where it goes. */
  readonly leaving: number;
  readonly goesTo: (from: number, patches: number) => readonly number[];
}

function shares({ patches, leaving, goesTo }: Exchange): string {
  const rows = Array.from({ length: patches }, (_, from) => {
    const ends = goesTo(from, patches);
    return `P${from}: { ${ends.map((to) => `P${to}: ${leaving / ends.length}`).join(', ')} }`;
  });
  return `{ ${rows.join(', ')} }`;
}

function patchNames(patches: number): string {
  return `[${Array.from({ length: patches }, (_, p) => `{ name: P${p} }`).join(', ')}]`;
}

const neighbours: Exchange['goesTo'] = (p, n) => [(p + 1) % n, (p + n - 1) % n];
const allOthers: Exchange['goesTo'] = (p, n) => Array.from({ length: n }, (_, q) => q).filter((q) => q !== p);

function spectrumOf(growth: number, exchange: Exchange): number[] {
  const text = framed(
    `classes: [animal]
demography: { births: [[${growth}]] }
year: [count, demography, moving]
moving: { kind: dispersal, classes: [animal], shares: ${shares(exchange)} }
start: { table: { P0: { animal: 10 } } }
`,
    { patches: patchNames(exchange.patches) },
  );
  const found = eigenvalues(toDense(buildBlock(compileText(text), 'zero').matrix));
  return found.map(({ re, im }) => (Math.abs(im) < 1e-12 ? re : modulus({ re, im }))).sort((a, b) => b - a);
}

describe('the spectrum of exchange (analytic)', () => {
  test('a ring of six with growth 1.1, 0.3 leaving: R (1 − m + m cos(2πk/6))', () => {
    const found = spectrumOf(1.1, { patches: 6, leaving: 0.3, goesTo: neighbours });
    expect(largestDifference(found, [1.1, 0.935, 0.935, 0.605, 0.605, 0.44])).toBeLessThan(1e-12);
  });

  test('five islands, 0.2 leaving for all others alike: 1, and four times 1 − m p/(p − 1)', () => {
    const found = spectrumOf(1, { patches: 5, leaving: 0.2, goesTo: allOthers });
    expect(largestDifference(found, [1, 0.75, 0.75, 0.75, 0.75])).toBeLessThan(1e-12);
  });
});

/**
 * Growth a year over all combinations of good (1.7) and bad (0.5) years of n patches that mix wholly, each combination once: the
 * growth of a long time in which patches have their years independently, since the mean of the logarithms is the same.
 */
function growthOverAllYears(patches: number, alike: boolean): number {
  const years = alike ? 2 : 2 ** patches;
  const good = (year: number, p: number): boolean => ((year >> (alike ? 0 : p)) & 1) === 1;
  const yearsOf = (p: number) => Array.from({ length: years }, (_, t) => `${t + 1}: ${good(t, p) ? 1.7 : 0.5}`);
  const drivers = Array.from({ length: patches }, (_, p) => `g${p}: { ${yearsOf(p).join(', ')} }`);
  const rates = Array.from({ length: patches }, (_, p) => `P${p}: { demography: { births: [[g${p}]] } }`);
  const leaving = (patches - 1) / patches;
  const path = pathOf(
    compileText(
      framed(
        `classes: [animal]
drivers: { values: { ${drivers.join(', ')} }, future: as-dated }
demography: { births: [[g0]] }
in: { ${rates.join(', ')} }
year: [count, demography, moving]
moving: { kind: dispersal, classes: [animal], shares: ${shares({ patches, leaving, goesTo: allOthers })} }
start: { table: { ${Array.from({ length: patches }, (_, p) => `P${p}: { animal: 1000 }`).join(', ')} } }
`,
        { patches: patchNames(patches), years },
      ),
    ),
  );
  const sum = (counts: readonly number[]) => counts.reduce((a, b) => a + b, 0);
  return (sum(path.at(-1)!) / sum(path[0]!)) ** (1 / years);
}

// Each patch alone declines by the geometric mean √(1.7 × 0.5) (derived; the idea from memory of Jansen & Yoshimura 1998).
describe('sinks that mix wholly', () => {
  test.each([
    [2, true, 0.9219544],
    [2, false, 1.0070501],
    [4, false, 1.055396],
  ])('%i of them, years alike: %s', (patches, alike, wanted) => {
    expect(Math.abs(growthOverAllYears(patches, alike) - wanted)).toBeLessThan(1e-7);
  });
});
