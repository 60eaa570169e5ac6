// Stages that last longer than a year, from their text to the matrix.
import { describe, expect, test } from 'vitest';
import { buildBlock } from '../../src/compile/block.ts';
import { leading } from '../../src/numeric/leading.ts';
import { toDense } from '../../src/numeric/sparse.ts';
import type { CompiledModel } from '../../src/pipeline.ts';
import { compileText } from '../pipeline/compile-text.ts';

interface Life {
  readonly survival: number;
  readonly duration: string;
  /** Young that live to the count. */
  readonly births: number;
}

/** A stage, and adults that breed with a survival of a half. */
function text({ survival, duration, births }: Life): string {
  return `
skein: 1
study: { title: A stage (invented) }
years: 3
patches: [{ name: Scrub }]
counts: females
classes: [juvenile, adult]
oldest: open-ended
duration: { juvenile: ${duration} }
survival: { juvenile: ${String(survival)}, adult: 0.5 }
births: { adult: ${String(births)} }
year: [count, survival, breeding, ageing]
start: { total: 80 }
`;
}

function matrixOf(compiled: CompiledModel): Float64Array {
  return toDense(buildBlock(compiled, 'zero').matrix).values;
}

function growthOf(compiled: CompiledModel): number {
  return leading(buildBlock(compiled, 'zero').matrix).growthRate;
}

/** Births at which the growth is as wanted, by halving: growth rises with births. */
function birthsFor(growth: number, life: Omit<Life, 'births'>): number {
  let [low, high] = [0, 1000];
  for (let i = 0; i < 80; i++) {
    const middle = (low + high) / 2;
    if (growthOf(compileText(text({ ...life, births: middle }))) < growth) low = middle;
    else high = middle;
  }
  return high;
}

describe('a stage of five years with a survival of 0.8', () => {
  test('geometric: 0.64 stay and 0.16 go on (derived)', () => {
    const matrix = matrixOf(compileText(text({ survival: 0.8, duration: '{ years: 5, as: geometric }', births: 3 })));
    expect(matrix[0]).toBeCloseTo(0.64, 12);
    expect(matrix[2]).toBeCloseTo(0.16, 12);
  });

  test.each([
    [1, 0.7025226, 0.0974774],
    [0.95, 0.6898187, 0.1101813],
  ])('fixed, where numbers grow by %s a year: %s stay, %s go on (derived)', (growth, stay, on) => {
    const life = { survival: 0.8, duration: '{ years: 5, as: fixed }' };
    const births = birthsFor(growth, life);
    const compiled = compileText(text({ ...life, births }));
    expect(growthOf(compiled)).toBeCloseTo(growth, 9);
    const matrix = matrixOf(compiled);
    expect(matrix[0]).toBeCloseTo(stay, 6);
    expect(matrix[2]).toBeCloseTo(on, 6);
  });

  // The stable make-up of ages is that of the classes year by year, so growth is theirs to the last digits.
  test.each([0.4, 3, 40])('fixed, with %s births: grows as the five years one by one', (births) => {
    const stage = growthOf(compileText(text({ survival: 0.8, duration: '{ years: 5, as: fixed }', births })));
    const years = compileText(`
skein: 1
study: { title: The same year by year (invented) }
years: 3
patches: [{ name: Scrub }]
counts: females
classes: [a, b, c, d, e, adult]
oldest: open-ended
survival: { a: 0.8, b: 0.8, c: 0.8, d: 0.8, e: 0.8, adult: 0.5 }
births: { adult: ${String(births)} }
year: [count, survival, breeding, ageing]
start: { total: 80 }
`);
    // Young are born into the first year and age at once: the stage lasts five ageings for them, too.
    expect(stage).toBeCloseTo(growthOf(years), 10);
  });
});

test('loggerhead turtles: five stages with durations (Crouse, Crowder & Caswell 1987; inputs from memory)', () => {
  const compiled = compileText(`
skein: 1
study: { title: Published stages of loggerheads }
years: 3
patches: [{ name: Beach }]
counts: females
classes: [hatchling, small juvenile, large juvenile, subadult, novice, remigrant, adult]
oldest: open-ended
duration:
  small juvenile: { years: 7, as: fixed }
  large juvenile: { years: 8, as: fixed }
  subadult: { years: 6, as: fixed }
survival: { hatchling: 0.6747, small juvenile: 0.7857, large juvenile: 0.6758, subadult: 0.7425, novice: 0.8091, remigrant: 0.8091, adult: 0.8091 }
births: { novice: 127, remigrant: 4, adult: 80 }
year: [count, breeding, survival, ageing]
start: { total: 800 }
`);
  const growth = growthOf(compiled);
  // Published 0.945 with shares for a population that stands still; those of its own decline lie close by.
  expect(Math.abs(growth - 0.945)).toBeLessThan(0.03);
});
