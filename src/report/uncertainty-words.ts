// What is not known, in words: each uncertain parameter with the middle 95 % of its draws.
import type { Uncertainty } from '../model/chance.ts';
import { valueAt } from '../model/uncertainty/distribution.ts';
import { z975 } from '../numeric/normal-quantile.ts';

export function uncertaintyWords(uncertainty: Uncertainty | null): readonly string[] {
  if (uncertainty === null) return [];
  const { parameters, table } = uncertainty;
  if (table !== null) return [`${table.length} draws of the author's own.`];
  return parameters.map(({ name, value, distribution }) => {
    const [low, high] = [valueAt(distribution, -z975), valueAt(distribution, z975)];
    return `${name}: ${digits(value)}, with 95 % between ${digits(low)} and ${digits(high)} (${distribution.shape}).`;
  });
}

function digits(value: number): string {
  return String(Number(value.toPrecision(3)));
}
