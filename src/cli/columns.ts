// Columns that several tables have.
import type { Quantiles } from '../results/results.ts';
import type { Cell, Column } from './tables.ts';

export const year: Column = {
  name: 'year',
  unit: 'year',
  meaning: 'Calendar year of the count; the first is the start.',
};
export const patch: Column = { name: 'patch', unit: '', meaning: 'Name of the patch; empty for all patches together.' };
export const animals = (name: string, meaning: string): Column => ({ name, unit: 'animals', meaning });
export const share = (name: string, meaning: string): Column => ({ name, unit: 'share', meaning });

export const levels = ['0.05', '0.25', '0.5', '0.75', '0.95'] as const;

export function quantileColumns(unit: string, what: string): readonly Column[] {
  return levels.map((level) => ({
    name: `quantile_${level}`,
    unit,
    meaning: `${what} that a share of ${level} of the runs does not exceed.`,
  }));
}

export function quantileCells(quantiles: Quantiles): readonly Cell[] {
  return levels.map((level) => quantiles[level]);
}

export const outcome: Column = { name: 'outcome', unit: '', meaning: "The author's name of the outcome." };
