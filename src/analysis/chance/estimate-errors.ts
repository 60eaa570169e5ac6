// How far what is not known can be off, and together: the covariance of the named numbers of a model.
import type { Correlation, Uncertainty } from '../../model/chance.ts';
import { valueAt, varianceOf, type UncertainDistribution } from '../../model/uncertainty/distribution.ts';
import type { NamedCovariance } from '../input.ts';
import { covarianceOf, hermiteSeries, withVariance } from './hermite.ts';

/** From the distributions and the correlation of their normal numbers, or from the author's own draws (divisor n − 1). */
export function estimateErrors({ parameters, correlation, table }: Uncertainty): NamedCovariance | null {
  if (table !== null) return ofDraws(table);
  const series = parameters.map(({ distribution }) => seriesOf(distribution));
  const size = parameters.length;
  const values = new Float64Array(size * size);
  series.forEach((left, a) => {
    series.forEach((right, b) => {
      values[a * size + b] = covarianceOf(left, right, a === b ? 1 : correlationAt(correlation, a, b));
    });
  });
  return {
    names: parameters.map(({ name }) => name),
    covariance: { rows: size, columns: size, values },
  };
}

function seriesOf(distribution: UncertainDistribution): Float64Array {
  return withVariance(
    hermiteSeries((z) => valueAt(distribution, z)),
    varianceOf(distribution),
  );
}

export function correlationAt({ of }: Correlation, a: number, b: number): number {
  if (a === b) return 1;
  return typeof of === 'number' ? of : (of.values[a * of.columns + b] ?? 0);
}

/** Null with fewer than two draws. Names that not every draw has are left as they are. */
function ofDraws(rows: readonly Readonly<Record<string, number>>[]): NamedCovariance | null {
  if (rows.length < 2) return null;
  const names = Object.keys(rows[0] ?? {}).filter((name) => rows.every((row) => row[name] !== undefined));
  const means = names.map((name) => rows.reduce((sum, row) => sum + (row[name] ?? 0), 0) / rows.length);
  const size = names.length;
  const values = new Float64Array(size * size);
  names.forEach((left, a) => {
    names.forEach((right, b) => {
      const together = rows.map((row) => ((row[left] ?? 0) - (means[a] ?? 0)) * ((row[right] ?? 0) - (means[b] ?? 0)));
      values[a * size + b] = together.reduce((sum, product) => sum + product, 0) / (rows.length - 1);
    });
  });
  return { names, covariance: { rows: size, columns: size, values } };
}
