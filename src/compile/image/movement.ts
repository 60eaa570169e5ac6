// The sections of one movement: where leavers of each patch end, as a list, as conditional chances and as alias tables.
import * as layout from '../../../assembly/layout.ts';
import type { Movement } from '../../landscape/landscape.ts';
import { aliasTable } from './alias.ts';
import { plain, type SectionList } from './section.ts';

/** Chances of death below this are rounding of a sum that is 1. */
const roundingOfOne = 1e-12;

/** Adds the sections of a movement and gives the row of the section that names them. */
export function addMovement(list: SectionList, movement: Movement, reads: string): number {
  const start = list.add(plain(layout.kindMovementStart, movement.start, reads));
  const to = list.add(plain(layout.kindMovementTo, movement.destinations, reads));
  const { byYear } = movement;
  const chances = byYear?.chances ?? [movement.chance];
  const rows = chances.flatMap((chance) => [start, to, ...addChances(list, { ...movement, chance }, reads)]);
  const epochOf = byYear === undefined ? layout.none : list.add(plain(layout.kindEpochOf, byYear.epochOf, reads));
  const section = plain(layout.kindMovement, Int32Array.from(rows), reads);
  return list.add(byYear === undefined ? section : { ...section, columns: layout.movementWords, epochOf });
}

function addChances(list: SectionList, movement: Movement, reads: string): readonly number[] {
  const chance = list.add(plain(layout.kindMovementChance, movement.chance, reads));
  const onward = list.add(plain(layout.kindMovementOnward, onwardChances(movement), reads));
  const alias = aliasTables(movement);
  const aliasStart = list.add(plain(layout.kindAliasStart, alias.start, reads));
  const keep = list.add(plain(layout.kindAliasKeep, alias.keep, reads));
  list.add(plain(layout.kindAliasEnds, alias.ends, reads));
  return [chance, onward, aliasStart, keep];
}

function entriesOf(movement: Movement, patch: number): { readonly ways: number[]; readonly chances: number[] } {
  const from = movement.start[patch] ?? 0;
  const until = movement.start[patch + 1] ?? from;
  const ways = Array.from({ length: until - from }, (_, i) => from + i);
  return { ways, chances: Array.from(movement.chance.subarray(from, until)) };
}

/** Chance to die on the way, from the chances to arrive. */
function deathChance(chances: readonly number[]): number {
  const death = 1 - chances.reduce((a, b) => a + b, 0);
  return death > roundingOfOne ? death : 0;
}

/** chance[j] / (chance[j] + all later chances + death): 1 for the last where nobody dies. */
function onwardChances(movement: Movement): Float64Array {
  const onward = new Float64Array(movement.chance.length);
  for (let patch = 0; patch + 1 < movement.start.length; patch++) {
    const { chances } = entriesOf(movement, patch);
    let rest = deathChance(chances);
    for (let i = chances.length - 1; i >= 0; i--) {
      const chance = chances[i] ?? 0;
      rest += chance;
      onward[(movement.start[patch] ?? 0) + i] = rest > 0 ? chance / rest : 0;
    }
  }
  return onward;
}

interface AliasTables {
  readonly start: Int32Array;
  readonly keep: Float64Array;
  /** Two a column. */
  readonly ends: Int32Array;
}

function aliasTables(movement: Movement): AliasTables {
  const start: number[] = [0];
  const keep: number[] = [];
  const ends: number[] = [];
  for (let patch = 0; patch + 1 < movement.start.length; patch++) {
    const all = entriesOf(movement, patch);
    // A way that is closed in these years must not shift the columns of the others.
    const open = (i: number): boolean => (all.chances[i] ?? 0) > 0;
    const origin = { ways: all.ways.filter((_, i) => open(i)), chances: all.chances.filter((_, i) => open(i)) };
    const death = deathChance(origin.chances);
    if (death > 0 && origin.ways.length > 0) {
      origin.ways.push(layout.none);
      origin.chances.push(death);
    }
    const table = aliasTable(origin.ways, origin.chances);
    keep.push(...table.keep);
    table.first.forEach((first, i) => ends.push(first, table.second[i] ?? layout.none));
    start.push(keep.length);
  }
  return { start: Int32Array.from(start), keep: Float64Array.from(keep), ends: Int32Array.from(ends) };
}
