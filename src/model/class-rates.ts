// Rates by class of one phase: those of every patch, and under `in` those that are different in one.
import type { SpecPath } from '../spec/document.ts';
import { classIndex, fail, patchIndex, tellUnknown, type Context } from './context.ts';
import type { Written } from './rates.ts';

type ClassNumbers = Readonly<Record<string, unknown>>;

export interface RateSection {
  /** Class names to numbers or expressions, and perhaps settings. */
  readonly everywhere: ClassNumbers;
  readonly path: SpecPath;
  /** The key under `in` and a patch that holds what is different there. */
  readonly key: string;
  /** What one of the numbers is, such as `survival`. */
  readonly what: string;
  /** Keys of `everywhere` that are no classes. */
  readonly settings: ReadonlySet<string>;
}

/** A patch's own number where it has one, else the number of every patch. */
export function writtenRate(
  context: Context,
  section: RateSection,
  [patch, c]: readonly [number, number],
): Written | null {
  const name = context.classes[c] ?? '';
  const what = `${section.what} of ${name}`;
  const patchName = context.patches[patch]?.name ?? '';
  const own = numbersIn(context, patchName, section.key)?.[name];
  if (isExpression(own)) return { expression: own, path: ['in', patchName, section.key, name], what };
  const general = section.everywhere[name];
  return isExpression(general) ? { expression: general, path: [...section.path, name], what } : null;
}

/** Every key of a section, in every patch, must be a class. */
export function checkClassKeys(context: Context, section: RateSection): void {
  for (const name of Object.keys(section.everywhere)) {
    if (!section.settings.has(name)) classIndex(context, name, [...section.path, name]);
  }
  checkOwnKeys(context, section.key);
}

/** The same for what is different in single patches. */
export function checkOwnKeys(context: Context, key: string): void {
  for (const patch of Object.keys(context.spec.in ?? {})) {
    const own = numbersIn(context, patch, key);
    if (own === undefined || patchIndex(context, patch, ['in', patch]) < 0) continue;
    for (const name of Object.keys(own)) classIndex(context, name, ['in', patch, key, name]);
  }
}

/** Classes without a number in a section that must have one for each, everywhere or in every patch of its own. */
export function requireEveryClass(context: Context, { everywhere, path, key, what }: RateSection): void {
  for (const name of context.classes) {
    if (everywhere[name] !== undefined) continue;
    const own = ({ name: patch }: { readonly name: string }): boolean =>
      isExpression(numbersIn(context, patch, key)?.[name]);
    const without = context.patches.filter((patch) => !own(patch));
    const [first] = without;
    if (first === undefined) continue;
    const where = without.length < context.patches.length ? ` in ${first.name}` : '';
    fail(context, 'missing-rate', path, {
      message: `The class \`${name}\` has no ${what}${where}`,
      part: 'key',
      details: { expected: 'a share for every class', fix: `Add \`${name}: …\` (0 where none survive).` },
    });
  }
}

/** Whether some patch has rates of its own under a key. */
export function ownRatesAnywhere(context: Context, key: string): boolean {
  return context.patches.some(({ name }) => numbersIn(context, name, key) !== undefined);
}

/** What stands under `in` and a patch for a phase. */
export function numbersIn(context: Context, patch: string, key: string): ClassNumbers | undefined {
  const own = Object.entries(context.spec.in?.[patch] ?? {}).find(([name]) => name === key)?.[1];
  return own === undefined || Array.isArray(own) ? undefined : own;
}

/** Keys under `in` that are neither of the language nor phases with rates by class. */
export function refuseUnknownOwnKeys(context: Context): void {
  const { named } = context.spec;
  const withRates = Object.keys(named).filter((name) => hasRates(named[name]?.kind));
  const known = ['survival', 'births', 'demography', ...withRates];
  for (const [patch, own] of Object.entries(context.spec.in ?? {})) {
    for (const name of Object.keys(own)) {
      if (known.includes(name)) continue;
      const path = ['in', patch, name];
      tellUnknown(context, {
        code: 'unknown-phase',
        what: 'phase with rates by class called',
        name,
        known,
        path,
        part: 'key',
      });
    }
  }
}

function hasRates(kind: string | undefined): boolean {
  return kind === 'survival' || kind === 'breeding' || kind === 'dispersal';
}

function isExpression(value: unknown): value is number | string {
  return typeof value === 'number' || typeof value === 'string';
}
