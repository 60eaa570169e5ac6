// What an analysis does not answer, in words and with the reason, once for all answers with the same one.
import type { Analysis } from '../../analysis/schema.ts';
import { listed } from './words.ts';

/** What is missing since nobody asked, or since there is nothing of it, needs no line. */
const quiet: ReadonlySet<string> = new Set(['eigenvalues', 'ltre', 'period']);

const names: Readonly<Record<string, string>> = {
  dampingRatio: 'how fast it settles',
  netReproductiveRate: 'young in a life',
  generationTime: 'generation time',
  lifetimes: 'length of lives',
  stableDistribution: 'stable distribution',
  reproductiveValue: 'reproductive value',
  entries: 'what single entries do',
  parameters: 'what named numbers do',
  patches: 'what each patch does',
  'patches.removalLoss': 'growth lost without some patches',
  links: 'what each link does',
  transients: 'the first years',
  stochasticGrowth: 'growth with chance',
  'stochasticGrowth.approximation': 'growth with chance by approximation',
  'stochasticGrowth.simulated': 'growth with chance by simulation',
  fallingBelow: 'the diffusion curve',
  growthStandardError: 'standard error of the growth',
  invasion: 'another matrix for a few newcomers',
  equilibrium: 'where numbers stand still',
  metapopulationCapacity: 'metapopulation capacity',
  spread: 'speed of spread',
};

/** A field within an answer about one outcome has the name of the outcome behind its point. */
function nameOf(field: string): string {
  const [answer = '', ...outcome] = field.split('.');
  return names[field] ?? `${names[answer] ?? answer}${outcome.length === 0 ? '' : ` of ${outcome.join('.')}`}`;
}

export function unanswered({ reasons }: Analysis): readonly string[] {
  const fields = new Map<string, string[]>();
  for (const [field, reason] of Object.entries(reasons)) {
    if (!quiet.has(field)) fields.set(reason, [...(fields.get(reason) ?? []), nameOf(field)]);
  }
  return [...fields].map(([reason, asked]) => {
    const text = listed(asked, 20);
    return `${text.charAt(0).toUpperCase()}${text.slice(1)}: ${reason.charAt(0).toLowerCase()}${reason.slice(1)}`;
  });
}
