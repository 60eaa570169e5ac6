// The record of each phase, and the sections that it names.
import * as layout from '../../../assembly/layout.ts';
import type { Movement } from '../../landscape/landscape.ts';
import type * as M from '../../model/model.ts';
import { addSlotLists } from './slot-lists.ts';
import { addMovement } from './movement.ts';
import { record } from './record.ts';
import { plain, type SectionList } from './section.ts';

export interface PhasePlace {
  readonly list: SectionList;
  readonly model: M.Model;
  readonly index: number;
  readonly key: number;
  readonly movement: Movement | null;
  /** Ways of the dispersals before this phase. */
  readonly waysBefore: number;
}

export function phaseRecord(phase: M.Phase, place: PhasePlace): Int32Array {
  switch (phase.kind) {
    case 'count':
      return countRecord(place);
    case 'breeding':
      return breedingRecord(phase, place);
    case 'survival':
      return survivalRecord(phase, place);
    case 'ageing':
      return ageingRecord(phase, place);
    case 'demography':
      return demographyRecord(phase, place);
    case 'dispersal':
      return dispersalRecord(phase, place);
    case 'ceiling':
      return ceilingRecord(phase, place);
  }
}

function countRecord({ list, model, index, key }: PhasePlace): Int32Array {
  const weights = Float64Array.from(model.outcomes.flatMap((outcome) => [...outcome.weights]));
  const patches = Int32Array.from(model.outcomes.flatMap((outcome) => [...outcome.patches]));
  return record(layout.opCount, key, index, [
    list.add(plain(layout.kindOutcomeWeights, weights, 'outcomes')),
    list.add(plain(layout.kindOutcomePatches, patches, 'outcomes')),
    model.outcomes.length,
  ]);
}

function breedingRecord(phase: M.BreedingPhase, { list, model, index, key }: PhasePlace): Int32Array {
  return record(layout.opBreeding, key, index, [
    addTable(list, layout.kindRates, phase.births, `births of ${phase.name}`),
    list.add(plain(layout.kindClassShares, phase.into, `into of ${phase.name}`)),
    list.add(plain(layout.kindClassShares, onwardShares(phase.into), `into of ${phase.name}`)),
    addSlotLists(list, model, index, 'births'),
    ...(phase.waits === undefined ? [] : waitingRows(list, phase.waits)),
  ]);
}

function waitingRows(list: SectionList, { name, counted, capacity }: M.CeilingPhase): readonly number[] {
  return [
    list.add(plain(layout.kindClassMask, Int32Array.from(counted), `counted of ${name}`)),
    list.add(plain(layout.kindPatchNumbers, capacity, `capacity of ${name}`)),
  ];
}

/** share[c] / (share[c] + all later shares): 1 for the last class that has a share. */
function onwardShares(shares: Float64Array): Float64Array {
  const onward = new Float64Array(shares.length);
  let rest = 0;
  for (let c = shares.length - 1; c >= 0; c--) {
    const share = shares[c] ?? 0;
    rest += share;
    onward[c] = share > 0 ? share / rest : 0;
  }
  return onward;
}

function survivalRecord(phase: M.SurvivalPhase, { list, model, index, key }: PhasePlace): Int32Array {
  return record(layout.opSurvival, key, index, [
    addTable(list, layout.kindRates, phase.survival, `survival of ${phase.name}`),
    addSlotLists(list, model, index, 'survival'),
  ]);
}

function ageingRecord(phase: M.AgeingPhase, { list, index, key }: PhasePlace): Int32Array {
  return record(layout.opAgeing, key, index, [
    list.add(plain(layout.kindClassShares, phase.advance, `advance of ${phase.name}`)),
    list.add(plain(layout.kindClassLinks, phase.next, `next of ${phase.name}`)),
  ]);
}

function demographyRecord(phase: M.DemographyPhase, { list, model, index, key }: PhasePlace): Int32Array {
  return record(layout.opDemography, key, index, [
    addTable(list, layout.kindPatchMatrices, phase.fates, `fates of ${phase.name}`),
    addTable(list, layout.kindPatchMatrices, phase.births, `births of ${phase.name}`),
    addSlotLists(list, model, index, 'fates'),
    addSlotLists(list, model, index, 'births'),
  ]);
}

function dispersalRecord(phase: M.DispersalPhase, place: PhasePlace): Int32Array {
  const { list, model, index, key, movement, waysBefore } = place;
  if (movement === null) throw new Error(`The landscape has no movement for the phase ${phase.name}.`);
  return record(layout.opDispersal, key, index, [
    list.add(plain(layout.kindClassMask, Int32Array.from(phase.moves), `classes of ${phase.name}`)),
    addTable(list, layout.kindRates, phase.leaving, `leaving of ${phase.name}`),
    addMovement(list, movement, `movement of ${phase.name}`),
    waysBefore,
    addSlotLists(list, model, index, 'leaving'),
  ]);
}

function ceilingRecord(phase: M.CeilingPhase, { list, index, key }: PhasePlace): Int32Array {
  return record(layout.opCeiling, key, index, [
    list.add(plain(layout.kindClassMask, Int32Array.from(phase.counted), `counted of ${phase.name}`)),
    list.add(plain(layout.kindPatchNumbers, phase.capacity, `capacity of ${phase.name}`)),
    takesCodes[phase.takes ?? 'at random'],
  ]);
}

const takesCodes = {
  'at random': layout.none,
  'youngest first': layout.takesYoungest,
  nobody: layout.takesNobody,
} as const;

/** Adds a table once per epoch, and which epoch holds in each step where there are several. */
function addTable(list: SectionList, kind: number, table: M.RateTable, reads: string): number {
  const columns = table.epochs[0]?.length ?? 0;
  const data = new Float64Array(columns * table.epochs.length);
  table.epochs.forEach((epoch, i) => data.set(epoch, i * columns));
  const many = table.epochs.length > 1;
  const epochOf = many ? list.add(plain(layout.kindEpochOf, table.epochOf, reads)) : layout.none;
  return list.add({ kind, data, columns, epochOf, reads });
}
