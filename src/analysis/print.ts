// The analysis as text: the answer first, in words, then the tables, then what limits it.
import type { Analysis } from './schema.ts';
import { change, listed, table, told, years } from './words.ts';

/** The whole text, lines joined, with a line end. `most` is the length of each list of the largest. */
export function printAnalysis(analysis: Analysis, most = 10): string {
  const parts = [
    ['The answer', answer(analysis)],
    ['Patches', patchLines(analysis)],
    ['What the growth depends on most', dependenceLines(analysis, most)],
    ['Links', linkLines(analysis, most)],
    ['The first years', firstYears(analysis)],
    ['Lives', lifeLines(analysis)],
    ['Chance and what is not known', chanceLines(analysis)],
    ['At capacity', equilibriumLines(analysis)],
    ['Groups of states', blockLines(analysis)],
    ['To keep in mind', analysis.cautions.map((caution) => `- ${caution}`)],
    ['Not answered', Object.entries(analysis.reasons).map(([field, reason]) => `- ${field}: ${reason}`)],
  ] as const;
  const written = parts.filter(([, lines]) => lines.length > 0);
  return `${written.map(([title, lines]) => [title, ...lines.map((line) => `  ${line}`)].join('\n')).join('\n\n')}\n`;
}

const where = {
  zero: 'With almost nobody there',
  equilibrium: 'Where numbers stand still',
  start: 'At the numbers of the start',
} as const;

function answer({ at, growthRate, patches }: Analysis): string[] {
  if (growthRate === 0)
    return [`${where[at]}, the population dies out: no animal leaves young that come back to breed.`];
  const lines = [
    `${where[at]} and in mean years, the population ${change(growthRate)} (growth rate ${told(growthRate)}).`,
  ];
  if (!patches || patches.length < 2) return lines;
  const having = (role: string): string[] => patches.filter((patch) => patch.role === role).map(({ patch }) => patch);
  lines.push(`Sources, which leave more animals than they hold: ${listed(having('source'))}.`);
  lines.push(`Sinks, which would empty without arrivals: ${listed(having('sink'))}.`);
  const byLoss = patches.filter(({ removalLoss }) => (removalLoss ?? 0) > 0);
  const dearest = byLoss.sort((a, b) => (b.removalLoss ?? 0) - (a.removalLoss ?? 0))[0];
  if (dearest?.removalLoss) {
    const without = growthRate - dearest.removalLoss;
    lines.push(`The patch that the growth rests on most is ${dearest.patch}: without it the rest ${change(without)}.`);
  }
  return lines;
}

function patchLines({ patches }: Analysis): string[] {
  if (!patches || patches.length < 2) return [];
  const head = ['patch', 'share', 'alone', 'contribution', 'own young', 'role', 'growth lost without it'];
  const rows = patches.map((one) => [
    one.patch,
    orDash(one.share),
    told(one.growthAlone),
    orDash(one.contribution),
    orDash(one.selfRecruitment),
    one.role ?? '–',
    orDash(one.removalLoss),
  ]);
  return table(head, rows);
}

function dependenceLines({ parameters, entries }: Analysis, most: number): string[] {
  const head = ['', 'value', 'growth per unit', 'growth per share'];
  const named = (parameters ?? []).map((one) => ({ label: one.name, ...one }));
  const direct = (entries ?? []).map((one) => ({
    label: `${one.from.class} in ${one.from.patch} → ${one.to.class} in ${one.to.patch}`,
    ...one,
  }));
  const largest = (named.length > 0 ? named : direct).sort((a, b) => Math.abs(b.elasticity) - Math.abs(a.elasticity));
  if (largest.length === 0) return [];
  const rows = largest
    .slice(0, most)
    .map((one) => [one.label, told(one.value), told(one.sensitivity), told(one.elasticity)]);
  return table(head, rows);
}

function linkLines({ links }: Analysis, most: number): string[] {
  if (!links || links.length === 0) return [];
  const largest = [...links].sort((a, b) => b.removalLoss - a.removalLoss).slice(0, most);
  const head = ['from → to', 'class', 'share', 'instead of staying', 'growth lost without it'];
  const rows = largest.map((link) => [
    `${link.from} → ${link.to}`,
    link.class,
    told(link.share),
    told(link.sensitivityInsteadOfStaying),
    `${told(link.removalLoss)}${link.exact ? '' : ' (about)'}`,
  ]);
  return table(head, rows);
}

