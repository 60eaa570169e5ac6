// The record of a breeding: its births, the classes that young enter, who waits, how young vary, and who must find whom.
import * as layout from '../../../assembly/layout.ts';
import type { BreedingPhase, CeilingPhase, Mating, Offspring } from '../../model/model.ts';
import { meanOfTable } from '../../model/offspring.ts';
import type { PhasePlace } from './place.ts';
import { record } from './record.ts';
import { plain, type SectionList } from './section.ts';
import { addRooms, addSlotLists } from './slot-lists.ts';
import { addPatchTable, addTable } from './table.ts';

export function breedingRecord(phase: BreedingPhase, { list, model, index, key }: PhasePlace): Int32Array {
  const words = [
    addTable(list, layout.kindRates, phase.births, `births of ${phase.name}`),
    list.add(plain(layout.kindClassShares, phase.into, `into of ${phase.name}`)),
    list.add(plain(layout.kindClassShares, onwardShares(phase.into), `into of ${phase.name}`)),
    addSlotLists(list, model, index, 'births'),
    ...waitingRows(list, phase.waits),
    ...offspringRows(list, phase),
    ...matingRows(list, phase),
    phase.waits === undefined ? layout.none : addRooms(list, model),
  ];
  return record(layout.opBreeding, key, index, words);
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

function waitingRows(list: SectionList, waits: CeilingPhase | undefined): readonly number[] {
  if (waits === undefined) return [layout.none, layout.none];
  return [
    list.add(plain(layout.kindClassMask, Int32Array.from(waits.counted), `counted of ${waits.name}`)),
    addPatchTable(list, waits.capacity, waits.capacityByYear, `capacity of ${waits.name}`),
  ];
}

function offspringRows(list: SectionList, { name, offspring, into }: BreedingPhase): readonly number[] {
  if (offspring === undefined) return [layout.none, layout.none, layout.none];
  const reads = `offspring of ${name}`;
  if (offspring.by === 'table') return [layout.offspringTable, ...tableRows(list, offspring, reads)];
  const everyClass = new Float64Array(into.length).fill(
    offspring.by === 'binomial' ? offspring.largest : offspring.size,
  );
  const code = offspring.by === 'binomial' ? layout.offspringBinomial : layout.offspringNegativeBinomial;
  return [code, list.add(plain(layout.kindClassWeights, everyClass, reads)), layout.none];
}

/** Each row holds the chance of 0, 1, 2, … young given that it is no fewer; 0 behind the largest litter. */
function tableRows(
  list: SectionList,
  { chances }: Extract<Offspring, { by: 'table' }>,
  reads: string,
): readonly number[] {
  const width = Math.max(1, ...chances.map((own) => own?.length ?? 0));
  const onward = new Float64Array(chances.length * width);
  chances.forEach((own, c) => onward.set(onwardShares(own ?? new Float64Array(0)), c * width));
  const means = Float64Array.from(chances, meanOfTable);
  return [
    list.add({ ...plain(layout.kindClassWeights, onward, reads), columns: width }),
    list.add(plain(layout.kindClassWeights, means, reads)),
  ];
}

const matingCodes: Readonly<Record<Mating['form'], number>> = {
  'female-dominant': layout.none,
  'harmonic mean': layout.matingHarmonic,
  minimum: layout.matingMinimum,
};

function matingRows(list: SectionList, { name, mating }: BreedingPhase): readonly number[] {
  if (mating === undefined || mating.form === 'female-dominant') return [layout.none, layout.none, layout.none];
  const sexes = Float64Array.from(mating.females, (female, c) => female - (mating.males[c] ?? 0));
  return [
    matingCodes[mating.form],
    list.add(plain(layout.kindClassWeights, sexes, `mating of ${name}`)),
    list.add(plain(layout.kindPatchNumbers, Float64Array.of(mating.femalesPerMale), `mating of ${name}`)),
  ];
}
