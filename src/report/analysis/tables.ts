// The tables of an analysis: patches, what growth depends on, links, differences, eigenvalues.
import type { Analysis } from '../../analysis/schema.ts';
import { orDash, told } from './words.ts';

export interface TextTable {
  readonly head: readonly string[];
  readonly rows: readonly (readonly string[])[];
  /** Sentences under the table. */
  readonly below: readonly string[];
}

/** Longer tables belong into files. */
const mostPatches = 60;

export function patchTable({ patches, at }: Analysis): TextTable | null {
  if (patches === null || patches.length < 2) return null;
  const rows = patches
    .slice(0, mostPatches)
    .map((one) => [
      one.patch,
      orDash(one.share),
      told(one.growthAlone),
      orDash(one.contribution),
      orDash(one.contributionNow),
      orDash(one.selfRecruitment),
      one.role ?? '–',
      orDash(one.removalLoss),
    ]);
  const more = patches.length - rows.length;
  const state =
    at === 'zero' ? 'near zero' : at === 'start' ? 'at the numbers of the start' : 'where numbers stand still';
  const meaning =
    `Contribution: animals next year, anywhere, for each animal there now, ${state}; made up as in the stable distribution ` +
    `(first column) and as at the start (second). Alone: growth if all that leave were lost and nobody came.`;
  return {
    head: ['patch', 'share', 'alone', 'contribution', 'from start', 'stays', 'role', 'growth lost without'],
    rows,
    below: [...(more > 0 ? [`and ${more} more patches (in full with --json or --out)`] : []), meaning],
  };
}

export function dependenceTable({ parameters, entries }: Analysis, most: number): TextTable | null {
  if (parameters !== null && parameters.length > 0) return numberTable(parameters, most);
  if (entries === null || entries.length === 0) return null;
  return {
    head: ['entry', 'value', 'growth per unit', 'growth per share'],
    rows: largestOf(entries, most).map((one) => [
      `${one.from.class} in ${one.from.patch} → ${one.to.class} in ${one.to.patch}`,
      ...[one.value, one.sensitivity, one.elasticity].map(told),
    ]),
    below: [units],
  };
}

const units = 'Growth per unit is the sensitivity, growth per share the elasticity.';
const anew =
  'Solved anew: per unit, if the number had been otherwise from the first, so that every patch still stands still at its capacity ' +
  'when alone; the other columns let the strength of crowding stay, as a plan does.';

function numberTable(parameters: NonNullable<Analysis['parameters']>, most: number): TextTable {
  const differs = parameters.some(
    ({ sensitivity, sensitivitySolvedAnew }) => Math.abs(sensitivity - sensitivitySolvedAnew) > 1e-9,
  );
  const about = parameters.some(({ exact }) => !exact);
  return {
    head: ['number', 'value', 'growth per unit', 'growth per share', ...(differs ? ['solved anew'] : [])],
    rows: largestOf(parameters, most).map((one) => [
      `${one.name}${one.exact ? '' : ' (about)'}`,
      ...[one.value, one.sensitivity, one.elasticity, ...(differs ? [one.sensitivitySolvedAnew] : [])].map(told),
    ]),
    below: [units, ...(differs ? [anew] : []), ...(about ? ['About: by differences, good to six digits.'] : [])],
  };
}

function largestOf<T extends { readonly elasticity: number }>(all: readonly T[], most: number): readonly T[] {
  return [...all].sort((a, b) => Math.abs(b.elasticity) - Math.abs(a.elasticity)).slice(0, most);
}

export function linkTable({ links }: Analysis, most: number): TextTable | null {
  if (links === null || links.length === 0) return null;
  const largest = [...links].sort((a, b) => b.removalLoss - a.removalLoss).slice(0, most);
  return {
    head: ['from → to', 'class', 'share', 'instead of staying', 'growth lost without'],
    rows: largest.map((link) => [
      `${link.from} → ${link.to}`,
      link.class,
      told(link.share),
      told(link.sensitivityInsteadOfStaying),
      `${told(link.removalLoss)}${link.exact ? '' : ' (about)'}`,
    ]),
    below: [
      'Instead of staying: growth per share of the animals that goes there and would otherwise have stayed. Without: those who ' +
        'would have arrived are lost.',
      ...(largest.some(({ exact }) => !exact) ? ['About: the share that arrives times its sensitivity.'] : []),
    ],
  };
}

