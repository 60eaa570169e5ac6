// Young that may be counted twice, and young that grow up without a first year.
import type { CompiledModel } from '../../pipeline.ts';
import type { BreedingPhase, Model } from '../../model/model.ts';
import type { Finding } from '../../spec/finding.ts';

const wholeBroods = /litter|clutch|brood|egg|fledg|hatch|cub|pup|calv|lamb|fawn|kit/iu;

/** Where only females are counted, births named after whole broods are likely those of both sexes. */
export function birthsOfBothSexes({ spec, model }: CompiledModel): readonly Finding[] {
  if (model.counts !== 'females') return [];
  const sections = [
    { births: spec.births, path: ['births'] },
    ...Object.entries(spec.named).flatMap(([name, own]) =>
      own.kind === 'breeding' ? [{ births: own.births, path: [name, 'births'] }] : [],
    ),
  ];
  return sections.flatMap(({ births = {}, path }) => {
    if (births['female-share'] !== undefined) return [];
    const named = Object.entries(births).find(([key, value]) => {
      return key !== 'into' && typeof value === 'string' && wholeBroods.test(value) && !/0?\.5|\/\s*2/u.test(value);
    });
    if (named === undefined) return [];
    const finding: Finding = {
      severity: 'warning',
      code: 'births-of-both-sexes',
      message: 'Only females are counted, and the births look like those of both sexes',
      path: [...path, named[0]],
      details: {
        found: String(named[1]),
        fix: 'Add `female-share: 0.5` beside the births; if they are daughters already, give the number such a name.',
        reason: 'Counting sons as daughters makes growth too large; it is a common slip (Kendall et al. 2019).',
      },
    };
    return [finding];
  });
}

/** Young that go on to the next class before any survival reached them. */
export function newbornUnsurvived({ model }: CompiledModel): readonly Finding[] {
  if (!model.phases.some((phase) => phase.kind === 'survival')) return [];
  return model.phases.flatMap((phase, at) => {
    if (phase.kind !== 'breeding' || !grows(model, phase, at)) return [];
    const finding: Finding = {
      severity: 'warning',
      code: 'newborn-unsurvived',
      message: `Those born in \`${phase.name}\` reach the next class before any survival`,
      path: ['year'],
      part: 'key',
      details: {
        found: model.year.join(', '),
        fix: 'Let a survival stand between the births and `ageing`.',
        reason:
          'Young that move on at their birthday skip the deaths of their first year: the most frequent mistake of matrices counted after breeding (Kendall et al. 2019).',
      },
    };
    return [finding];
  });
}

function grows(model: Model, { into }: BreedingPhase, at: number): boolean {
  const round = [...model.phases.slice(at + 1), ...model.phases.slice(0, at)];
  for (const phase of round) {
    if (phase.kind === 'survival' || phase.kind === 'demography') return false;
    if (phase.kind === 'ageing') return into.some((share, c) => share > 0 && (phase.next[c] ?? c) !== c);
  }
  return false;
}
