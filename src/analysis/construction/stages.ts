// Stages through which animals run faster than they last.
import { advanceAt } from '../../compile/advance.ts';
import { growthWithout, survivalOfYear } from '../../compile/stage-advance.ts';
import type { AgeingPhase, Model } from '../../model/model.ts';
import { fixedDurationAdvance } from '../../numeric/stage-duration.ts';
import type { CompiledModel } from '../../pipeline.ts';
import type { Finding } from '../../spec/finding.ts';

/** By how much the share that goes on may exceed that of a stage in which all stay alike. */
const slack = 1.5;

export function fastStages({ model, landscape }: CompiledModel): readonly Finding[] {
  const ageing = model.phases.find((phase): phase is AgeingPhase => phase.kind === 'ageing');
  const loose = (ageing?.stages ?? []).filter(({ as, years }) => as === 'geometric' && years >= 2);
  if (ageing === undefined || loose.length === 0) return [];
  const growthRate = growthWithout(model, landscape);
  if (!(growthRate > 0)) return [];
  return loose.flatMap(({ class: c, years }) => {
    const ratios = model.patches.map((patch, p) => {
      const survival = survivalOfYear(model, p * model.classes.length + c);
      const fixed = fixedDurationAdvance({ survival, duration: years, growthRate });
      return { patch: patch.name, fixed, ratio: advanceAt(ageing, { patch: p, class: c }) / fixed };
    });
    const worst = ratios.filter(({ fixed }) => fixed > 0).sort((a, b) => b.ratio - a.ratio)[0];
    return worst === undefined || worst.ratio <= slack ? [] : [finding(model, { c, years, ...worst })];
  });
}

interface Fast {
  readonly c: number;
  readonly years: number;
  readonly patch: string;
  readonly fixed: number;
}

function finding(model: Model, { c, years, patch, fixed }: Fast): Finding {
  const name = model.classes[c] ?? '';
  const share = (value: number) => `${(value * 100).toPrecision(3)} %`;
  return {
    severity: 'warning',
    code: 'fast-stage',
    message: `Each year ${share(1 / years)} of \`${name}\` go on, far more than stages of ${years} years let go`,
    path: ['duration', name],
    part: 'key',
    details: {
      expected: `about ${share(fixed)} in ${patch}, were all to stay ${years} years`,
      fix: 'Take `as: fixed`, or be sure that animals really leave the stage after any number of years.',
      reason:
        'Deaths make the young of a stage the many, so fewer than one in so many are ready to go on; growth comes out too high (Kendall et al. 2019).',
    },
  };
}
