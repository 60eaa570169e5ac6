// What an analysis says in sentences under its tables; terms of the trade stand in brackets.
import type { Analysis } from '../../analysis/schema.ts';
import { change, listed, times, told, years, yearsLong } from './words.ts';

export function firstYears({ transients, dampingRatio, period }: Analysis): readonly string[] {
  if (transients === null) return [];
  const { reactivity, firstStepAttenuation, highest, lowest, stepsFollowed, lasting, kreiss, fromStart } = transients;
  const lines = [
    `First-year jump or drop (reactivity, first-step attenuation): after a year, numbers can be ${told(firstStepAttenuation)} to ` +
      `${times(reactivity)} as many as with steady growth, by who is there at the start.`,
    `Highest rise, deepest fall (amplification, attenuation) within ${years(stepsFollowed)}: ` +
      `${extreme(highest, lasting?.gain)}, ${extreme(lowest, lasting?.loss)}.`,
  ];
  if (kreiss !== null) {
    lines.push(
      `Whatever the year, some start rises at least ${times(kreiss.atLeast)} and some falls to at most ${times(kreiss.atMost)} ` +
        `(Kreiss bounds).`,
    );
  }
  if (lasting !== null) {
    lines.push(`Lasting gain or loss (inertia): for good, ${told(lasting.loss)} to ${times(lasting.gain)} as many.`);
  }
  return [...lines, ...ownStart(fromStart), ...fading(dampingRatio, period)];
}

/** What is only approached, for good, has no year. */
function extreme({ times: size, step }: { readonly times: number; readonly step: number }, forGood = NaN): string {
  if (size < 1e-9) return 'hardly any left in the long run';
  const when = Math.abs(size - forGood) <= 1e-3 * size ? 'in the long run' : `after ${years(step)}`;
  return `${times(size)} as many ${when}`;
}

function ownStart(fromStart: NonNullable<Analysis['transients']>['fromStart']): readonly string[] {
  if (fromStart === null || fromStart.lasting === null) return [];
  const { lasting, stepsToSettle } = fromStart;
  const settles =
    stepsToSettle === null
      ? ''
      : stepsToSettle === 0
        ? ', within 5 % of that from the start on'
        : `; years to settle within 5 % of that: ${stepsToSettle}`;
  return [`The actual start comes to ${times(lasting)} as many as steady growth from it${settles}.`];
}

function fading(dampingRatio: number | null, period: number | null): readonly string[] {
  if (dampingRatio === null) return [];
  if (dampingRatio === 1) return ['What is out of proportion never fades (damping ratio 1).'];
  const waves = period === null ? '' : `, in waves of ${yearsLong(period)}`;
  return [`What is out of proportion fades by a factor of ${told(dampingRatio)} a year (damping ratio)${waves}.`];
}

export function lifeWords({ netReproductiveRate, generationTime, lifetimes }: Analysis): readonly string[] {
  const lines: string[] = [];
  if (netReproductiveRate !== null) {
    lines.push(`A newborn leaves ${told(netReproductiveRate)} young in its life (net reproductive rate).`);
  }
  if (generationTime !== null) {
    const { cohort, stable, replacement } = generationTime;
    const times = [
      stable === null ? '' : `${yearsLong(stable)} as the mean age of mothers in the stable population`,
      cohort === null ? '' : `${yearsLong(cohort)} as that in one cohort`,
      replacement === null ? '' : `${yearsLong(replacement)} in which numbers multiply by the young in a life`,
    ].filter((text) => text !== '');
    if (times.length > 0) lines.push(`Generation time, by its definition: ${times.join('; ')}.`);
  }
  return [...lines, ...expectancies(lifetimes)];
}

/** The extremes over the patches, class by class. */
function expectancies(lifetimes: Analysis['lifetimes']): readonly string[] {
  if (lifetimes === null) return [];
  const classes = [...new Set(lifetimes.map((one) => one.class))];
  const parts = classes.map((name) => {
    const own = lifetimes.filter((one) => one.class === name).map(({ expectancy }) => expectancy);
    const [least, most] = [Math.min(...own), Math.max(...own)].map(told);
    return `${name} ${least === most ? least : `${least} to ${most}`}`;
  });
  return [`Counts that an animal can expect to be alive at, this one included: ${parts.join(', ')}.`];
}

export function chanceWords({ stochasticGrowth, growthStandardError, growthRate }: Analysis): readonly string[] {
  const lines: string[] = [];
  if (stochasticGrowth !== null) {
    lines.push(...longRun(stochasticGrowth));
  }
  if (growthStandardError === 0) {
    lines.push('None of the numbers that are not exactly known moves the growth rate.');
  } else if (growthStandardError !== null) {
    lines.push(
      `From what is not known, the growth rate is ${told(growthRate)} give or take ${told(growthStandardError)} (one standard error).`,
    );
  }
  return lines;
}

function longRun({ approximation, simulated }: NonNullable<Analysis['stochasticGrowth']>): readonly string[] {
  const measured =
    simulated === null
      ? []
      : [
          `Simulated over ${told(simulated.years)} years, it ${change(simulated.growthRate)} in the long run (ln of the growth rate ` +
            `${told(simulated.logGrowth)} ± ${told(simulated.standardError)}).`,
        ];
  if (approximation === null) return measured;
  const { growthRate, yearlyVariance, method, leftOut } = approximation;
  const without = leftOut.length === 0 ? '' : ` What ${listed(leftOut)} takes is in the mean year only.`;
  return [
    `With years that differ, a population of few usually ${change(growthRate)} in the long run (by approximation: ${method}); the ` +
      `logarithm of numbers strays by ${told(Math.sqrt(yearlyVariance))} times the root of the years.${without}`,
    ...measured,
  ];
}

