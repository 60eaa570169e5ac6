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
  const named = (parameters ?? []).map((one) => ({ label: one.name, ...one }));
  const direct = (entries ?? []).map((one) => ({
    label: `${one.from.class} in ${one.from.patch} → ${one.to.class} in ${one.to.patch}`,
    ...one,
  }));
  const chosen = named.length > 0 ? named : direct;
  if (chosen.length === 0) return null;
  const largest = [...chosen].sort((a, b) => Math.abs(b.elasticity) - Math.abs(a.elasticity));
  return {
    head: [named.length > 0 ? 'number' : 'entry', 'value', 'growth per unit', 'growth per share'],
    rows: largest
      .slice(0, most)
      .map((one) => [one.label, told(one.value), told(one.sensitivity), told(one.elasticity)]),
    below: ['Growth per unit is the sensitivity, growth per share the elasticity.'],
  };
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
    ],
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
      `The growth rate differs by ${told(ltre.difference)}; the parts leave ${told(ltre.unexplained)} unexplained.`,
    ],
  };
}

export function eigenvalueTable({ eigenvalues }: Analysis): TextTable | null {
  if (eigenvalues === null) return null;
  const rows = eigenvalues.map(({ re, im }, k) => [
    String(k + 1),
    told(re),
    told(im),
    told(Math.sqrt(re * re + im * im)),
  ]);
  return { head: ['', 'real', 'imaginary', 'size'], rows, below: [] };
}
