// A table of a distribution's quantiles over the normal numbers, for the kernel: value and slope at even steps of z.
import { exp, log } from '../../machine/pinned.ts';
import { betaTails, type BetaShape } from './beta.ts';
import { gammaTails, type GammaShape } from './gamma.ts';
import { quantileCurve, type QuantileCurve } from './quantile-curve.ts';

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
/** And those of its nodes below this. */
const exactness = 1e-10;

export function betaTable({ a, b }: BetaShape, sd: number): QuantileTable {
  const low = shareCurve({ a, b }, sd);
  // Shares near 1 are told by what they lack, lest it be rounded away.
  const lack = shareCurve({ a: b, b: a }, sd);
  return build(sd, (z, out) => {
    (z <= 0 ? low : lack)(Math.abs(z), out);
    if (z > 0) out[0] = 1 - (out[0] ?? NaN);
    out[1] = -(out[1] ?? NaN);
  });
}

/** Below the median. */
function shareCurve({ a, b }: BetaShape, sd: number): QuantileCurve {
  const law = { rise: a, fall: a + b, share: true };
  const quantile = (y: number): number => 1 / (1 + exp(-y));
  return quantileCurve(
    { law, tails: betaTails({ a, b }), direction: -1, near: log(a / b), quantile, wanted: exactness * sd },
    quantileReach,
  );
}

export function gammaTable({ shape, scale }: GammaShape, sd: number): QuantileTable {
  const law = { rise: shape, fall: 1, share: false };
  const common = {
    law,
    tails: gammaTails({ shape, scale: 1 }),
    near: log(shape),
    quantile: exp,
    wanted: (exactness * sd) / scale,
  };
  const low = quantileCurve({ ...common, direction: -1 }, quantileReach);
  const high = quantileCurve({ ...common, direction: 1 }, quantileReach);
  return build(sd, (z, out) => {
    (z <= 0 ? low : high)(Math.abs(z), out);
    out[0] = scale * (out[0] ?? NaN);
    out[1] = (z <= 0 ? -scale : scale) * (out[1] ?? NaN);
  });
}

/** Writes the quantile at z into `out`, and its slope behind it. */
type Quantile = (z: number, out: Float64Array) => void;

/** Halves the step until the table without every other node misses those by little. Cost: about 0.1 ms. */
function build(sd: number, quantile: Quantile): QuantileTable {
  for (let perUnit = 2 * coarsest; ; perUnit *= 2) {
    const nodes = nodesOf(quantile, perUnit);
    // The error of a cubic falls to a sixteenth with half the step.
    const error = missed(nodes) / 16;
    if (error <= wanted * sd || perUnit >= finest) return { nodes, perUnit, error };
  }
}

function nodesOf(quantile: Quantile, perUnit: number): Float64Array {
  const last = 2 * quantileReach * perUnit;
  const nodes = new Float64Array(2 * (last + 1));
  const one = new Float64Array(2);
  for (let i = 0; i <= last; i++) {
    quantile(i / perUnit - quantileReach, one);
    nodes[2 * i] = one[0] ?? NaN;
    nodes[2 * i + 1] = (one[1] ?? NaN) / perUnit;
  }
  return nodes;
}

/** Largest difference at every other node, if there were none. */
function missed(nodes: Float64Array): number {
  let most = 0;
  for (let i = 0; i + 5 < nodes.length; i += 4) {
    const [v0, d0, v1, d1] = [nodes[i] ?? 0, nodes[i + 1] ?? 0, nodes[i + 4] ?? 0, nodes[i + 5] ?? 0];
    const halfway = (v0 + v1) / 2 + (d0 - d1) / 4;
    most = Math.max(most, Math.abs(halfway - (nodes[i + 2] ?? 0)));
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
