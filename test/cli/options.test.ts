// Settings of one call laid over the model: parameters, years, replicates, seed.
import { describe, expect, test } from 'vitest';
import { hare, skein } from './skein.ts';

interface Run {
  readonly hash: string;
  readonly seed: number;
  readonly replicates: number;
  readonly years: number;
  readonly abundance: { readonly whole: readonly { readonly mean: number }[] };
}

const few = ['--replicates', '32', '--years', '15'];

function runOf(...words: readonly string[]): Run {
  const { code, out, err } = skein(['run', hare, '--json', ...words]);
  expect({ code, err }).toEqual({ code: 0, err: '' });
  const run: Run = JSON.parse(out);
  return run;
}

function growthOf(...words: readonly string[]): number {
  const { code, out } = skein(['show', hare, 'matrix', '--json', ...words]);
  expect(code).toBe(0);
  return JSON.parse(out).growthRate;
}

describe('--replicates, --years, --seed', () => {
  test('are what the run has', () => {
    const run = runOf(...few, '--seed', '7');
    expect(run).toMatchObject({ replicates: 32, years: 15, seed: 7 });
    expect(run.abundance.whole).toHaveLength(16);
  });

  test('the same call gives the same bytes, another seed others', () => {
    const [first, again, other] = ['7', '7', '8'].map((seed) => skein(['run', hare, '--json', ...few, '--seed', seed]));
    expect(again).toEqual(first);
    expect(other?.out).not.toBe(first?.out);
  });

  test('fewer years are the beginning of more', () => {
    const [short, long] = [runOf(...few), runOf('--replicates', '32', '--years', '25')];
    expect(long.abundance.whole.slice(0, 16)).toEqual(short.abundance.whole);
    expect(long.hash).not.toBe(short.hash);
  });
});

describe('--set', () => {
  test('gives a parameter another number', () => {
    expect(growthOf('--set', 'adult_survival=0.7')).toBeGreaterThan(growthOf() + 0.01);
  });

  test('its own number changes nothing', () => {
    const { value } = JSON.parse(skein(['show', hare, 'spec', '--json']).out).parameters.adult_survival;
    expect(runOf(...few, '--set', `adult_survival=${value}`)).toEqual(runOf(...few));
  });

  test('is repeatable, takes expressions, and the last of one name counts', () => {
    const both = growthOf('--set', 'adult_survival=0.5', '--set', 'litter = 3');
    expect(growthOf('--set', 'litter=1.5 * 2', '--set', 'adult_survival=0.9', '--set', 'adult_survival=0.5')).toBe(
      both,
    );
    expect(both).not.toBe(growthOf());
  });

  test('a number that cannot be is a mistake of the model, told with its reason', () => {
    const { code, out, err } = skein(['run', hare, '--set', 'adult_survival=1.7']);
    expect({ code, out }).toEqual({ code: 1, out: '' });
    expect(err).toContain('The survival of adult');
    expect(err).toContain('a share between 0 and 1');
  });
});
