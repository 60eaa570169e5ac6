// How the part of a phase map within one patch moves with a number of the model.
import type { AgeingPhase, Phase } from '../../model/model.ts';
import { advanceAt } from '../advance.ts';
import { birthsMap, fatesMap, lifeMap, type LifePhase, type LifeRequest } from '../life-map.ts';

export interface LifeSlopeRequest {
  readonly phase: LifePhase;
  /** The phase with slopes as its numbers; null where it has none. */
  readonly slopes: Phase | null;
  readonly request: LifeRequest;
  /** Of the multiplier of each crowding in this patch. */
  readonly multiplierSlopes: readonly number[];
}

/**
 * C×C, at to * C + from. The map is linear in its rates and, for each crowding, in its multiplier: what its own function gives for
 * slopes in place of rates, and the difference between two multipliers, are exact.
 */
export function lifeSlope(asked: LifeSlopeRequest): Float64Array {
  const slope = rateSlope(asked);
  asked.multiplierSlopes.forEach((own, k) => {
    if (own === 0) return;
    const [with1, with0] = [1, 0].map((value) => lifeMap(asked.phase, withMultiplier(asked.request, k, value)));
    for (let i = 0; i < slope.length; i++) {
      slope[i] = (slope[i] ?? 0) + own * ((with1?.[i] ?? 0) - (with0?.[i] ?? 0));
    }
  });
  return slope;
}

function rateSlope({ phase, slopes, request }: LifeSlopeRequest): Float64Array {
  const n = request.model.classes.length;
  if (slopes?.kind === 'survival') return fatesMap(slopes, request);
  if (slopes?.kind === 'breeding' && phase.kind === 'breeding') {
    const entering = birthsMap({ ...phase, into: slopes.into }, request);
    return birthsMap({ ...phase, births: slopes.births }, request).map((value, i) => value + (entering[i] ?? 0));
  }
  if (slopes?.kind === 'demography') return lifeMap(slopes, request);
  if (slopes?.kind === 'ageing') return advanceSlope(slopes, request.patch);
  return new Float64Array(n * n);
}

/** What goes on no longer stays. */
function advanceSlope(slopes: AgeingPhase, patch: number): Float64Array {
  const n = slopes.next.length;
  const map = new Float64Array(n * n);
  for (let c = 0; c < n; c++) {
    const [slope, to] = [advanceAt(slopes, { patch, class: c }), slopes.next[c] ?? -1];
    map[c * n + c] = (map[c * n + c] ?? 0) - slope;
    if (to >= 0) map[to * n + c] = (map[to * n + c] ?? 0) + slope;
  }
  return map;
}

function withMultiplier(request: LifeRequest, k: number, value: number): LifeRequest {
  const multipliers = request.multipliers.map((own, j) => {
    if (j !== k) return own;
    const changed = own.slice();
    changed[request.patch] = value;
    return changed;
  });
  return { ...request, multipliers };
}
