// Survival that already counts emigrants as dead, in a model in which they leave.
import type { CompiledModel } from '../../pipeline.ts';
import { namesIn } from '../../spec/expression/names.ts';
import { parseExpression } from '../../spec/expression/parse.ts';
import type { Finding } from '../../spec/finding.ts';

const fromMarks = /apparent|recaptur|re-?sight|mark-|marked|ringed|banded|cormack|\bcjs\b/iu;

export function apparentSurvival({ spec, model }: CompiledModel): readonly Finding[] {
  const leaves = model.phases.some(
    (phase) => phase.kind === 'dispersal' && phase.leaving.epochs.some((epoch) => epoch.some((share) => share > 0)),
  );
  if (!leaves) return [];
  const used = namesInSurvival(spec);
  return model.parameters.flatMap(({ name, source }) => {
    if (source === null || !fromMarks.test(source) || !used.has(name)) return [];
    const finding: Finding = {
      severity: 'note',
      code: 'apparent-survival',
      message: `\`${name}\` is a survival from marked animals, and animals also leave by dispersal`,
      path: ['parameters', name],
      part: 'key',
      details: {
        found: source,
        fix: 'If emigrants could not be found again, use a survival that is corrected for them, or leave out the emigration.',
        reason: 'Apparent survival counts those that left as dead; letting them leave again counts the loss twice.',
      },
    };
    return [finding];
  });
}

function namesInSurvival(spec: CompiledModel['spec']): ReadonlySet<string> {
  const sections = [
    spec.survival,
    ...Object.values(spec.in ?? {}).map((own) => own.survival),
    ...Object.values(spec.named).map((own) => (own.kind === 'survival' ? own.survival : undefined)),
  ];
  const texts = sections.flatMap((section) => Object.values(section ?? {}));
  return new Set(
    texts.flatMap((text) => {
      const parsed = typeof text === 'string' ? parseExpression(text) : null;
      return parsed?.ok === true ? namesIn(parsed.ast) : [];
    }),
  );
}
