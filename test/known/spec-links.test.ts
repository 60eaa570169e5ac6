// Links with a rule of their own, and kernels other than the exponential, from a spec to where leavers end (derived by hand).
import { describe, expect, test } from 'vitest';
import { compileText, errorsOf } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';

const patches = `
  - { name: A, at: [0, 0], area: 1 km2 }
  - { name: B, at: [3, 0], area: 1 km2 }
  - { name: C, at: [0, 4], area: 1 km2 }`;

const text = (natal: string) =>
  framed(
    `position: plane
unit: km
classes: [adult]
survival: { adult: 0.9 }
year: [count, survival, natal]
natal:
  kind: dispersal
  classes: [adult]
  leaving: 0.5
  ${natal}
start: { table: { A: { adult: 10 } } }
`,
    { patches },
  );

/** From A: chance of ending in A, B and C, given that the animal left. */
function ends(natal: string): readonly number[] {
  const whole = natal.startsWith('shares') ? text(natal).replace('  leaving: 0.5\n', '') : text(natal);
  const { model, landscape } = compileText(whole);
  const movement = landscape.movements[model.phases.findIndex(({ name }) => name === 'natal')]!;
  const found = [0, 0, 0];
  for (let k = movement.start[0]!; k < movement.start[1]!; k++) found[movement.destinations[k]!] = movement.chance[k]!;
  return found;
}

const near = (found: readonly number[], wanted: readonly number[]) =>
  found.forEach((value, i) => expect(Math.abs(value - wanted[i]!)).toBeLessThan(1e-14));

describe('a link', () => {
  // B and C are 3 and 4 km away; weights e^-3 and e^-4 with a scale of 1 km.
  const [b, c] = [1 / (1 + Math.exp(-1)), 1 / (1 + Math.exp(1))];
  const kernel = 'kernel: { shape: exponential, scale: 1 km }\n  leavers: all arrive';

  test('without any leaves the ways as they are', () => near(ends(kernel), [0, b, c]));

  test('that turns back sends home, and kills of those that cross', () => {
    near(ends(`${kernel}\n  links: [{ between: [A, B], crossing-death: 0.4, turn-back: 0.5 }]`), [0.5 * b, 0.3 * b, c]);
  });

  test('spares those that turn back the dangers of the way', () => {
    const found = ends(`${kernel}\n  survival-on-the-way: 0.8\n  links: [{ between: [B, A], turn-back: 0.5 }]`);
    near(found, [0.5 * b, 0.4 * b, 0.8 * c]);
  });

  test('has a distance of its own, for weight, hazard and reach', () => {
    const longer = ends(`${kernel}\n  hazard: 0.1 per km\n  links: [{ between: [A, B], distance: 5 km }]`);
    near(longer, [0, c * Math.exp(-0.5), b * Math.exp(-0.4)]);
    const beyond = kernel.replace('1 km', '1 km, reach: 4.5 km');
    near(ends(`${beyond}\n  links: [{ between: [A, B], distance: 5 km }]`), [0, 0, 1]);
    near(
      ends(`${kernel.replace('1 km', '1 km, reach: 3.5 km')}\n  links: [{ between: [A, C], distance: 3 km }]`),
      [0, 0.5, 0.5],
    );
  });

  test('works on a table of shares, too', () => {
    const shares = `shares: { A: { B: 0.1, C: 0.3 } }\n  links: [{ between: [A, B], crossing-death: 0.5, turn-back: 0.2 }]`;
    near(ends(shares), [0.05, 0.1, 0.75]);
  });

  test('is refused where it joins a patch with itself, or has a distance beside shares', () => {
    expect(errorsOf(text(`${kernel}\n  links: [{ between: [A, A], turn-back: 0.5 }]`))).toEqual(['dispersal-shape']);
    const shares = 'shares: { A: { B: 0.1 } }\n  links: [{ between: [A, B], distance: 3 km }]';
    expect(errorsOf(text(shares).replace('  leaving: 0.5\n', ''))).toEqual(['dispersal-shape']);
  });
});

describe('leavers that may miss', () => {
  // derived: density of the 2Dt with b = 2.5 and a = 2 km at 3 km, times 1 km².
  test('meet a patch by the density of the kernel at its distance times its area', () => {
    const found = ends('kernel: { shape: 2Dt, scale: 2 km, shape-number: 2.5 }\n  leavers: may miss');
    near(found, [0, (1.5 / (4 * Math.PI)) * 3.25 ** -2.5, (1.5 / (4 * Math.PI)) * 5 ** -2.5]);
  });
});