/** Years shown of a curve. */
const mostYears = 5;

export interface FallingTable extends TextTable {
  readonly title: string;
}

export function fallingTables({ fallingBelow }: Analysis): readonly FallingTable[] {
  return (fallingBelow ?? []).map(({ outcome, definition, drift, variance, replicates, years }, k, all) => ({
    title: `${outcome}: chance of having come to ${definition}`,
    head: ['by', 'diffusion curve', 'simulated', '95 % band'],
    rows: spread(years, mostYears).map(({ year, diffusion, simulated, lower, upper }) => [
      String(year),
      percent(diffusion),
      percent(simulated),
      `${percent(lower)} to ${percent(upper)}`,
    ]),
    below:
      k < all.length - 1
        ? []
        : [
            `Diffusion curve: ln of numbers drifts by ${told(drift)} a year and a year adds ${told(variance)} to its variance (from the ` +
              'simulated long run), counted once a year (Lande & Orzack 1988; the correction for yearly counts Broadie, Glasserman & Kou ' +
              `1997). It leaves out the luck of single animals and the waves between classes. Simulated: share of ${replicates} runs, with a band for the whole curve.`,
          ],
  }));
}

/** So many, evenly, the last among them. */
function spread<T>(all: readonly T[], most: number): readonly T[] {
  const count = Math.min(most, all.length);
  return Array.from({ length: count }, (_, i) => all[Math.ceil(((i + 1) * all.length) / count) - 1]).filter(
    (one) => one !== undefined,
  );
}

function percent(share: number): string {
  return `${told(Number((share * 100).toFixed(2)))}\u00a0%`;
}

/** By named numbers, where they differ. */
export function numberDifferenceTable({ ltre }: Analysis, most: number): TextTable | null {
  if (ltre === null || ltre.parameters === null) return null;
  const largest = [...ltre.parameters].sort((a, b) => Math.abs(b.contribution) - Math.abs(a.contribution));
  return {
    head: ['number', 'here', ltre.against, 'adds to the growth rate'],
    rows: largest
      .slice(0, most)
      .map(({ name, value, reference, contribution }) => [name, ...[value, reference, contribution].map(told)]),
    below: [`The named numbers leave ${told(ltre.unexplainedByParameters ?? 0)} of the difference unexplained.`],
  };
}

export function differenceTable({ ltre }: Analysis, most: number): TextTable | null {
  if (ltre === null) return null;
  const largest = [...ltre.contributions].sort((a, b) => Math.abs(b.contribution) - Math.abs(a.contribution));
  return {
    head: ['entry', 'difference', 'adds to the growth rate'],
    rows: largest
      .slice(0, most)
      .map(({ from, to, difference, contribution }) => [
        `${from.class} in ${from.patch} → ${to.class} in ${to.patch}`,
        told(difference),
        told(contribution),
      ]),
    below: [
      `The growth rate differs by ${told(ltre.difference)} from that of ${ltre.against}; the entries leave ${told(ltre.unexplained)} ` +
        'unexplained. Each part is the difference times the slope half-way between the two.',
    ],
  };
}

/** Beside the largest eigenvalue. */
const noise = 1e-13;

export function eigenvalueTable({ eigenvalues }: Analysis): TextTable | null {
  if (eigenvalues === null) return null;
  const sizes = eigenvalues.map(({ re, im }) => Math.sqrt(re * re + im * im));
  const least = noise * Math.max(...sizes);
  const shown = (value: number): string => told(Math.abs(value) < least ? 0 : value);
  const rows = eigenvalues.map(({ re, im }, k) => [String(k + 1), ...[re, im, sizes[k] ?? 0].map(shown)]);
  return { head: ['', 'real', 'imaginary', 'size'], rows, below: [] };
}
