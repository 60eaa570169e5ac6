// The classes in one list, and of which sex each is where both are followed.
import type { Finding } from '../spec/finding.ts';
import type { Spec } from '../spec/schema/spec.ts';
import type { Context } from './context.ts';
import type { Sex } from './model.ts';

export interface ResolvedClasses {
  readonly classes: readonly string[];
  readonly sexes: readonly Sex[] | null;
}

export function resolveClasses(spec: Spec, findings: Finding[]): ResolvedClasses {
  if (!('females' in spec.classes)) return { classes: spec.classes, sexes: null };
  const { females, males } = spec.classes;
  males.forEach((name, i) => {
    if (!females.includes(name)) return;
    tell(
      findings,
      ['classes', 'males', i],
      `\`${name}\` is a class of both sexes`,
      'a name of its own for every class',
    );
  });
  if (spec.counts !== 'both sexes') {
    tell(
      findings,
      ['counts'],
      'Classes are given for both sexes, but only females are counted',
      '`counts: both sexes`',
    );
  }
  return {
    classes: [...females, ...males],
    sexes: [...females.map((): Sex => 'female'), ...males.map((): Sex => 'male')],
  };
}

function tell(findings: Finding[], path: Finding['path'], message: string, expected: string): void {
  findings.push({ severity: 'error', code: 'sexes-shape', message, path, details: { expected } });
}

/** The last class of each sex, or of all where the sexes are not told apart. */
export function oldestClasses({ classes, sexes }: Pick<Context, 'classes' | 'sexes'>): readonly number[] {
  const last = classes.length - 1;
  return sexes === null ? [last] : [sexes.lastIndexOf('female'), last];
}

/** Whether the oldest of the sex of a class leave the model at ageing; undefined where it is not said. */
export function oldestLeave({ spec, sexes }: Context, c: number): boolean | undefined {
  const { oldest } = spec;
  if (oldest === undefined) return undefined;
  if (typeof oldest !== 'object') return oldest === 'terminal';
  return (sexes?.[c] === 'male' ? oldest.males : oldest.females) === 'terminal';
}