/** Patches named in a list of a terminal. */
const mostPatches = 6;

export function invasionWords({ invasion, stochasticGrowth, blocks }: Analysis): readonly string[] {
  if (invasion === null) return [];
  const { growthRate, factors, patches, makeUp } = invasion;
  const withChance = stochasticGrowth?.simulated?.growthRate ?? null;
  const lines = [
    `A few newcomers, where nobody is: their number ${change(growthRate)} in mean years (invasion growth rate ` +
      `${told(growthRate)})${fateOf(growthRate, withChance)}.`,
    ...factors.map((one) => `Among so few, ${one.crowding} ${leaves(one)} the rates it acts on.`),
  ];
  const lasting = patches.filter((patch) => patch.growthAlone > 1).map(({ patch }) => patch);
  if (patches.length > 1) {
    lines.push(
      `In one patch alone, with whoever leaves lost, a few would increase in mean years in ${listed(lasting, mostPatches)} ` +
        `(${lasting.length} of ${patches.length} patches).`,
    );
  }
  if (makeUp === null && blocks.length > 1) {
    lines.push('What they come to be made up of depends on where they come in: not every state can reach every other.');
  }
  return [...lines, 'The matrix they grow by (invasion matrix) is listed under `invasion` with --json and --out.'];
}

/** Chance decides where it is known. */
function fateOf(growthRate: number, withChance: number | null): string {
  if (growthRate > 1 && withChance !== null && withChance < 1)
    return `; but with years that differ it ${change(withChance)} in the long run, so most that come in die out`;
  if (growthRate > 1) return ', so the species can come in, and come back after a loss';
  return growthRate < 1 ? ', so a few die out by themselves' : '';
}

function leaves({ least, most }: { readonly least: number; readonly most: number }): string {
  if (least === most && least === 1) return 'takes nothing from';
  if (least === most && least === 0) return 'leaves nothing of';
  return `leaves ${least === most ? told(least) : `${told(least)} to ${told(most)}`} of`;
}

export function equilibriumWords({ equilibrium }: Analysis): readonly string[] {
  if (equilibrium === null) return [];
  const lines = equilibrium.states.map(({ total, stable, leadingModulus }) => {
    if (total === 0) return `With nobody: ${stable ? 'a few that come do not stay' : 'a few that come can settle'}.`;
    const back = stable ? 'numbers come back to it' : 'numbers leave it';
    const left = leadingModulus < 1e-9 ? 'gone' : `${told(leadingModulus)} of itself`;
    return `Numbers stand still at ${told(total)} animals; ${back} (a small disturbance is ${left} a year later).`;
  });
  if (equilibrium.startThreshold !== null) {
    lines.push(
      `With fewer than ${told(equilibrium.startThreshold.lastsAbove)} animals, made up as at the start, it dies out.`,
    );
  }
  return lines;
}

export function networkWords({ metapopulationCapacity, spread }: Analysis): readonly string[] {
  const lines: string[] = [];
  if (metapopulationCapacity !== null) {
    const { capacity, patchValues } = metapopulationCapacity;
    const largest = [...(patchValues ?? [])].sort((a, b) => b.value - a.value).slice(0, 3);
    const names = largest.length === 0 ? '' : `; most of it rests on ${listed(largest.map(({ patch }) => patch))}`;
    lines.push(`Metapopulation capacity, from areas, distances and the kernel: ${told(capacity)} km⁴${names}.`);
  }
  return [...lines, ...spreadWords(spread)];
}

/** Kinds of land listed in a terminal. */
const mostLands = 5;

function spreadWords(spread: Analysis['spread']): readonly string[] {
  if (spread === null) return [];
  const fastest = [...spread].sort((a, b) => b.speedKm - a.speedKm);
  const [first] = fastest;
  const most = [...(first?.parameters ?? [])].sort((a, b) => Math.abs(b.elasticity) - Math.abs(a.elasticity))[0];
  const speeds = new Map<string, string[]>();
  for (const { patch, speedKm } of fastest) speeds.set(told(speedKm), [...(speeds.get(told(speedKm)) ?? []), patch]);
  const shown = [...speeds]
    .slice(0, mostLands)
    .map(([speed, patches]) => `${speed} km a year like ${listed(patches, 3)}`);
  const more = speeds.size - shown.length;
  const list = `Over empty land, the edge of a population advances ${shown.join('; ')}${more > 0 ? '; elsewhere slower' : ''}.`;
  if (first === undefined || most === undefined) return [list];
  return [
    list,
    `Like ${first.patch}, the speed depends most on ${most.name}: 1 % more of it changes it by ${told(most.elasticity)} %.`,
  ];
}

/** Groups listed in a terminal. */
const mostGroups = 20;

export function groupWords({ blocks, irreducible }: Analysis): readonly string[] {
  if (irreducible || blocks.length < 2) return [];
  const lines = blocks.slice(0, mostGroups).map(({ states, growthRate, imprimitivity, feeds }, b) => {
    const names = states.map((state) => `${state.class} in ${state.patch}`);
    const to = feeds.length > 0 ? `feeds group ${listed(feeds.map((feed) => String(feed + 1)))}` : 'feeds no other';
    const swings = imprimitivity > 1 ? `, swinging with a period of ${years(imprimitivity)}` : '';
    return `${b + 1}. ${listed(names, 4)}: growth rate ${told(growthRate)}${swings}, ${to}.`;
  });
  const more = blocks.length - lines.length;
  return more > 0 ? [...lines, `and ${more} more groups (in full with --json)`] : lines;
}
