// Several survival and breeding phases in a year, each under its own name, and what is different in single patches.
import { describe, expect, test } from 'vitest';
import { compileText, errorsOf } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';
import { blockRows, largestDifference } from '../pipeline/measure.ts';

const seasons = framed(
  `classes: [young, adult]
oldest: open-ended
summer: { kind: survival, survival: { young: 0.5, adult: 0.9 } }
winter: { kind: survival, survival: { young: 0.6, adult: 0.8 } }
births: { adult: 2, female-share: 0.5 }
late brood: { kind: breeding, births: { adult: 0.4 } }
in:
  Hill: { winter: { young: 0.2 }, late brood: { adult: 0 } }
year: [count, breeding, summer, late brood, winter, ageing]
start: { table: { Hill: { adult: 10 }, Vale: { adult: 10 } } }
`,
  { patches: '[{ name: Hill }, { name: Vale }]' },
);

describe('a year of two seasons', () => {
  // derived by hand, counted before breeding. Vale: young 1 × 0.5 + 0.9 × 0.4 = 0.86, of which 0.6 reach the count as adults;
  // adults 0.9 × 0.8. Hill: young 0.5 × 0.2.
  test('multiplies the survivals, and lets the late brood be born to those that lived through summer', () => {
    const rows = blockRows(compileText(seasons));
    expect(largestDifference(rows.flat(), [0.5 * 0.2 + 0.72, 0, 0, 0.86 * 0.6 + 0.72])).toBeLessThan(1e-15);
  });

  test('refuses what no phase is called, and a class without a rate', () => {
    expect(errorsOf(seasons.replace('{ winter: { young', '{ wintr: { young'))).toEqual(['unknown-phase']);
    expect(errorsOf(seasons.replace('young: 0.6, ', ''))).toEqual(['missing-rate']);
    expect(errorsOf(seasons.replace('{ winter: { young', '{ winter: { yung'))).toEqual(['unknown-class']);
  });

  test('lets crowding change a phase by its name', () => {
    const crowded = seasons.replace(
      'start:',
      'crowding: { form: ricker, changes: { winter: [young], late brood: [adult] }, counted: [adult], capacity: 20, where-declining: none }\nstart:',
    );
    expect(compileText(crowded).model.crowding[0]?.changes.map(({ phase, part }) => [phase, part])).toEqual([
      [3, 'survival'],
      [2, 'births'],
    ]);
    expect(errorsOf(crowded.replace('winter: [young]', 'survival: [young]'))).toEqual(['unknown-rate']);
  });
});

describe('a dispersal', () => {
  test('has another leaving share where a patch says so', () => {
    const text = framed(
      `position: plane
unit: km
classes: [adult]
survival: { adult: 0.9 }
in: { Hill: { roaming: { adult: 0.5 } } }
year: [count, survival, roaming]
roaming: { kind: dispersal, classes: [adult], leaving: 0.1, kernel: { shape: gaussian, mean: 2 km }, leavers: all arrive }
start: { table: { Hill: { adult: 10 } } }
`,
      { patches: '[{ name: Hill, at: [0, 0] }, { name: Vale, at: [0, 1] }]' },
    );
    const rows = blockRows(compileText(text)).flat();
    expect(largestDifference(rows, [0.45, 0.09, 0.45, 0.81])).toBeLessThan(1e-15);
  });
});
