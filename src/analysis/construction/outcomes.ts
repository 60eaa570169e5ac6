// Outcomes that say nothing about the years to come, since they are true from the start.
import type { CompiledModel } from '../../pipeline.ts';
import type { Finding } from '../../spec/finding.ts';

export function alreadyBelow({ model, startAnimals }: CompiledModel): readonly Finding[] {
  const n = model.classes.length;
  return model.outcomes.flatMap(({ name, weights, patches, below }) => {
    let count = 0;
    startAnimals.forEach((animals, i) => {
      if (patches[Math.floor(i / n)] === 1) count += animals * (weights[i % n] ?? 0);
    });
    if (count >= below) return [];
    return [
      {
        severity: 'warning',
        code: 'already-below',
        message: `\`${name}\` is true from the start: ${count} are counted there, which is below ${below}`,
        path: ['outcomes', name],
        part: 'key',
        details: {
          reason: 'Its chance then says how likely the animals stay below, not how likely they fall below.',
          fix: 'Choose a lower threshold, or count other classes or patches.',
        },
      },
    ];
  });
}
