// From a standard normal number to the number that varies: the quantile of its distribution at the chance of the normal.
import { f64At } from '../arrays';
import { laneNumbers } from '../batch';
import * as layout from '../layout';
import { expTwo } from '../exp-two';

/** target[lane] holds z before, and the number times its scale after. */
export function distribute(target: usize, distribution: usize, tables: usize): void {
  const form = i32(load<f64>(distribution));
  const a = load<f64>(distribution, 8);
  const b = load<f64>(distribution, 16);
  const scale = load<f64>(distribution, 24);
  const end = target + laneNumbers;
  if (form === layout.distributionLognormal) {
    for (let at = target; at < end; at += 16) {
      v128.store(at, f64x2.mul(f64x2.splat(scale), expTwo(f64x2.add(f64x2.splat(a), times(b, at)))));
    }
  } else if (form === layout.distributionLogit) {
    for (let at = target; at < end; at += 16) {
      const against = f64x2.add(f64x2.splat(1), expTwo(f64x2.sub(f64x2.splat(-a), times(b, at))));
      v128.store(at, f64x2.div(f64x2.splat(scale), against));
    }
  } else if (form === layout.distributionConstant) {
    for (let at = target; at < end; at += 8) store<f64>(at, scale);
  } else {
    const nodes = tables + ((<usize>a) << 3);
    const most = f64x2.splat(form === layout.distributionShareTable ? 1 : f64.MAX_VALUE);
    for (let at = target; at < end; at += 16) {
      const held = f64x2.pmax(f64x2.splat(0), f64x2.pmin(most, tabledTwo(nodes, b, v128.load(at))));
      v128.store(at, f64x2.mul(f64x2.splat(scale), held));
    }
  }
}

function times(factor: f64, at: usize): v128 {
  return f64x2.mul(f64x2.splat(factor), v128.load(at));
}

/** Cubic Hermite between nodes of value and slope, for two z side by side; z beyond the table is held to its end. */
function tabledTwo(nodes: usize, perUnit: f64, z: v128): v128 {
  const reach: f64 = layout.tableReach;
  const none = f64x2.splat(0);
  const place = f64x2.mul(f64x2.add(z, f64x2.splat(reach)), f64x2.splat(perUnit));
  const last = f64x2.splat(2 * reach * perUnit - 1);
  const node = f64x2.pmax(none, f64x2.pmin(last, f64x2.floor(place)));
  const s = f64x2.pmax(none, f64x2.pmin(f64x2.splat(1), f64x2.sub(place, node)));
  const both = i32x4.trunc_sat_f64x2_s_zero(node);
  const first = nodes + ((<usize>i32x4.extract_lane(both, 0)) << 4);
  const second = nodes + ((<usize>i32x4.extract_lane(both, 1)) << 4);
  const v0 = v128.load64_lane(second, v128.load64_zero(first), 1);
  const d0 = v128.load64_lane(second + 8, v128.load64_zero(first + 8), 1);
  const v1 = v128.load64_lane(second + 16, v128.load64_zero(first + 16), 1);
  const d1 = v128.load64_lane(second + 24, v128.load64_zero(first + 24), 1);
  const twice = f64x2.splat(2);
  // 3 (v1 − v0) − 2 d0 − d1, and 2 (v0 − v1) + d0 + d1
  const square = f64x2.sub(f64x2.sub(f64x2.mul(f64x2.splat(3), f64x2.sub(v1, v0)), f64x2.mul(twice, d0)), d1);
  const cube = f64x2.add(f64x2.add(f64x2.mul(twice, f64x2.sub(v0, v1)), d0), d1);
  const slope = f64x2.add(d0, f64x2.mul(s, f64x2.add(square, f64x2.mul(s, cube))));
  return f64x2.add(v0, f64x2.mul(s, slope));
}
