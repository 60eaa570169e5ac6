// Year-to-year variation and catastrophes as plain data.
import type { Catastrophe, Correlation, PatchNumbers, Resampled, Uncertainty, Variation } from '../../model/chance.ts';
import type { Model } from '../../model/model.ts';
import { printExpression } from '../../spec/expression/print.ts';

export function variationJson(model: Model, variation: Variation): unknown {
  const patches = model.patches.map(({ name }) => name);
  const quantities = variation.varied.map(({ name }) => name);
  const { betweenPatches } = variation;
  return {
    varied: variation.varied.map(({ name, of, shape, mean, sd }) => ({
      name,
      ...(of.kind === 'rate'
        ? { of: 'rate', phase: model.phases[of.phase]?.name, part: of.part, class: model.classes[of.class] }
        : { of: 'parameter' }),
      shape,
      mean: numbersJson(patches, mean),
      sd: numbersJson(patches, sd),
    })),
    responses: variation.responses.map((one) => ({
      name: one.name,
      phase: model.phases[one.phase]?.name,
      part: one.part,
      class: model.classes[one.class],
      expression: printExpression(one.expression),
      patches: one.patches.map((p) => patches[p]),
    })),
    betweenRates: correlationJson(quantities, variation.betweenRates),
    betweenPatches: 'of' in betweenPatches ? correlationJson(patches, betweenPatches) : betweenPatches,
    autocorrelation: variation.autocorrelation,
    ...(variation.resampled === null ? {} : { drivers: driversJson(variation.resampled) }),
  };
}

function driversJson({ names, years, values }: Resampled): unknown {
  const byYear = (k: number) =>
    years.map((year, y): [string, number] => [String(year), values[k * years.length + y] ?? 0]);
  return Object.fromEntries(names.map((name, k) => [name, Object.fromEntries(byYear(k))]));
}

function numbersJson(patches: readonly string[], { epochs, epochOf }: PatchNumbers): unknown {
  const [only, ...others] = epochs.map((epoch) => Object.fromEntries(patches.map((name, p) => [name, epoch[p] ?? 0])));
  return others.length === 0 ? only : { epochs: [only, ...others], epochOf: Array.from(epochOf) };
}

function correlationJson(names: readonly string[], { of, repaired }: Correlation): unknown {
  if (typeof of === 'number') return of;
  const rows = names.map((name, a) => [
    name,
    Object.fromEntries(names.map((other, b) => [other, of.values[a * of.columns + b] ?? 0])),
  ]);
  return { matrix: Object.fromEntries(rows), repaired };
}

export function catastropheJson(model: Model, { origins, multiplies, ...one }: Catastrophe): unknown {
  return {
    ...one,
    beginsIn: origins.map((p) => model.patches[p]?.name),
    multiplies: multiplies.map(({ phase, part, class: c, times }) => ({
      phase: model.phases[phase]?.name,
      part,
      class: model.classes[c],
      times,
    })),
  };
}

export function uncertaintyJson({ parameters, correlation, table }: Uncertainty): unknown {
  const names = parameters.map(({ name }) => name);
  return { parameters, correlation: correlationJson(names, correlation), table };
}
