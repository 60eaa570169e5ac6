// The answer of an analysis in a few sentences, before any table.
import type { Analysis } from '../../analysis/schema.ts';
import { change, listed, told } from './words.ts';

const where = {
  zero: 'With almost nobody there',
  equilibrium: 'Where numbers stand still',
  start: 'At the numbers of the start',
} as const;

export function answerWords(analysis: Analysis): readonly string[] {
  const { at, growthRate, patches } = analysis;
  if (growthRate === 0) {
    return [`${where[at]}, the population dies out: no animal leaves young that come back to breed.`];
  }
  const rate = `${where[at]} and in mean years, the population ${change(growthRate)} (growth rate ${told(growthRate)}).`;
  return [
    rate,
    ...held(analysis),
    ...depends(analysis),
    ...(patches === null || patches.length < 2 ? [] : roles(analysis)),
  ];
}

/** A few die out, but more hold: then what is told near zero is not the whole answer. */
function held({ at, growthRate, equilibrium }: Analysis): readonly string[] {
  const level = (equilibrium?.states ?? []).find(({ stable, total }) => stable && total > 0);
  if (at !== 'zero' || growthRate >= 1 || level === undefined) return [];
  return [`More of them hold all the same, at ${told(level.total)} animals: \`--at equilibrium\` analyses that.`];
}

function depends({ parameters }: Analysis): readonly string[] {
  const largest = [...(parameters ?? [])].sort((a, b) => Math.abs(b.elasticity) - Math.abs(a.elasticity))[0];
  if (largest === undefined || largest.elasticity === 0) return [];
  const turn = largest.elasticity > 0 ? 'raises' : 'lowers';
  return [
    `Of the named numbers it depends most on ${largest.name}: 1 % more of it ${turn} the growth rate by about ` +
      `${told(Math.abs(largest.elasticity))} %.`,
  ];
}

function roles({ patches, growthRate }: Analysis): readonly string[] {
  const having = (role: string): readonly string[] =>
    (patches ?? []).filter((patch) => patch.role === role).map(({ patch }) => patch);
  const lines = [
    `Sources, whose animals leave more than one animal each a year later, anywhere: ${listed(having('source'))}.`,
    `Sinks, whose animals leave less than one each: ${listed(having('sink'))}.`,
  ];
  const undecided = having('undecided');
  if (undecided.length > 0) lines.push(`Neither, within rounding: ${listed(undecided)}.`);
  if (growthRate > 1 && (patches ?? []).every(({ growthAlone }) => growthAlone < 1)) {
    lines.push('No patch would last alone, with whoever leaves it lost: they hold one another up.');
  }
  return [...lines, ...restsOn(patches ?? [], growthRate)];
}

/** Beside the growth rate, what losses that differ in rounding alone may lie apart. */
const rounding = 1e-9;

/** The patch without which most is lost, or those that are alike in this. */
function restsOn(patches: NonNullable<Analysis['patches']>, growthRate: number): readonly string[] {
  const most = patches.reduce((loss, { removalLoss }) => Math.max(loss, removalLoss ?? 0), 0);
  if (!(most > 0)) return [];
  const dearest = patches.filter(({ removalLoss }) => most - (removalLoss ?? 0) <= rounding * growthRate);
  const names = listed(dearest.map(({ patch }) => patch));
  const without = change(growthRate - most);
  if (dearest.length === 1) return [`The growth rests most on ${names}: without it the rest ${without}.`];
  const on = dearest.length < patches.length ? 'most on' : 'on';
  return [`The growth rests ${on} ${names} alike: without one of them the rest ${without}.`];
}
