// Stages of a fixed duration: the share that goes on rests on growth, and growth on the share. Solved together.
import type { Landscape } from '../landscape/landscape.ts';
import type { AgeingPhase, Model } from '../model/model.ts';
import { leading } from '../numeric/leading.ts';
import { findRoot } from '../numeric/root.ts';
import { fixedDurationAdvance } from '../numeric/stage-duration.ts';
import type { Finding } from '../spec/finding.ts';
import { buildBlock } from './block.ts';

export interface SolvedStages {
  readonly model: Model;
  readonly findings: readonly Finding[];
}

const mostWidenings = 20;

/**
 * The model with the shares of its fixed stages at the growth rate of the whole landscape near zero, without crowding or Allee
 * factors and at the rates of the first year. Told where nothing grows or no growth rate agrees with its shares.
 */
export function solveStages(model: Model, landscape: Landscape): SolvedStages {
  const fixed = model.phases.some((phase) => phase.kind === 'ageing' && phase.stages?.some(({ as }) => as === 'fixed'));
  if (!fixed) return { model, findings: [] };
  const growthRate = agreeingGrowth((rate) => growthWithout(withAdvance(model, rate), landscape));
  if (growthRate !== null) return { model: withAdvance(model, growthRate), findings: [] };
  return {
    model,
    findings: [
      {
        severity: 'error',
        code: 'stage-duration',
        message: 'No growth rate agrees with stages of a fixed duration: the animals only age and die out',
        path: ['duration'],
        part: 'key',
        details: {
          reason: 'The share that goes on each year rests on how the ages are spread in a stage, and that on growth.',
          fix: 'Take `as: geometric`, or give the classes year by year.',
        },
      },
    ],
  };
}

/** Near zero, as if nobody crowded and no mate were ever lacking. */
export function growthWithout(model: Model, landscape: Landscape): number {
  const free = { model: { ...model, crowding: [] }, landscape, coefficients: [] };
  return leading(buildBlock(free, 'zero').matrix).growthRate;
}

/**
 * The rate that gives itself back; null where there is none. A faster growth makes the young of a stage more, fewer go on, and that
 * lowers growth: the rate lies between 1 and what 1 gives. Where going on is no gain it lies beyond, and is looked for there.
 */
function agreeingGrowth(next: (rate: number) => number): number | null {
  const first = next(1);
  if (!(first > 0)) return null;
  if (first === 1) return 1;
  const excess = (rate: number): number => next(rate) - rate;
  for (let far = first, widening = 0; widening < mostWidenings; far *= first > 1 ? 2 : 0.5, widening++) {
    const rate = findRoot(excess, { low: 1, high: far });
    if (rate !== null) return rate;
  }
  return null;
}

function withAdvance(model: Model, growthRate: number): Model {
  const phases = model.phases.map((phase) => (phase.kind === 'ageing' ? aged(model, phase, growthRate) : phase));
  return { ...model, phases };
}

function aged(model: Model, phase: AgeingPhase, growthRate: number): AgeingPhase {
  const n = model.classes.length;
  const inPatches = Float64Array.from({ length: model.patches.length * n }, (_, i) => phase.advance[i % n] ?? 0);
  for (const { class: c, years, as } of phase.stages ?? []) {
    if (as !== 'fixed') continue;
    model.patches.forEach((_, p) => {
      const survival = survivalOfYear(model, p * n + c);
      inPatches[p * n + c] = fixedDurationAdvance({ survival, duration: years, growthRate });
    });
  }
  const alike = inPatches.every((share, i) => share === inPatches[i % n]);
  return alike ? { ...phase, advance: inPatches.slice(0, n) } : { ...phase, advanceIn: inPatches };
}

/** Of a patch and class (p * C + c): through all survivals of the year, at the rates of the first. */
export function survivalOfYear({ phases }: Model, place: number): number {
  return phases.reduce(
    (product, phase) => (phase.kind === 'survival' ? product * (phase.survival.epochs[0]?.[place] ?? 0) : product),
    1,
  );
}
