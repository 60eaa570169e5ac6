// The record of each phase, and the sections that it names.
import * as layout from '../../../assembly/layout.ts';
import type * as M from '../../model/model.ts';
import { addRooms, addSlotLists } from './slot-lists.ts';
import { breedingRecord } from './breeding.ts';
import { countRecord } from './count.ts';
import { handlingRecord } from './handling.ts';
import { addMovement } from './movement.ts';
import type { PhasePlace } from './place.ts';
import { record } from './record.ts';
import { addPatchTable, addTable } from './table.ts';
import { plain } from './section.ts';

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
    case 'take':
    case 'move':
    case 'add':
      return handlingRecord(phase, place);
  }
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
    phase.advanceIn === undefined
      ? layout.none
      : list.add(plain(layout.kindRates, phase.advanceIn, `advance of ${phase.name}`)),
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

function ceilingRecord(phase: M.CeilingPhase, { list, model, index, key }: PhasePlace): Int32Array {
  return record(layout.opCeiling, key, index, [
    list.add(plain(layout.kindClassMask, Int32Array.from(phase.counted), `counted of ${phase.name}`)),
    addPatchTable(list, phase.capacity, phase.capacityByYear, `capacity of ${phase.name}`),
    takesCodes[phase.takes ?? 'at random'],
    addRooms(list, model),
  ]);
}

const takesCodes = {
  'at random': layout.none,
  'youngest first': layout.takesYoungest,
  nobody: layout.takesNobody,
} as const;
