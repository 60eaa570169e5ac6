// A year over endless land of the quality of one patch, seen by a front of a given steepness; and how it moves with a number of the model.
import { lifeMap, type LifeRequest } from '../../compile/life-map.ts';
import { multiplierOf, unitMultipliers, type Multipliers } from '../../compile/multipliers.ts';
import { tableAt } from '../../compile/rates.ts';
import { lifeSlope } from '../../compile/slopes/life-slope.ts';
import type { Compiled } from '../../compile/year-map.ts';
import type { DispersalPhase, Phase } from '../../model/model.ts';
import type { ModelSlopes } from '../../model/slopes/slopes.ts';
import type { DenseMatrix } from '../../numeric/sparse.ts';
import { identity, plus, times } from '../../numeric/square.ts';
import { planeMoment, type Ways } from './plane-moment.ts';

export interface Land {
  readonly compiled: Compiled;
  readonly patch: number;
}

/** The dispersals by a kernel; null where one goes by a table of shares, which tells nothing of other land. */
export function waysOf(phases: readonly Phase[]): readonly Ways[] | null {
  const all = phases.flatMap((phase) => (phase.kind === 'dispersal' ? [wayOf(phase)] : []));
  return all.includes(null) ? null : all.flatMap((ways) => ways ?? []);
}

function wayOf({ rule }: DispersalPhase): Ways | null {
  if (rule.by === 'shares') return null;
  const { kernel, hazardPerKm, survivalOnTheWay, leavers } = rule;
  return { kernel, hazardPerKm, survivalOnTheWay, leavers };
}

/** H(θ), C×C: the product of the phases, in which those that leave count with the moment of their kernel. Nobody is crowded. */
export function seenByFront(land: Land, theta: number): DenseMatrix {
  const { phases, classes } = land.compiled.model;
  const multipliers = meanMultipliers(land.compiled);
  const n = classes.length;
  let year = identity(n);
  phases.forEach((_, index) => {
    year = times(phaseSeen(land, { index, multipliers, theta }), year, n);
  });
  return { rows: n, columns: n, values: year };
}

/** ∂H/∂p at the same θ, by the product rule. */
export function slopeSeen(land: Land, slopes: ModelSlopes, theta: number): DenseMatrix {
  const { phases, classes } = land.compiled.model;
  const multipliers = meanMultipliers(land.compiled);
  const n = classes.length;
  let [year, slope] = [identity(n), new Float64Array(n * n)];
  phases.forEach((_, index) => {
    const at = { index, multipliers, theta };
    const map = phaseSeen(land, at);
    slope = plus(times(phaseSlope(land, slopes, at), year, n), times(map, slope, n));
    year = times(map, year, n);
  });
  return { rows: n, columns: n, values: slope };
}

function meanMultipliers({ model, landscape }: Compiled): Multipliers {
  const multipliers = unitMultipliers(model);
  landscape.strikes?.forEach(({ on }, k) => multipliers[model.crowding.length + k]?.set(on));
  return multipliers;
}

interface At {
  readonly index: number;
  readonly multipliers: Multipliers;
  readonly theta: number;
}

function phaseSeen({ compiled, patch }: Land, { index, multipliers, theta }: At): Float64Array {
  const { model } = compiled;
  const phase = model.phases[index];
  const n = model.classes.length;
  switch (phase?.kind) {
    case 'survival':
    case 'breeding':
    case 'ageing':
    case 'demography':
      return lifeMap(phase, lifeRequest({ compiled, patch }, index, multipliers));
    case 'dispersal': {
      const ways = wayOf(phase);
      const moment = ways === null ? 1 : planeMoment(ways, theta);
      const leaving = leavingOf({ compiled, patch }, { phase, index, multipliers });
      return diagonal(n, (c) => 1 - (leaving[c] ?? 0) + (leaving[c] === 0 ? 0 : (leaving[c] ?? 0) * moment));
    }
    default:
      return identity(n);
  }
}

function lifeRequest({ compiled, patch }: Land, phase: number, multipliers: Multipliers): LifeRequest {
  return { model: compiled.model, phase, patch, step: 1, multipliers };
}

interface Leaving {
  readonly phase: DispersalPhase;
  readonly index: number;
  readonly multipliers: Multipliers;
}

function leavingOf({ compiled: { model }, patch }: Land, { phase, index, multipliers }: Leaving): Float64Array {
  const table = tableAt(phase.leaving, 1);
  return Float64Array.from(model.classes, (_, c) => {
    if (phase.moves[c] !== 1) return 0;
    const factor = multiplierOf(model, multipliers, { phase: index, part: 'leaving', patch, class: c });
    return (table[patch * model.classes.length + c] ?? 0) * factor;
  });
}

function phaseSlope(land: Land, slopes: ModelSlopes, { index, multipliers, theta }: At): Float64Array {
  const { compiled, patch } = land;
  const { model } = compiled;
  const [phase, moved] = [model.phases[index], slopes.phases[index] ?? null];
  const n = model.classes.length;
  switch (phase?.kind) {
    case 'survival':
    case 'breeding':
    case 'ageing':
    case 'demography': {
      const request = lifeRequest(land, index, multipliers);
      return lifeSlope({ phase, slopes: moved, request, multiplierSlopes: model.crowding.map(() => 0) });
    }
    case 'dispersal': {
      const ways = wayOf(phase);
      if (ways === null || moved?.kind !== 'dispersal') return new Float64Array(n * n);
      const leaving = leavingOf({ compiled, patch }, { phase, index, multipliers });
      const leavingSlope = leavingOf(
        { compiled, patch },
        { phase: { ...phase, leaving: moved.leaving }, index, multipliers },
      );
      const [moment, momentSlope] = [planeMoment(ways, theta), momentSlopeOf(ways, moved, theta)];
      return diagonal(n, (c) => (leavingSlope[c] ?? 0) * (moment - 1) + (leaving[c] ?? 0) * momentSlope);
    }
    default:
      return new Float64Array(n * n);
  }
}

/** Along all numbers of the way at once, by a central difference with an error of about 1e-9 of it. */
function momentSlopeOf(ways: Ways, { rule }: DispersalPhase, theta: number): number {
  if (rule.by === 'shares') return 0;
  const { kernel, hazardPerKm, survivalOnTheWay } = rule;
  const relative = [
    kernel.scaleKm / ways.kernel.scaleKm,
    kernel.shapeNumber / ways.kernel.shapeNumber,
    hazardPerKm / Math.max(ways.hazardPerKm, 1e-3 / ways.kernel.scaleKm),
    survivalOnTheWay,
  ];
  const fastest = Math.max(...relative.map(Math.abs));
  if (fastest === 0) return 0;
  const width = 1e-5 / fastest;
  const at = (by: number): number =>
    planeMoment(
      {
        ...ways,
        kernel: {
          ...ways.kernel,
          scaleKm: ways.kernel.scaleKm + by * kernel.scaleKm,
          shapeNumber: ways.kernel.shapeNumber + by * kernel.shapeNumber,
        },
        hazardPerKm: ways.hazardPerKm + by * hazardPerKm,
        survivalOnTheWay: ways.survivalOnTheWay + by * survivalOnTheWay,
      },
      theta,
    );
  return (at(width) - at(-width)) / (2 * width);
}

function diagonal(n: number, value: (c: number) => number): Float64Array {
  const map = new Float64Array(n * n);
  for (let c = 0; c < n; c++) map[c * n + c] = value(c);
  return map;
}
