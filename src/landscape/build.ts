// From a model to its landscape: the movement of every dispersal.
import type { Finding } from '../spec/finding.ts';
import type { DispersalPhase, Model } from '../model/model.ts';
import { kernelMovement } from './kernel-movement.ts';
import type { Landscape, Movement } from './landscape.ts';
import type { BuiltMovement, LandscapeMemory } from './memory.ts';
import { sharesMovement } from './shares-movement.ts';
import { movementByYear } from './ways.ts';
import { strikesOf } from './strikes.ts';
import { patchCorrelation } from './weather.ts';

export interface BuiltLandscape {
  readonly landscape: Landscape;
  readonly findings: readonly Finding[];
}

/** `memory` of models of the same spec at other values of some parameters. */
export function buildLandscape(model: Model, memory?: LandscapeMemory): BuiltLandscape {
  const findings: Finding[] = [];
  const movements = model.phases.map((phase) => {
    if (phase.kind !== 'dispersal') return null;
    const make = (): BuiltMovement => {
      const own: Finding[] = [];
      return { movement: movementOf(model, phase, own), findings: own };
    };
    const built = memory === undefined ? make() : memory.of(phase, model.patches, make);
    findings.push(...built.findings);
    return built.movement;
  });
  const strikes = strikesOf(model);
  const weather = patchCorrelation(model, model.variation, findings);
  return {
    landscape: { movements, ...(weather === null ? {} : { weather }), ...(strikes.length === 0 ? {} : { strikes }) },
    findings,
  };
}

function movementOf(model: Model, phase: DispersalPhase, findings: Finding[]): Movement {
  const { byYear } = phase;
  if (byYear === undefined) return movementIn(model, phase, findings);
  const movements = byYear.epochs.map((ways, i) => {
    // Whoever has nowhere to go in some years only is told of the first.
    const own: Finding[] = [];
    const movement = movementIn(model, { ...phase, ...ways }, own);
    findings.push(...own.filter(({ severity }) => i === 0 || severity === 'error'));
    return movement;
  });
  return movementByYear(movements, byYear.epochOf) ?? movementIn(model, phase, findings);
}

function movementIn(model: Model, phase: DispersalPhase, findings: Finding[]): Movement {
  const { rule } = phase;
  return rule.by === 'shares'
    ? sharesMovement(model, phase, rule.shares)
    : kernelMovement({ model, phase, rule, findings });
}
