// Designs: which points of the space of all factors are looked at. Any point can be asked by its number, so that a million of
// them take no memory and every thread works out its own.
import { keyOfName } from '../../compile/image/keys.ts';
import { isText, levelsOf, valueAtShare, type Columns, type Factor, type FactorColumn, type Value } from './factor.ts';
import { shareOf, wordOf } from './hash.ts';
import { morrisShare, morrisSize } from './morris.ts';
import { shuffled } from './permutation.ts';
import { scrambledWord, sobolSequence } from './sobol.ts';

/** As it stands in the manifest. */
export type DesignPlan =
  /** Every combination; the last factor changes fastest. */
  | { readonly design: 'grid'; readonly factors: readonly Factor[] }
  /** Points of the user's own; null stands for the number of the model. */
  | { readonly design: 'list'; readonly factors: readonly Factor[]; readonly rows: readonly (readonly Value[])[] }
  | {
      readonly design: 'latin hypercube';
      readonly factors: readonly Factor[];
      readonly points: number;
      readonly seed: number;
    }
  | {
      readonly design: 'sobol';
      readonly factors: readonly Factor[];
      readonly points: number;
      readonly seed: number;
      readonly scrambled: boolean;
    }
  /** The base, then each factor through its values while the others stay as they are. */
  | { readonly design: 'one at a time'; readonly factors: readonly Factor[] }
  /** `points` rows of k + 2 points each for shares of variance: A, B, then A with one column of B (Saltelli et al. 2010). */
  | {
      readonly design: 'sobol indices';
      readonly factors: readonly Factor[];
      readonly points: number;
      readonly seed: number;
    }
  /** `points` walks of k + 1 points each, one factor changed at a step (Morris 1991). */
  | { readonly design: 'morris'; readonly factors: readonly Factor[]; readonly points: number; readonly seed: number };

export type DesignName = DesignPlan['design'];

/** Whether the other numbers differ by chance between points with different values of one. */
export function isSampled({ design, factors }: DesignPlan): boolean {
  return design !== 'grid' && design !== 'one at a time' && factors.length > 1;
}

export interface Design {
  readonly plan: DesignPlan;
  /** May be beyond what can be run: check before. */
  readonly size: number;
  /** Values in the order of the factors. */
  at(point: number): readonly Value[];
  /** The same of so many points in a row. */
  columns(first: number, count: number): Columns;
}

/** A sampled design has each number of a point by itself. */
type Points = Pick<Design, 'size'> &
  ({ readonly at: Design['at'] } | { readonly valueAt: (point: number, factor: number) => Value });

export function openDesign(plan: DesignPlan): Design {
  const { factors } = plan;
  const points = pointsOf(plan);
  const at = 'at' in points ? points.at : (point: number) => factors.map((_, k) => points.valueAt(point, k));
  const valueAt = 'valueAt' in points ? points.valueAt : null;
  const columns = (first: number, count: number): Columns => {
    if (valueAt === null) {
      const own = Array.from({ length: count }, (_, i) => at(first + i));
      return factors.map((factor, k) => columnOf(factor, count, (i) => own[i]?.[k] ?? NaN));
    }
    return factors.map((factor, k) => columnOf(factor, count, (i) => valueAt(first + i, k)));
  };
  return { plan, size: points.size, at, columns };
}

function columnOf(factor: Factor, count: number, valueAt: (i: number) => Value): FactorColumn {
  if (isText(factor)) return Array.from({ length: count }, (_, i) => valueAt(i));
  const column = new Float64Array(count);
  for (let i = 0; i < count; i++) column[i] = Number(valueAt(i));
  return column;
}

function pointsOf(plan: DesignPlan): Points {
  const { factors } = plan;
  switch (plan.design) {
    case 'grid':
      return grid(factors.map(levelsOf));
    case 'list':
      return { size: plan.rows.length, at: (point) => plan.rows[point] ?? [] };
    case 'latin hypercube':
      return sampled(factors, plan.points, (point, _, factor) => latinShare(plan, factor, point));
    case 'sobol': {
      const share = sobolShares(factors.length, plan.scrambled ? plan.seed : null);
      return sampled(factors, plan.points, share);
    }
    case 'one at a time':
      return oneAtATime(factors);
    case 'sobol indices':
      return sharesOfVariance(plan);
    case 'morris': {
      const { points, seed } = plan;
      const share = (point: number, k: number) => morrisShare(seed, factors.length, { point, factor: k });
      const size = points * morrisSize(factors.length);
      return sampled(factors, size, (point, k, factor) => inside(factor, share(point, k)));
    }
  }
}

type ShareAt = (point: number, k: number, factor: Factor) => number;

function sampled(factors: readonly Factor[], size: number, shareAt: ShareAt): Points {
  const valueAt = (point: number, k: number): Value => {
    const factor = factors[k];
    return factor === undefined ? NaN : valueAtShare(factor, shareAt(point, k, factor));
  };
  return { size, valueAt };
}

function grid(levels: readonly (readonly Value[])[]): Points {
  const size = levels.reduce((product, own) => product * own.length, 1);
  return {
    size,
    at: (point) => {
      let rest = point;
      const values: Value[] = [];
      for (const own of levels.toReversed()) {
        values.push(own[rest % own.length] ?? NaN);
        rest = Math.floor(rest / own.length);
      }
      return values.reverse();
    },
  };
}

/** The ends of a distribution lie nowhere: its walks keep to the middle 90 %. */
function inside({ range }: Factor, share: number): number {
  return range.by === 'how sure it is' ? 0.05 + 0.9 * share : share;
}

interface Sampled {
  readonly points: number;
  readonly seed: number;
}

/** One point in each of as many slices as there are points (McKay, Beckman & Conover 1979); keyed by the name of the factor. */
function latinShare({ points, seed }: Sampled, { name }: Factor, point: number): number {
  const key = keyOfName(name);
  const slice = shuffled({ seed, key, size: points }, point);
  return (slice + shareOf(wordOf(seed, key, point, 0x51ed270b))) / points;
}

/** In (0, 1): in the middle of its 2^-32. */
function sobolShares(dimensions: number, seed: number | null): (point: number, dimension: number) => number {
  const sequence = sobolSequence(dimensions);
  return (point, dimension) => {
    const word = sequence.word(point, dimension);
    return shareOf(seed === null ? word : scrambledWord(word, seed, dimension));
  };
}

function oneAtATime(factors: readonly Factor[]): Points {
  const base = factors.map((factor) => factor.base);
  const steps = factors.flatMap((factor, k) => levelsOf(factor).map((value) => ({ k, value })));
  return {
    size: 1 + steps.length,
    at: (point) => {
      const step = steps[point - 1];
      return step === undefined ? base : base.map((value, k) => (k === step.k ? step.value : value));
    },
  };
}

/** Point j (k + 2) is A_j, the next B_j, then A_j with column i of B_j; A and B are the halves of one scrambled Sobol' point. */
function sharesOfVariance({ factors, points, seed }: Extract<DesignPlan, { design: 'sobol indices' }>): Points {
  const k = factors.length;
  const share = sobolShares(2 * k, seed);
  return sampled(factors, points * (k + 2), (point, i) => {
    const [row, column] = [Math.floor(point / (k + 2)), point % (k + 2)];
    return share(row, column === 1 || column === i + 2 ? k + i : i);
  });
}
