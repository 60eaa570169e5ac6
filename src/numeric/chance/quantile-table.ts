// A table of a distribution's quantiles over the normal numbers, for the kernel: value and slope at even steps of z.
import { exp, log } from '../../machine/pinned.ts';
import { betaTails, type BetaShape } from './beta.ts';
import { gammaTails, type GammaShape } from './gamma.ts';
import { quantileAt, type Tails } from './tail.ts';

/** Tables go from −reach to reach; the kernel expects the same. */
export const quantileReach = 9;

export interface QuantileTable {
  /** Value at node i at 2i, slope times the step at 2i + 1. */
  readonly nodes: Float64Array;
  /** Nodes for each unit of z. */
  readonly perUnit: number;
  /** Largest difference seen between the table and the distribution, halfway between nodes. */
  readonly error: number;
}

const coarsest = 16;
const finest = 512;

/** Errors are kept below this share of `size`, the SD of the distribution. */
const wanted = 1e-7;

export function betaTable(shape: BetaShape, sd: number): QuantileTable {
  const start = log(shape.a / shape.b);
  return build({ tails: betaTails(shape), start, sd, value: (y) => 1 / (1 + exp(-y)), slope: logistic });
}

export function gammaTable(shape: GammaShape, sd: number): QuantileTable {
  const start = log(shape.shape * shape.scale);
  return build({ tails: gammaTails(shape), start, sd, value: exp, slope: exp });
}

/** dx/dy of x = 1/(1 + e^−y). */
function logistic(y: number): number {
  const x = 1 / (1 + exp(-Math.abs(y)));
  return x * (1 - x);
}

interface Source {
  readonly tails: Tails;
  readonly start: number;
  readonly sd: number;
  readonly value: (y: number) => number;
  readonly slope: (y: number) => number;
}

/** Halves the step until the table misses its own new nodes by little. Cost: about 1 ms. */
function build(source: Source): QuantileTable {
  let nodes = nodesOf(source, coarsest);
  for (let perUnit = coarsest; ; perUnit *= 2) {
    const finer = nodesOf(source, perUnit * 2);
    // The error of a cubic falls to a sixteenth with half the step.
    const error = missed(nodes, finer) / 16;
    if (error <= wanted * source.sd || perUnit * 2 >= finest) return { nodes: finer, perUnit: perUnit * 2, error };
    nodes = finer;
  }
}

function nodesOf({ tails, start, value, slope }: Source, perUnit: number): Float64Array {
  const middle = quantileReach * perUnit;
  const nodes = new Float64Array(2 * (2 * middle + 1));
  for (const direction of [-1, 1]) {
    let guess = start;
    for (let i = 0; i <= middle; i++) {
      const z = (direction * i) / perUnit;
      const point = quantileAt(tails, z, guess);
      const at = 2 * (middle + direction * i);
      nodes[at] = value(point.y);
      nodes[at + 1] = (slope(point.y) * point.slope) / perUnit;
      guess = point.y + (direction * point.slope) / perUnit;
    }
  }
  return nodes;
}

/** Largest difference at the nodes that the coarser table does not have. */
function missed(coarse: Float64Array, fine: Float64Array): number {
  let most = 0;
  for (let i = 0; 2 * i + 3 < coarse.length; i++) {
    const [v0 = 0, d0 = 0, v1 = 0, d1 = 0] = coarse.subarray(2 * i, 2 * i + 4);
    const halfway = (v0 + v1) / 2 + (d0 - d1) / 8;
    most = Math.max(most, Math.abs(halfway - (fine[4 * i + 2] ?? 0)));
  }
  return most;
}

/** The table at z, as the kernel reads it. */
export function tableAt({ nodes, perUnit }: QuantileTable, z: number): number {
  const place = Math.max(0, Math.min(2 * quantileReach * perUnit - 1e-9, (z + quantileReach) * perUnit));
  const i = Math.floor(place);
  const s = place - i;
  const [v0 = 0, d0 = 0, v1 = 0, d1 = 0] = nodes.subarray(2 * i, 2 * i + 4);
  return v0 + s * (d0 + s * (3 * (v1 - v0) - 2 * d0 - d1 + s * (2 * (v0 - v1) + d0 + d1)));
}
