// Survival and ageing. A survival may stand in a year several times, under names of its own.
import type { SurvivalSpec } from '../spec/schema/spec.ts';
import { checkClassKeys, ownRatesAnywhere, requireEveryClass, writtenRate, type RateSection } from './class-rates.ts';
import { oldestClasses, oldestLeave } from './classes.ts';
import { fail, type Context } from './context.ts';
import type { AgeingPhase, SurvivalPhase } from './model.ts';
import { buildTable } from './rates.ts';
import { resolveStages } from './stages.ts';

/** The phase `survival` of the language. */
export function resolveSurvival(context: Context): SurvivalPhase | null {
  const survival = context.spec.survival ?? (ownRatesAnywhere(context, 'survival') ? {} : undefined);
  if (survival === undefined) return missingRates(context, 'survival', '`survival: { CLASS: share, … }`');
  return survivalPhase(context, 'survival', {
    everywhere: survival,
    path: ['survival'],
    key: 'survival',
    what: 'survival',
    settings: new Set(),
  });
}

/** A survival under a name of its own. */
export function resolveNamedSurvival(context: Context, name: string, { survival }: SurvivalSpec): SurvivalPhase {
  const what = `survival in ${name}`;
  return survivalPhase(context, name, {
    everywhere: survival,
    path: [name, 'survival'],
    key: name,
    what,
    settings: new Set(),
  });
}

function survivalPhase(context: Context, name: string, section: RateSection): SurvivalPhase {
  checkClassKeys(context, section);
  requireEveryClass(context, section);
  const survival = buildTable(context, {
    size: context.classes.length,
    bounds: 'share',
    written: (patch, c) => writtenRate(context, section, [patch, c]),
  });
  return { kind: 'survival', name, survival };
}

export function resolveAgeing(context: Context): AgeingPhase | null {
  const { spec, classes, sexes } = context;
  const path = ['year', spec.year.indexOf('ageing')];
  if (spec.oldest === undefined) {
    fail(context, 'missing-oldest', path, {
      message: `It is not said whether \`${classes.at(-1)}\` stays in its class or leaves at ageing`,
      details: { expected: '`oldest: open-ended` (the oldest stay) or `oldest: terminal` (the oldest leave)' },
    });
    return null;
  }
  if (typeof spec.oldest === 'object' && sexes === null) {
    fail(context, 'sexes-shape', ['oldest'], {
      message: '`oldest` tells the sexes apart, but the classes do not',
      details: { expected: '`open-ended` or `terminal`, or classes for `females` and `males`' },
    });
  }
  const last = oldestClasses(context);
  const next = Int32Array.from(classes, (_, c) =>
    !last.includes(c) ? c + 1 : oldestLeave(context, c) === true ? -1 : c,
  );
  const stages = resolveStages(context, next);
  const advance = new Float64Array(classes.length).fill(1);
  for (const stage of stages) advance[stage.class] = 1 / stage.years;
  return { kind: 'ageing', name: 'ageing', advance, next, ...(stages.length === 0 ? {} : { stages }) };
}

/** Tells that a phase of the year has no rates. */
export function missingRates(context: Context, phase: string, expected: string): null {
  fail(context, 'missing-rates', ['year', context.spec.year.indexOf(phase)], {
    message: `The phase \`${phase}\` is in the year, but its rates are not given`,
    details: { expected },
  });
  return null;
}
