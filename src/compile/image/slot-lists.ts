// For each part of a phase, the slots that scale the rate of each class.
import * as layout from '../../../assembly/layout.ts';
import type { ScaledPart } from '../../model/chance.ts';
import type { Crowding, Model } from '../../model/model.ts';
import { planSlots } from '../weather/slots.ts';
import { plain, type SectionList } from './section.ts';

/** Row of the lists; none where nothing scales the part. */
export function addSlotLists(list: SectionList, model: Model, phase: number, part: ScaledPart): number {
  const { rates } = planSlots(model);
  const slots = model.classes.map((_, c) => [
    ...model.crowding.flatMap((crowding, slot) => (scales(crowding, phase, part, c) ? [slot] : [])),
    ...rates.flatMap((one) => (one.phase === phase && one.part === part && one.class === c ? [one.slot] : [])),
  ]);
  if (slots.every((own) => own.length === 0)) return layout.none;
  const starts = [0];
  for (const own of slots) starts.push((starts.at(-1) ?? 0) + own.length);
  return list.add(plain(layout.kindSlotLists, Int32Array.from([...starts, ...slots.flat()]), 'crowding changes'));
}

/** Row of the slots that say how much of a capacity is left; none where nothing lowers one. */
export function addRooms(list: SectionList, model: Model): number {
  const { rooms } = planSlots(model);
  return rooms.length === 0 ? layout.none : list.add(plain(layout.kindPatchList, Int32Array.from(rooms), 'capacity'));
}

function scales(crowding: Crowding, phase: number, part: ScaledPart, c: number): boolean {
  return crowding.changes.some((change) => change.phase === phase && change.part === part && change.classes[c] === 1);
}
