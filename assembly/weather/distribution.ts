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
    const most: f64 = form === layout.distributionShareTable ? 1 : f64.MAX_VALUE;
    for (let at = target; at < end; at += 8) {
      store<f64>(at, scale * max<f64>(0, min<f64>(most, tabled(nodes, b, load<f64>(at)))));
    }
  }
}

function times(factor: f64, at: usize): v128 {
  return f64x2.mul(f64x2.splat(factor), v128.load(at));
}

/** Cubic Hermite between nodes of value and slope; z beyond the table is held to its end. */
function tabled(nodes: usize, perUnit: f64, z: f64): f64 {
  const reach: f64 = layout.tableReach;
  const last = 2 * reach * perUnit - 1;
  const place = (z + reach) * perUnit;
  const node = max<f64>(0, min<f64>(last, floor<f64>(place)));
  const s = max<f64>(0, min<f64>(1, place - node));
  const i = i32(node) << 1;
  const v0 = f64At(nodes, i);
  const d0 = f64At(nodes, i + 1);
  const v1 = f64At(nodes, i + 2);
  const d1 = f64At(nodes, i + 3);
  return v0 + s * (d0 + s * (3 * (v1 - v0) - 2 * d0 - d1 + s * (2 * (v0 - v1) + d0 + d1)));
}
