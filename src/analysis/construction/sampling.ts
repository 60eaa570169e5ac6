// Spread between years that may be, in part, that of the estimates.
import type { CompiledModel } from '../../pipeline.ts';
import type { Finding } from '../../spec/finding.ts';

const taken = /process|correct|sampling|removed|taken out|shrink|shrunk|variance component|random effect/iu;

/** Numbers that vary and were measured, and of which nothing says that the error of measuring was taken out of their spread. */
export function samplingSpread({ spec, model }: CompiledModel): readonly Finding[] {
  const varied = model.variation?.varied ?? [];
  return varied.flatMap(({ name, of, sd }) => {
    if (of.kind !== 'parameter' || sd.epochs.every((epoch) => epoch.every((value) => value === 0))) return [];
    const written = spec.parameters?.[name];
    const source = typeof written === 'object' && 'source' in written ? written.source : undefined;
    const measured = source?.basis === 'measured here' || source?.basis === 'measured elsewhere';
    if (!measured || taken.test(source.text ?? '')) return [];
    const finding: Finding = {
      severity: 'note',
      code: 'sampling-spread',
      message: `The SD of \`${name}\` between years may hold the error of measuring it, too`,
      path: ['variation', name],
      part: 'key',
      details: {
        found: source.text ?? source.basis ?? '',
        fix: 'Take the mean squared standard error of the yearly estimates from their variance, and say so in the source.',
        reason:
          'Estimates of different years differ more than the years do; what is left in makes risks too high (Gould & Nichols 1998; White 2000).',
      },
    };
    return [finding];
  });
}
