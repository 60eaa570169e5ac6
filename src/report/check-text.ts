// What `skein check` says of a model that has no errors: what was understood, every default, and where patches stand still.
import type { DispersalReach, PatchStanding } from '../analysis/standing.ts';
import type { WeatherFacts } from '../analysis/weather.ts';
import type { Landscape } from '../landscape/landscape.ts';
import { meanOverScale, shareBeyond, weightRatio } from '../model/kernel-shape.ts';
import { advanceAt } from '../compile/advance.ts';
import type { AgeingPhase, BreedingPhase, DispersalPhase, Model, Phase } from '../model/model.ts';
import { percent } from '../view/number.ts';
import { areaWords, placesWords } from './places-text.ts';
import { litterWords, matingWords } from './breeding-words.ts';
import { handlingWords } from './handling-words.ts';
import { fixed } from './rounded.ts';
import { catastropheWords } from './catastrophe-words.ts';
import { uncertaintyWords } from './uncertainty-words.ts';
import { weatherWords } from './weather-words.ts';
import { bold, columnsOf, printable, wrap, type TextStyle } from './terminal.ts';

export interface Understood {
  readonly model: Model;
  readonly landscape: Landscape;
  readonly startAnimals: number;
  readonly standing: readonly PatchStanding[];
  readonly reach: readonly DispersalReach[];
  /** Growth of the linked system near zero. */
  readonly growthRate: number;
  /** Null where nothing varies from year to year. */
  readonly weather: WeatherFacts | null;
}

export function checkText(understood: Understood, style: TextStyle): string {
  const { model } = understood;
  return [
    bold(printable(model.title), style),
    wrap(sizeWords(understood), style),
    section(
      'The year, from count to count',
      model.phases.map((phase) => phaseWords(model, phase)),
      style,
    ),
    section('Where the patches lie', placesWords(model), style),
    section(
      'Dispersal',
      model.phases.flatMap((phase) => dispersalWords(understood, phase)),
      style,
    ),
    section('Variation from year to year', understood.weather === null ? [] : weatherWords(understood.weather), style),
    section('What is not known', uncertaintyWords(model.uncertainty), style),
    section('Catastrophes', catastropheWords(model, understood.landscape), style),
    standingTable(understood, style),
    section(
      'Outcomes',
      model.outcomes.map(({ name, definition }) => `${name}: ${definition}`),
      style,
    ),
    section('Defaults that were used', model.defaults, style),
  ]
    .filter((block) => block !== '')
    .join('\n\n');
}

function section(title: string, lines: readonly string[], style: TextStyle): string {
  if (lines.length === 0) return '';
  return [bold(title, style), ...lines.map((line) => wrap(line, style, '  '))].join('\n');
}

function sizeWords({ model, startAnimals, growthRate }: Understood): string {
  const patches = model.patches.length === 1 ? '1 patch' : `${model.patches.length} patches`;
  const classes = model.classes.length === 1 ? '1 class' : `${model.classes.length} classes`;
  const counts = model.counts === 'females' ? 'females' : 'animals of both sexes';
  const change = fixed((growthRate - 1) * 100, 2);
  return (
    `${patches}, ${classes} (${model.classes.join(', ')}), ${model.steps} years from ${model.firstYear} on; ` +
    `${startAnimals} ${counts} at the start. Near zero the whole changes by ${change} % a year (growth rate ${fixed(growthRate, 4)}).`
  );
}

function phaseWords(model: Model, phase: Phase): string {
  switch (phase.kind) {
    case 'count':
      return 'count: abundance is read, thresholds apply';
    case 'survival':
      if (model.catastrophes.some(({ name }) => name === phase.name))
        return `${phase.name}: takes animals where it is on`;
      return `${phase.name}: each animal lives on or dies`;
    case 'breeding':
      return `${phase.name}: those alive now have young, born as ${model.classes.filter((_, c) => (phase.into[c] ?? 0) > 0).join(', ')}${breedingWords(phase)}`;
    case 'ageing': {
      const named = (chosen: (c: number) => boolean) => model.classes.filter((_, c) => chosen(c)).join(', ');
      const [stay, leave] = [named((c) => phase.next[c] === c), named((c) => phase.next[c] === -1)];
      const ends = [...(stay === '' ? [] : [`${stay} stays`]), ...(leave === '' ? [] : [`${leave} leaves the model`])];
      return `ageing: each goes on to the next class; ${[...stageWords(model, phase), ...ends].join('; ')}`;
    }
    case 'demography':
      return 'demography: fates and births of a whole year at once';
    case 'dispersal': {
      const movers = model.classes.filter((_, c) => phase.moves[c] === 1).join(', ');
      return `${phase.name}: ${movers} may leave for other patches`;
    }
    case 'ceiling': {
      const counted = model.classes.filter((_, c) => phase.counted[c] === 1).join(', ');
      return `${phase.name}: where there are more ${counted} than the capacity, ${surplusWords[phase.takes ?? 'at random']}`;
    }
    case 'take':
    case 'move':
    case 'add':
      return `${phase.name}: ${handlingWords(phase, model)}`;
  }
}

