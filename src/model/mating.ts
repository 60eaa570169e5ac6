// Mating: where both sexes are followed, which of them must meet for births, and by which function.
import type { SpecPath } from '../spec/document.ts';
import type { BreedingSpec } from '../spec/schema/spec.ts';
import type { BirthSections } from './birth-sections.ts';
import { classMask, fail, type Context } from './context.ts';
import type { Mating, RateTable, Sex } from './model.ts';

type MatingSpec = NonNullable<BreedingSpec['mating']>;

/** Null where the sexes are not told apart, and after telling what is missing. */
export function resolveMating(context: Context, sections: BirthSections, births: RateTable): Mating | null {
  const { mating, birthsPath } = sections;
  const path = [...sections.path, 'mating'];
  if (context.sexes === null) {
    if (mating !== undefined) {
      fail(context, 'sexes-shape', path, {
        message: 'Mating needs classes of both sexes',
        part: 'key',
        details: { expected: '`classes: { females: […], males: […] }` and `counts: both sexes`' },
      });
    }
    return null;
  }
  const breeding = bearing(context, births);
  refuseMales(context, breeding, birthsPath);
  if (mating === undefined) {
    fail(context, 'sexes-shape', birthsPath, {
      message: 'It is not said how births depend on the numbers of females and males',
      part: 'key',
      details: {
        expected:
          'such as `mating: { form: minimum, males: [bull], females-per-male: 4 }`, or `mating: { form: female-dominant }`',
      },
    });
    return null;
  }
  const females = mating.females === undefined ? breeding : classMask(context, mating.females, [...path, 'females']);
  const males = malesOf(context, mating, path);
  refuseOther(context, { mask: females, sex: 'female', path: [...path, 'females'] });
  refuseOther(context, { mask: males, sex: 'male', path: [...path, 'males'] });
  return { form: mating.form, females, males, femalesPerMale: perMale(context, mating, path) };
}

/** Classes that have births in some patch and year. */
function bearing({ classes }: Context, births: RateTable): Uint8Array {
  const mask = new Uint8Array(classes.length);
  for (const epoch of births.epochs) epoch.forEach((young, i) => young > 0 && (mask[i % classes.length] = 1));
  return mask;
}

function refuseMales(context: Context, breeding: Uint8Array, path: SpecPath): void {
  const c = context.classes.findIndex((_, i) => breeding[i] === 1 && context.sexes?.[i] === 'male');
  if (c < 0) return;
  fail(context, 'sexes-shape', path, {
    message: `\`${context.classes[c]}\` is a class of males and has births`,
    part: 'key',
    details: { fix: 'Give births to classes of females; `mating` says which males they need.' },
  });
}

function malesOf(context: Context, mating: MatingSpec, path: SpecPath): Uint8Array {
  if (mating.males !== undefined) return classMask(context, mating.males, [...path, 'males']);
  if (mating.form !== 'female-dominant') {
    fail(context, 'sexes-shape', path, {
      message: `The form \`${mating.form}\` needs \`males\``,
      part: 'key',
      details: { expected: 'the classes of males that mate, such as `males: [bull]`' },
    });
  }
  return new Uint8Array(context.classes.length);
}

interface Chosen {
  readonly mask: Uint8Array;
  readonly sex: Sex;
  readonly path: SpecPath;
}

function refuseOther(context: Context, { mask, sex, path }: Chosen): void {
  const c = context.classes.findIndex((_, i) => mask[i] === 1 && context.sexes?.[i] !== sex);
  if (c < 0) return;
  const message = `\`${context.classes[c]}\` is no class of ${sex}s`;
  fail(context, 'sexes-shape', path, { message, details: { expected: `classes of ${sex}s` } });
}

function perMale(context: Context, mating: MatingSpec, path: SpecPath): number {
  const at = [...path, 'females-per-male'];
  const value = context.numbers.value(mating['females-per-male'] ?? 1, at, { year: context.time.firstYear });
  if (value > 0 || Number.isNaN(value)) return value;
  fail(context, 'out-of-range', at, {
    message: `One male serves ${value} females`,
    details: { expected: 'a number above zero' },
  });
  return NaN;
}
