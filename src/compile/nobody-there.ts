// Takes, moves and releases that can find nobody: of a class that is empty at their place in the year, or in a patch that is not there.
import type { AddPhase, Model, MovePhase, Patch, Phase, TakePhase } from '../model/model.ts';
import type { Finding } from '../spec/finding.ts';
import { classesByPhase } from './present-classes.ts';

type Handling = TakePhase | MovePhase | AddPhase;

export function nobodyThere(model: Model): readonly Finding[] {
  const there = classesByPhase(model);
  return model.phases.flatMap((phase, k) =>
    isHandling(phase) ? [...emptyClasses(model, phase, there[k]), ...missingPatches(model, phase)] : [],
  );
}

function isHandling(phase: Phase): phase is Handling {
  return phase.kind === 'take' || phase.kind === 'move' || phase.kind === 'add';
}

/** Where all classes are meant, some of them may well be empty. */
function emptyClasses({ classes }: Model, phase: Handling, there: Uint8Array | undefined): readonly Finding[] {
  if (phase.kind === 'add' || there === undefined || phase.classes.every((asked) => asked === 1)) return [];
  const empty = classes.filter((_, c) => phase.classes[c] === 1 && there[c] === 0);
  if (empty.length === 0) return [];
  return [
    told(phase, {
      message: `\`${phase.name}\` looks for ${empty.join(' and ')} where there are none`,
      details: {
        reason: 'At its place in the year nobody is of this class: all that were have gone on, and none are born yet.',
        fix: 'Give it another place in the year, or name the class that they are then.',
      },
    }),
  ];
}

function missingPatches(model: Model, phase: Handling): readonly Finding[] {
  const { patches, firstYear, steps } = model;
  const years = Array.from({ length: steps }, (_, t) => firstYear + t).filter(
    (_, t) => phase.active === null || phase.active[t] === 1,
  );
  const gone = (patch: Patch): readonly number[] => years.filter((year) => !isThere(patch, year));
  const own = patches.filter((_, p) => phase.patches[p] === 1);
  // Who is caught where nobody is was not caught; who is set free there is lost.
  const sources = phase.kind === 'add' ? [] : own.filter((patch) => gone(patch).length === years.length);
  const targets = phase.kind === 'add' ? own : phase.kind === 'move' ? [patches[phase.to]].filter(isPatch) : [];
  const nowhere = targets.filter((patch) => gone(patch).length > 0);
  return [...sources, ...nowhere].map((patch) =>
    told(phase, {
      message: `\`${phase.name}\` goes to ${patch.name} when it is not there`,
      details: {
        found: `${yearWords(gone(patch))}; ${patch.name} is there ${existsWords(patch)}`,
        fix: 'Give it other years, or another patch.',
      },
    }),
  );
}

function told(phase: Handling, words: Pick<Finding, 'message' | 'details'>): Finding {
  return { severity: 'warning', code: 'nobody-there', path: [phase.name], part: 'key', ...words };
}

function isThere({ exists }: Patch, year: number): boolean {
  return year >= (exists?.from ?? -Infinity) && year <= (exists?.until ?? Infinity);
}

function isPatch(patch: Patch | undefined): patch is Patch {
  return patch !== undefined;
}

function yearWords(years: readonly number[]): string {
  const [first = NaN] = years;
  const last = years.at(-1) ?? NaN;
  return first === last ? String(first) : `${String(first)} to ${String(last)}`;
}

function existsWords({ exists }: Patch): string {
  const from = exists?.from === undefined ? [] : [`from ${String(exists.from)}`];
  const until = exists?.until === undefined ? [] : [`until ${String(exists.until)}`];
  return [...from, ...until].join(' ');
}