function stageWords({ classes, patches }: Model, phase: AgeingPhase): readonly string[] {
  return (phase.stages ?? []).map(({ class: c, years, as }) => {
    const shares = patches.map((_, patch) => advanceAt(phase, { patch, class: c }));
    const [least, most] = [Math.min(...shares), Math.max(...shares)].map((share) => share.toFixed(4));
    const share = least === most ? `${String(most)}` : `${String(least)} to ${String(most)} by patch`;
    const lasts =
      as === 'fixed' ? `lasts ${String(years)} years for all alike` : `lasts ${String(years)} years in the mean`;
    return `${String(classes[c])} ${lasts}, a share of ${share} goes on each year`;
  });
}

function breedingWords({ offspring, mating, waits }: BreedingPhase): string {
  const litters = offspring === undefined ? [] : [litterWords(offspring)];
  const mates = mating === undefined ? [] : [matingWords(mating)];
  const places = waits === undefined ? [] : [`no more breed than \`${waits.name}\` has room for`];
  return [...litters, ...mates, ...places].map((words) => `; ${words}`).join('');
}

const surplusWords = {
  'at random': 'the surplus is removed at random',
  'youngest first': 'the surplus is removed, the youngest first',
  nobody: 'the surplus waits without breeding',
} as const;

function dispersalWords({ reach }: Understood, phase: Phase): readonly string[] {
  if (phase.kind !== 'dispersal') return [];
  const own = reach.find((one) => one.phase === phase.name);
  const realised =
    own?.realisedMeanKm === undefined || own.realisedMeanKm === null
      ? ''
      : ` Between these patches, arrivals have come ${fixed(own.realisedMeanKm, 2)} km on average.`;
  const lost = own === undefined ? '' : ` Of the leavers ${percent(own.lost)} are lost.`;
  return [`${phase.name}: ${ruleWords(phase)}${realised}${lost}`];
}

/** The weight of the kernel at half, once and twice its mean distance (or its scale where it has no mean), and how many go beyond. */
function ruleWords({ rule, links }: DispersalPhase): string {
  const crossings = links === undefined || links.length === 0 ? '' : ` ${linkWords(links.length)}`;
  if (rule.by === 'shares') return `a table of shares.${crossings}`;
  const { kernel, leavers } = rule;
  const meanKm = kernel.scaleKm * meanOverScale(kernel.shape, kernel.shapeNumber);
  const middle = Number.isFinite(meanKm) ? meanKm : kernel.scaleKm;
  const at = [middle / 2, middle, 2 * middle].map((km) => {
    const weight = fixed(weightRatio(kernel, km, 0), 3);
    return `${fixed(km, 2)} km (weight ${weight}; ${percent(shareBeyond(kernel, km))} of moves are longer)`;
  });
  const end = kernel.reachKm === null ? 'no limit' : `nobody goes beyond ${fixed(kernel.reachKm, 2)} km`;
  const mean = Number.isFinite(meanKm) ? `mean ${fixed(meanKm, 2)} km in the plane` : 'without a mean distance';
  const who = leavers === 'all arrive' ? 'all leavers arrive somewhere' : 'leavers may miss every patch';
  return `${kernel.shape} kernel, ${mean}; at ${at.join(', ')}; ${end}; ${who}.${crossings}`;
}

function linkWords(links: number): string {
  return links === 1 ? 'One way has a rule of its own.' : `${links} ways have rules of their own.`;
}

function standingTable({ model, standing }: Understood, style: TextStyle): string {
  const order = [...model.patches.keys()].sort(
    (a, b) => (model.patches[a]?.fileOrder ?? 0) - (model.patches[b]?.fileOrder ?? 0),
  );
  const number = (value: number | null): string => (value === null ? '-' : fixed(value, 1));
  const withAreas = model.patches.some(({ areaKm2 }) => areaKm2 !== null);
  const rows = order.flatMap((p) => {
    const one = standing[p];
    if (one === undefined) return [];
    const area = model.patches[p]?.areaKm2 ?? null;
    const standsAt = [fixed(one.growthAlone, 4), number(one.alone), number(one.linked)];
    return [[one.patch, ...(withAreas ? [area === null ? '-' : areaWords(area)] : []), ...standsAt]];
  });
  const head = ['patch', ...(withAreas ? ['area'] : []), 'growth alone', 'stands still alone at', 'linked at'];
  const table = columnsOf(head, rows.slice(0, 60), style);
  const more = rows.length > 60 ? `\n  and ${rows.length - 60} more patches` : '';
  return `${bold('Patches (all classes, at the count, without chance)', style)}\n${table}${more}`;
}
