// Oldest classes that stay, and survive so well that some animals never die.
import type { CompiledModel } from '../../pipeline.ts';
import type { Model } from '../../model/model.ts';
import type { Finding } from '../../spec/finding.ts';

/** Mean further years from which nobody has measured a survival. */
const longestYears = 100;

export function longLives({ model }: CompiledModel): readonly Finding[] {
  const seasons = model.phases.filter((phase) => phase.kind === 'survival');
  const ageing = model.phases.find((phase) => phase.kind === 'ageing');
  const [first] = seasons;
  if (first === undefined || ageing === undefined) return [];
  const staying = model.classes.flatMap((name, c) => (ageing.next[c] === c ? [{ name, c }] : []));
  return staying.flatMap(({ name, c }) => {
    const worst = best(model, (p) =>
      seasons.reduce((product, season) => product * survivalAt(season, model, [p, c]), 1),
    );
    const years = worst.survival >= 1 ? Infinity : 1 / (1 - worst.survival);
    if (years <= longestYears) return [];
    const finding: Finding = {
      severity: 'warning',
      code: 'too-long-lived',
      message:
        years === Infinity
          ? `An animal of the class ${name} in ${worst.patch} never dies`
          : `An animal of the class ${name} in ${worst.patch} lives ${years.toFixed(0)} more years on average`,
      path: first.name === 'survival' ? ['survival', name] : [first.name, 'survival', name],
      details: {
        found: `a survival of ${String(Number(worst.survival.toPrecision(6)))} a year`,
        fix: 'Correct the survival, or end the classes with `oldest: terminal`.',
        reason: 'In an open-ended class the mean further life is 1 / (1 − survival) years.',
      },
    };
    return [finding];
  });
}

type Season = Extract<Model['phases'][number], { kind: 'survival' }>;

function survivalAt({ survival }: Season, { classes }: Model, [p, c]: readonly [number, number]): number {
  return Math.max(...survival.epochs.map((epoch) => epoch[p * classes.length + c] ?? 0));
}

function best(
  model: Model,
  survivalOf: (patch: number) => number,
): { readonly patch: string; readonly survival: number } {
  return model.patches
    .map((patch, p) => ({ patch: patch.name, survival: survivalOf(p) }))
    .reduce((most, one) => (one.survival > most.survival ? one : most));
}
