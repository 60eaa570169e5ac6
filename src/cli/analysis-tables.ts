// An analysis as tidy tables.
import type { Analysis } from '../analysis/schema.ts';
import type { Cell, Column, Table } from './tables.ts';

const patch: Column = { name: 'patch', unit: '', meaning: 'Name of the patch.' };
const className: Column = { name: 'class', unit: '', meaning: 'Name of the class.' };
const column = (name: string, unit: string, meaning: string): Column => ({ name, unit, meaning });
const perYear = 'a year';

const fromTo: readonly Column[] = [
  column('from_patch', '', 'Patch of the animals now.'),
  column('from_class', '', 'Their class.'),
  column('to_patch', '', 'Patch of what they are, or leave, a year later.'),
  column('to_class', '', 'Its class.'),
];

/** One table for each list of the analysis that has an answer; the rest is in results.json. */
export function analysisTables(analysis: Analysis): readonly Table[] {
  return [
    growthTable(analysis),
    statesTable(analysis),
    patchTable(analysis),
    entryTable(analysis),
    parameterTable(analysis),
    linkTable(analysis),
    fallingTable(analysis),
    invasionTable(analysis),
    entryDifferenceTable(analysis),
    numberDifferenceTable(analysis),
  ].filter(({ rows }) => rows.length > 0);
}

function growthTable({ at, growthRate, dampingRatio, period, netReproductiveRate, generationTime }: Analysis): Table {
  return {
    name: 'growth',
    columns: [
      column('at', '', 'State at which the matrix was taken: zero, equilibrium or start.'),
      column('growth_rate', perYear, 'Factor by which numbers change in a year, in the long run at mean rates.'),
      column('damping_ratio', perYear, 'Factor by which what is out of proportion fades.'),
      column('period', 'years', 'From wave to wave of what fades slowest; empty without waves.'),
      column('net_reproductive_rate', 'young', 'Young of a newborn in its life.'),
      column('generation_stable', 'years', 'Mean age of mothers in the stable population.'),
      column('generation_cohort', 'years', 'Mean age of mothers in one cohort.'),
      column('generation_replacement', 'years', 'In which numbers multiply by the net reproductive rate.'),
    ],
    rows: [
      [
        at,
        growthRate,
        dampingRatio,
        period,
        netReproductiveRate,
        generationTime?.stable ?? null,
        generationTime?.cohort ?? null,
        generationTime?.replacement ?? null,
      ],
    ],
  };
}

function statesTable({ stableDistribution, reproductiveValue, lifetimes }: Analysis): Table {
  const named = stableDistribution ?? lifetimes ?? [];
  return {
    name: 'states',
    columns: [
      patch,
      className,
      column('share', 'share', 'Share of the stable distribution.'),
      {
        ...column('reproductive_value', '', 'Worth of one animal for the future; the first that counts has 1.'),
        type: 'number',
      },
      column('life_expectancy', 'counts', 'Counts until death, the present one included.'),
      column('life_variance', 'counts squared', 'Variance of that between animals.'),
    ],
    rows: named.map((state, s): readonly Cell[] => [
      state.patch,
      state.class,
      stableDistribution?.[s]?.share ?? null,
      reproductiveValue?.[s]?.value ?? null,
      lifetimes?.[s]?.expectancy ?? null,
      lifetimes?.[s]?.variance ?? null,
    ]),
  };
}

function patchTable({ patches, metapopulationCapacity }: Analysis): Table {
  const value = (name: string): number | null =>
    metapopulationCapacity?.patchValues?.find((one) => one.patch === name)?.value ?? null;
  return {
    name: 'patches',
    columns: [
      patch,
      column('share', 'share', 'Share of the stable distribution.'),
      column('growth_alone', perYear, 'Growth rate if all that leave were lost and nobody came.'),
      column(
        'contribution',
        'animals',
        'Next year anywhere for each animal now, made up as in the stable distribution.',
      ),
      column('contribution_now', 'animals', 'The same, made up as at the start.'),
      column('self_recruitment', 'animals', 'As contribution, counting only those in the patch itself.'),
      column('role', '', 'source, sink or undecided.'),
      column('removal_loss', perYear, 'Growth rate lost when the patch and its animals are taken away.'),
      column('network_value', 'km4', 'What the patch adds to the metapopulation capacity.'),
    ],
    rows: (patches ?? []).map((one): readonly Cell[] => [
      one.patch,
      one.share,
      one.growthAlone,
      one.contribution,
      one.contributionNow,
      one.selfRecruitment,
      one.role,
      one.removalLoss,
      value(one.patch),
    ]),
  };
}

