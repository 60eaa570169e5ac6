// The whole analysis of a block projection matrix, as one object; what does not apply is null with the reason beside it.
import { leading, type Leading } from '../numeric/leading.ts';
import { because, collectReasons, type Answer } from './answer.ts';
import { equilibriumAnswer } from './answer-equilibrium.ts';
import { fallingAnswer } from './answer-falling.ts';
import {
  blocksAnswer,
  distributionAnswer,
  entriesAnswer,
  lifeAnswers,
  parametersAnswer,
  standardErrorAnswer,
  stochasticAnswer,
  transientsAnswer,
  worthAnswer,
} from './answer-growth.ts';
import { invasionAnswer } from './answer-invasion.ts';
import {
  capacityAnswer,
  differenceAnswer,
  linksAnswer,
  patchesAnswer,
  removalsOf,
  spreadAnswer,
} from './answer-landscape.ts';
import { cautionsFor } from './cautions.ts';
import type { AnalysisInput } from './input.ts';
import type { Analysis } from './schema.ts';
import { vectorsOf, type Vectors } from './sensitivity.ts';
import { largestDenseBlock, spectrum } from './spectrum.ts';

/** Cost: seconds for 400 patches of 8 classes; most of it for taking away patches and links one by one. */
export function analyse(input: AnalysisInput): Analysis {
  const { block } = input;
  const found = leading(block.matrix);
  const vectors = vectorsOf(found);
  const { told, take } = collectReasons();
  const withVectors = <T>(ask: (vectors: Vectors) => Answer<T>): Answer<T> =>
    vectors ? ask(vectors) : because(found.reason ?? 'There is no single stable distribution.');
  const plain = <T>(ask: (vectors: Vectors) => T): Answer<T> => withVectors((given) => ({ value: ask(given) }));
  const around = vectors && removalsOf(input, vectors);
  const all = spectrum(block.matrix, found);
  const tooLarge = `A block has more than ${largestDenseBlock} states.`;
  const life = lifeAnswers(block, input.split, vectors);
  const fromSpectrum = (value: number | null | undefined, without: string): Answer<number> =>
    value === null || value === undefined ? because(all ? without : tooLarge) : { value };
  // Patches use what links have asked of the inverse.
  const links = take(
    'links',
    plain((given) => linksAnswer(input, { vectors: given, around })),
  );
  const patches = take(
    'patches',
    plain((given) => patchesAnswer(input, { vectors: given, around })),
  );
  if (patches?.some(({ removalLoss }) => removalLoss === null) === true) take('patches.removalLoss', because(tooMany));
  return {
    format: 'skein-analysis/1',
    at: block.at,
    growthRate: found.growthRate,
    dampingRatio: take(
      'dampingRatio',
      fromSpectrum(all?.dampingRatio, 'There is no second eigenvalue to compare with.'),
    ),
    period: take('period', fromSpectrum(all?.oscillationSteps, 'Numbers settle without waves.')),
    eigenvalues: take('eigenvalues', eigenvaluesAnswer(input, all)),
    irreducible: found.irreducible,
    primitive: found.primitive,
    imprimitivity: found.period,
    blocks: blocksAnswer(block, found),
    netReproductiveRate: take('netReproductiveRate', life.netReproductiveRate),
    generationTime: take('generationTime', life.generationTime),
    lifetimes: take('lifetimes', life.lifetimes),
    stableDistribution: take(
      'stableDistribution',
      plain((given) => distributionAnswer(block, given)),
    ),
    reproductiveValue: take(
      'reproductiveValue',
      plain((given) => worthAnswer(block, given)),
    ),
    entries: take(
      'entries',
      plain((given) => entriesAnswer(block, given)),
    ),
    parameters: take(
      'parameters',
      plain((given) => parametersAnswer(input.parameterTangents ?? [], given)),
    ),
    patches,
    links,
    transients: take(
      'transients',
      plain((given) => transientsAnswer(input, given, settles(found))),
    ),
    stochasticGrowth: take('stochasticGrowth', stochasticAnswer(input, take)),
    fallingBelow: take('fallingBelow', fallingAnswer(input, vectors, take)),
    growthStandardError: take(
      'growthStandardError',
      withVectors((given) => standardErrorAnswer(input, given)),
    ),
    invasion: take('invasion', invasionAnswer(input)),
    equilibrium: take('equilibrium', equilibriumAnswer(input)),
    metapopulationCapacity: take('metapopulationCapacity', capacityAnswer(input)),
    spread: take('spread', spreadAnswer(input)),
    ltre: take('ltre', differenceAnswer(input)),
    cautions: cautionsFor({
      changesByYear: input.changesByYear ?? false,
      patches: block.patches.length,
      losslessDispersal: input.losslessDispersal ?? false,
      irreducible: found.irreducible,
      period: found.period,
      entries: block.matrix.values.length,
      links: links?.length ?? 0,
      linksAbout: links?.filter(({ exact }) => !exact).length ?? 0,
      linearised: input.linearised ?? false,
    }),
    reasons: told,
  };
}

const tooMany =
  'Taking every patch away would take minutes for so many states; it was done for those that matter most to the growth.';

/** Numbers come to a steady growth: no part of the life cycle that grows as fast as the whole swings for ever. */
function settles({ blocks, growthRate }: Leading): boolean {
  return blocks.every((block) => block.growthRate < growthRate || block.period === 1);
}

function eigenvaluesAnswer(
  { wantEigenvalues }: AnalysisInput,
  all: ReturnType<typeof spectrum>,
): Answer<NonNullable<Analysis['eigenvalues']>> {
  if (!wantEigenvalues) return because('Not asked for.');
  return all
    ? { value: all.eigenvalues.map(({ re, im }) => ({ re, im })) }
    : because(`A block has more than ${largestDenseBlock} states.`);
}
