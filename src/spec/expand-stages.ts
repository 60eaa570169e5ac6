// Stages that are followed year by year: each becomes as many classes as it lasts years, wherever its name stands.
import type { SpecPath } from './document.ts';
import type { Finding } from './finding.ts';
import { CoreSchema, namedSchemas, type Spec } from './schema/spec.ts';
import { branchesOf, isSeveral, knownKeys, shapeOfKey, sortOf, type Shape } from './shape/shape.ts';

export interface Expanded {
  readonly spec: Spec;
  readonly findings: readonly Finding[];
}

/** More classes than this would come from a slip. */
const mostYears = 100;

const core: Shape = CoreSchema;
const kinds: Readonly<Record<string, Shape>> = namedSchemas;

/** Classes of single years are called `juvenile 1`, `juvenile 2` and so on; those names may be used in the spec, too. */
export function expandStages(spec: Spec): Expanded {
  const findings: Finding[] = [];
  const names = singleYears(spec, findings);
  if (names.size === 0) return { spec, findings };
  const writer = new Writer(names, findings);
  const { named, ...sections } = spec;
  const whole = {
    ...Object.fromEntries(
      Object.entries(sections).map(([key, value]) => [key, writer.write(value, knownKeys(core)[key], [key])]),
    ),
    classes: classesOf(spec.classes, names),
    duration: Object.fromEntries(Object.entries(spec.duration ?? {}).filter(([name]) => !names.has(name))),
    named: Object.fromEntries(
      Object.entries(named).map(([name, value]) => [name, writer.write(value, kinds[value.kind], [name])]),
    ),
  };
  return isSpec(whole) ? { spec: whole, findings } : { spec, findings };
}

/** The names of the years of each stage that is followed year by year. What is wrong with one is told. */
export function singleYears(spec: Spec, findings: Finding[] = []): Names {
  const stages = Object.entries(spec.duration ?? {}).filter(([, { as }]) => as === 'expanded');
  return new Map(
    stages.flatMap(([name, { years }]): [string, readonly string[]][] => {
      const own = yearsOf(spec, { name, years }, findings);
      return own === null ? [] : [[name, own]];
    }),
  );
}

/** The shapes of the language say where names of classes stand, and nothing else is changed. */
function isSpec(value: object): value is Spec {
  return 'classes' in value && 'named' in value;
}

interface Stage {
  readonly name: string;
  readonly years: number | string;
}

/** Names of the years; null after telling what is wrong. */
function yearsOf(spec: Spec, { name, years }: Stage, findings: Finding[]): readonly string[] | null {
  const path = ['duration', name, 'years'];
  const classes: readonly string[] =
    'females' in spec.classes ? [...spec.classes.females, ...spec.classes.males] : spec.classes;
  if (!classes.includes(name) || staysForEver(spec, name)) return null;
  if (typeof years !== 'number' || !Number.isInteger(years) || years < 1 || years > mostYears) {
    const message = `The stage \`${name}\` is followed year by year, so it lasts a whole number of years`;
    const details = { found: String(years), expected: `a number from 1 to ${mostYears}` };
    findings.push({ severity: 'error', code: 'stage-duration', message, path, details });
    return null;
  }
  if (spec.demography !== undefined) {
    const message = 'A matrix has a row for each class as it is written, so no stage can be followed year by year';
    findings.push({ severity: 'error', code: 'stage-duration', message, path: ['duration', name, 'as'] });
    return null;
  }
  const own = Array.from({ length: years }, (_, i) => `${name} ${i + 1}`);
  const taken = own.find((one) => classes.includes(one));
  if (taken === undefined) return own;
  const message = `\`${taken}\` is a class, and would be a year of the stage \`${name}\``;
  findings.push({ severity: 'error', code: 'stage-duration', message, path: ['duration', name], part: 'key' });
  return null;
}

/** Told as of any other stage when the classes are known. */
function staysForEver({ classes, oldest }: Spec, name: string): boolean {
  const stays = (list: readonly string[], ending: unknown): boolean => list.at(-1) === name && ending === 'open-ended';
  if (!('females' in classes)) return stays(classes, oldest);
  const [females, males] = typeof oldest === 'object' ? [oldest.females, oldest.males] : [oldest, oldest];
  return stays(classes.females, females) || stays(classes.males, males);
}

type Names = ReadonlyMap<string, readonly string[]>;

function inYears(list: readonly string[], names: Names): readonly string[] {
  return list.flatMap((name) => names.get(name) ?? [name]);
}

function classesOf(classes: Spec['classes'], names: Names): unknown {
  if (!('females' in classes)) return inYears(classes, names);
  return { females: inYears(classes.females, names), males: inYears(classes.males, names) };
}

class Writer {
  readonly #names: Names;
  readonly #findings: Finding[];

  constructor(names: Names, findings: Finding[]) {
    this.#names = names;
    this.#findings = findings;
  }

  write(value: unknown, shape: Shape | undefined, path: SpecPath): unknown {
    if (shape === undefined || typeof value !== 'object' || value === null) return this.#intoFirst(value, shape);
    const branch = branchesOf(shape).find((one) => fits(value, one));
    if (Array.isArray(value)) {
      const items: readonly unknown[] = value;
      if (branch?.['x-classes'] === true)
        return items.flatMap((name): readonly unknown[] => this.#years(name) ?? [name]);
      const { items: own } = branch ?? {};
      return items.map((item, i) => this.write(item, isSeveral(own) ? own[i] : own, [...path, i]));
    }
    if (branch === undefined) return value;
    const entries = Object.entries(value).flatMap(([key, inner]): [string, unknown][] => {
      const written = this.write(inner, shapeOfKey(branch, key), [...path, key]);
      const years =
        branch['x-key'] === 'CLASS' && !Object.hasOwn(knownKeys(branch), key) ? this.#years(key) : undefined;
      if (years === undefined) return [[key, written]];
      if (isOneForAll(path)) this.#refuse(key, [...path, key]);
      return years.map((year) => [year, written]);
    });
    return Object.fromEntries(entries);
  }

  /** The young enter a stage in its first year. */
  #intoFirst(value: unknown, shape: Shape | undefined): unknown {
    return shape?.['x-classes'] === true ? (this.#years(value)?.[0] ?? value) : value;
  }

  #years(name: unknown): readonly string[] | undefined {
    return typeof name === 'string' ? this.#names.get(name) : undefined;
  }

  #refuse(name: string, path: SpecPath): void {
    const message = `\`${name}\` is followed year by year, and this is one number for all its years`;
    const fix =
      path[0] === 'variation'
        ? 'Let a named parameter vary and write the rate with it: its years then have the same weather.'
        : `Say it for each year: \`${name} 1: …\`, \`${name} 2: …\`; or take a start that is \`counted\` or a \`total\`.`;
    this.#findings.push({ severity: 'error', code: 'stage-duration', message, path, part: 'key', details: { fix } });
  }
}

/** Numbers of animals, which are not those of each year, and varied rates, which would have weather of their own. */
function isOneForAll([first, second]: SpecPath): boolean {
  return (first === 'start' && second === 'table') || second === 'number' || first === 'variation';
}

function fits(value: object, shape: Shape): boolean {
  if (Array.isArray(value)) return sortOf(shape) === 'list';
  if (sortOf(shape) !== 'map') return false;
  const keys = Object.keys(value);
  return (
    keys.every((key) => shapeOfKey(shape, key) !== undefined) &&
    (shape.required ?? []).every((key) => keys.includes(key))
  );
}