function entryTable({ entries }: Analysis): Table {
  return {
    name: 'entries',
    columns: [
      ...fromTo,
      column('value', 'animals', 'Next year for each animal now.'),
      column('sensitivity', perYear, 'Growth rate per unit of the entry.'),
      column('elasticity', 'share', 'Share of the growth rate per share of the entry; they sum to 1.'),
    ],
    rows: (entries ?? []).map(({ from, to, value, sensitivity, elasticity }): readonly Cell[] => [
      ...[from.patch, from.class, to.patch, to.class],
      ...[value, sensitivity, elasticity],
    ]),
  };
}

function parameterTable({ parameters }: Analysis): Table {
  return {
    name: 'sensitivities',
    columns: [
      column('parameter', '', 'Name of the parameter.'),
      column('value', 'as in the model', 'Value that was used.'),
      column('sensitivity', perYear, 'Growth rate per unit of the parameter.'),
      column('elasticity', 'share', 'Share of the growth rate per share of the parameter.'),
      column(
        'solved_anew',
        perYear,
        'As sensitivity, with the strength of crowding solved anew so that capacities stay.',
      ),
      column('exact', '', 'true for exact derivatives, false for differences.'),
    ],
    rows: (parameters ?? []).map((one): readonly Cell[] => [
      ...[one.name, one.value, one.sensitivity, one.elasticity, one.sensitivitySolvedAnew],
      String(one.exact),
    ]),
  };
}

function linkTable({ links }: Analysis): Table {
  return {
    name: 'links',
    columns: [
      column('phase', '', 'Dispersal by its name.'),
      column('from', '', 'Patch that is left.'),
      column('to', '', 'Patch that is reached.'),
      className,
      column('share', 'share', 'Of the animals present, those that arrive over the link.'),
      column('sensitivity', perYear, 'Growth rate per unit of the share, nothing else changed.'),
      column('instead_of_staying', perYear, 'The same where those who go would otherwise have stayed.'),
      column('removal_loss', perYear, 'Growth rate lost when those who would have arrived are lost.'),
      column('exact', '', 'true where that was computed whole, false where it is share times sensitivity.'),
    ],
    rows: (links ?? []).map((link): readonly Cell[] => [
      ...[link.phase, link.from, link.to, link.class],
      ...[link.share, link.sensitivity, link.sensitivityInsteadOfStaying, link.removalLoss],
      String(link.exact),
    ]),
  };
}

function fallingTable({ fallingBelow }: Analysis): Table {
  return {
    name: 'falling-below',
    columns: [
      column('outcome', '', "The author's name."),
      column('year', 'calendar year', 'Of the count.'),
      column('diffusion', 'chance', 'Of having fallen below by then, by the diffusion curve for yearly counts.'),
      column('simulated', 'share', 'Of the runs that had fallen below by then.'),
      column('lower', 'share', 'Of a 95 % band that holds for the whole simulated curve at once.'),
      column('upper', 'share', 'Of the same band.'),
    ],
    rows: (fallingBelow ?? []).flatMap(({ outcome, years }) =>
      years.map(({ year, diffusion, simulated, lower, upper }): readonly Cell[] => [
        ...[outcome, year, diffusion],
        ...[simulated, lower, upper],
      ]),
    ),
  };
}

function invasionTable({ invasion }: Analysis): Table {
  return {
    name: 'invasion',
    columns: [...fromTo, column('value', 'animals', 'Next year for each animal now, where almost nobody is.')],
    rows: (invasion?.entries ?? []).map(({ from, to, value }): readonly Cell[] => [
      ...[from.patch, from.class, to.patch, to.class],
      value,
    ]),
  };
}

function entryDifferenceTable({ ltre }: Analysis): Table {
  return {
    name: 'entry-differences',
    columns: [
      ...fromTo,
      column('difference', 'animals', 'Entry of the model less that of what it is compared with.'),
      column('contribution', perYear, 'What it adds to the growth rate less that of what it is compared with.'),
    ],
    rows: (ltre?.contributions ?? []).map(({ from, to, difference, contribution }): readonly Cell[] => [
      ...[from.patch, from.class, to.patch, to.class],
      ...[difference, contribution],
    ]),
  };
}

function numberDifferenceTable({ ltre }: Analysis): Table {
  return {
    name: 'number-differences',
    columns: [
      column('parameter', '', 'Name of a parameter that differs.'),
      column('value', 'as in the model', 'Value in the model.'),
      column('reference', 'as in the model', 'Value in what it is compared with.'),
      column('contribution', perYear, 'What it adds to the growth rate less that of what it is compared with.'),
    ],
    rows: (ltre?.parameters ?? []).map((one): readonly Cell[] => [
      ...[one.name, one.value, one.reference, one.contribution],
    ]),
  };
}
