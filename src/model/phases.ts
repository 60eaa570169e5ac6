// The year in order: from the phase after the count round to the count.
import type { NamedSpec } from '../spec/schema/spec.ts';
import { refuseUnknownOwnKeys } from './class-rates.ts';
import { fail, tellUnknown, type Context } from './context.ts';
import { resolveCeiling, withWaiting } from './ceiling.ts';
import { resolveDemography } from './demography.ts';
import { resolveDispersal } from './dispersal.ts';
import { resolveBreeding, resolveNamedBreeding } from './breeding.ts';
import { resolveAdd, resolveMove, resolveTake } from './handling.ts';
import { resolveAgeing, resolveNamedSurvival, resolveSurvival } from './life-phases.ts';
import { resolveTaking } from './variation/catastrophe.ts';
import type { Phase } from './model.ts';
import { patchesLost, resolvePatchesLost } from './patches-lost.ts';
import { refuseIdleStages } from './stages.ts';

/** The phases that every study can use without naming them itself. */
const ownPhases = ['count', 'breeding', 'survival', 'ageing', 'demography'] as const;

export function resolvePhases(context: Context): readonly Phase[] {
  const { year } = context.spec;
  refuseRepeats(context);
  tellUnused(context);
  refuseUnknownOwnKeys(context);
  refuseIdleStages(context);
  const count = year.indexOf('count');
  if (count < 0) {
    fail(context, 'missing-count', ['year'], {
      message: 'The year does not say when animals are counted',
      part: 'key',
      details: { expected: '`count` at its place in the year', fix: 'Abundance is read there, and thresholds apply.' },
    });
  }
  const turned = [...year.keys()].map((i) => (count + 1 + i) % year.length);
  const phases = turned.flatMap((i) => rememberedPhase(context, year[i] ?? '', i) ?? []);
  return withWaiting(context, [...resolvePatchesLost(context), ...phases]);
}

/** A dispersal remembers its parts each by itself. */
function rememberedPhase(context: Context, name: string, index: number): Phase | null {
  const make = (): Phase | null => resolvePhase(context, name, index);
  const { memory, numbers } = context;
  if (memory === undefined || context.spec.named[name]?.kind === 'dispersal') return make();
  return memory.phases.of(name, numbers, make);
}

function resolvePhase(context: Context, name: string, index: number): Phase | null {
  switch (name) {
    case 'count':
      return { kind: 'count', name };
    case 'breeding':
      return resolveBreeding(context);
    case 'survival':
      return resolveSurvival(context);
    case 'ageing':
      return resolveAgeing(context);
    case 'demography':
      return resolveDemography(context);
  }
  const named = context.spec.named[name];
  if (named === undefined) {
    const known = [...ownPhases, ...Object.keys(context.spec.named)];
    tellUnknown(context, { code: 'unknown-phase', what: 'phase', name, known, path: ['year', index], part: 'value' });
    return null;
  }
  return resolveNamed(context, name, named);
}

function resolveNamed(context: Context, name: string, named: NamedSpec): Phase | null {
  switch (named.kind) {
    case 'survival':
      return resolveNamedSurvival(context, name, named);
    case 'breeding':
      return resolveNamedBreeding(context, name, named);
    case 'dispersal':
      return resolveDispersal(context, name, named);
    case 'catastrophe':
      return resolveTaking(context, name, named);
    case 'ceiling':
      return resolveCeiling(context, name, named);
    case 'take':
      return resolveTake(context, name, named);
    case 'move':
      return resolveMove(context, name, named);
    case 'add':
      return resolveAdd(context, name, named);
    case 'crowding':
      return tellCondition(context, name);
  }
}

function tellCondition(context: Context, name: string): null {
  fail(context, 'unknown-phase', ['year', context.spec.year.indexOf(name)], {
    message: `\`${name}\` is a crowding, which is no phase of the year`,
    details: { fix: 'Remove it from `year`: it acts on the phases that its `changes` name.' },
  });
  return null;
}

function refuseRepeats(context: Context): void {
  const { year } = context.spec;
  year.forEach((name, i) => {
    if (year.indexOf(name) === i) return;
    fail(context, 'repeated-phase', ['year', i], {
      message: `The phase \`${name}\` stands twice in the year`,
      details: { found: name, expected: 'every phase once' },
    });
  });
}

function tellUnused(context: Context): void {
  const { spec } = context;
  const owners = {
    survival: 'survival',
    births: 'breeding',
    offspring: 'breeding',
    mating: 'breeding',
    demography: 'demography',
  } as const;
  for (const key of ['survival', 'births', 'offspring', 'mating', 'demography'] as const) {
    if (spec[key] !== undefined && !spec.year.includes(owners[key])) tellUnusedKey(context, key, owners[key]);
  }
  for (const name of Object.keys(spec.named)) {
    if (name === patchesLost || ownPhases.some((own) => own === name)) {
      fail(context, 'reserved-name', [name], {
        message: `\`${name}\` is a phase of the language`,
        part: 'key',
        details: { fix: 'Give this phase another name.' },
      });
    } else if (!spec.year.includes(name) && !isCondition(spec.named[name]?.kind)) tellUnusedKey(context, name, name);
  }
}

/** Conditions need no place in the year. */
function isCondition(kind: string | undefined): boolean {
  return kind === 'crowding' || kind === 'catastrophe';
}

function tellUnusedKey(context: Context, key: string, phase: string): void {
  fail(context, 'unused-rates', [key], {
    message: `\`${key}\` is given, but the phase \`${phase}\` is not in the year`,
    part: 'key',
    details: { expected: `\`${phase}\` at its place in \`year\``, fix: `Add it to \`year\`, or remove \`${key}\`.` },
  });
}