function firstYears({ transients, dampingRatio, oscillationSteps }: Analysis): string[] {
  if (!transients) return [];
  const { stepsFollowed, firstStepRise, firstStepDrop, highest, lowest, lasting, fromStart } = transients;
  const lines = [
    `Against steady growth, numbers after one year can be ${told(firstStepDrop)} to ${told(firstStepRise)} times as many, by who is there.`,
    `The fewest within ${years(stepsFollowed)} are ${told(lowest.times)} times as many, the most ${told(highest.times)} times.`,
  ];
  if (lasting) lines.push(`For good they can be ${told(lasting.loss)} to ${told(lasting.gain)} times as many.`);
  if (fromStart?.lasting !== null && fromStart?.lasting !== undefined) {
    const settles =
      fromStart.stepsToSettle === null ? '' : ` and are there within 5 % after ${years(fromStart.stepsToSettle)}`;
    lines.push(`From the actual start they come to ${told(fromStart.lasting)} times as many${settles}.`);
  }
  if (dampingRatio !== null) {
    const waves = oscillationSteps === null ? '' : `, in waves of ${told(oscillationSteps)} years`;
    lines.push(`What is out of proportion fades by a factor of ${told(dampingRatio)} a year${waves}.`);
  }
  return lines;
}

function lifeLines({ netReproductiveRate, generationTime }: Analysis): string[] {
  const lines: string[] = [];
  if (netReproductiveRate !== null) lines.push(`A newborn leaves ${told(netReproductiveRate)} young in its life.`);
  if (!generationTime) return lines;
  const { cohort, stable, replacement } = generationTime;
  if (stable !== null) lines.push(`Mean age of mothers in the stable population: ${told(stable)} years.`);
  if (cohort !== null) lines.push(`Mean age of mothers in one cohort: ${told(cohort)} years.`);
  if (replacement !== null) lines.push(`Years in which numbers multiply by the young in a life: ${told(replacement)}.`);
  return lines;
}

function chanceLines({ stochasticGrowth, growthStandardError, growthRate }: Analysis): string[] {
  const lines: string[] = [];
  if (stochasticGrowth) {
    const { growthRate: withChance, method } = stochasticGrowth;
    lines.push(`With years that differ, the population usually ${change(withChance)} (${method}).`);
  }
  if (growthStandardError !== null) {
    lines.push(
      `From what is not known, the growth rate is ${told(growthRate)} ± ${told(growthStandardError)} (one standard error).`,
    );
  }
  return lines;
}

function equilibriumLines({ equilibrium }: Analysis): string[] {
  if (!equilibrium) return [];
  const lines = equilibrium.states.map(({ total, stable, leadingModulus }) => {
    const back = stable ? 'numbers come back to it' : 'numbers leave it';
    return `Stands still at ${told(total)} animals; ${back} (disturbances times ${told(leadingModulus)} a year).`;
  });
  lines.push(`From almost nobody, the population ${change(equilibrium.invasionGrowth)}.`);
  if (equilibrium.startThreshold) {
    const { lastsAbove } = equilibrium.startThreshold;
    lines.push(`With fewer than ${told(lastsAbove)} animals, made up as at the start, it dies out.`);
  }
  return lines;
}

function blockLines({ blocks, irreducible }: Analysis): string[] {
  if (irreducible || blocks.length < 2) return [];
  return blocks.slice(0, 20).map(({ states, growthRate, feeds }, b) => {
    const names = states.map((state) => `${state.class} in ${state.patch}`);
    const to = feeds.length > 0 ? `feeds group ${listed(feeds.map((feed) => String(feed + 1)))}` : 'feeds no other';
    return `${b + 1}. ${listed(names, 4)}: growth rate ${told(growthRate)}, ${to}.`;
  });
}

function orDash(value: number | null): string {
  return value === null ? '–' : told(value);
}
