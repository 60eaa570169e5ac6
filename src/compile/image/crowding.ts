// Crowding in the image: a record that reads the count and writes a slot, and for each phase the slots that scale it.
import * as layout from '../../../assembly/layout.ts';
import type { Crowding, Model, RatePart } from '../../model/model.ts';
import type { CrowdingCoefficients, CrowdingForm } from '../coefficients.ts';
import { record } from './record.ts';
import { plain, type SectionList } from './section.ts';

const formCodes: Readonly<Record<CrowdingForm, number>> = {
  none: layout.formNone,
  'beverton-holt': layout.formBevertonHolt,
  ricker: layout.formRicker,
  theta: layout.formTheta,
  hassell: layout.formHassell,
  ceiling: layout.formCeiling,
};

export interface CrowdingRecord {
  readonly crowding: Crowding;
  readonly coefficients: CrowdingCoefficients;
  /** Position among the crowdings of the model, which is its slot. */
  readonly slot: number;
  readonly key: number;
}

export function crowdingRecord(list: SectionList, { crowding, coefficients, slot, key }: CrowdingRecord): Int32Array {
  const reads = `crowding ${crowding.name}`;
  const forms = Int32Array.from(coefficients.form, (form) => formCodes[form]);
  return record(layout.opCrowding, key, slot, [
    list.add(plain(layout.kindClassWeights, crowding.counted, reads)),
    list.add(plain(layout.kindPatchForms, forms, `coefficients of ${reads}`)),
    list.add(plain(layout.kindPatchNumbers, coefficients.coefficient, `coefficients of ${reads}`)),
    list.add(plain(layout.kindPatchNumbers, coefficients.alleeHalf, `coefficients of ${reads}`)),
    slot,
    coefficients.shapeNumber === undefined
      ? layout.none
      : list.add(plain(layout.kindPatchNumbers, Float64Array.of(coefficients.shapeNumber), reads)),
  ]);
}

/** Row of the slots that scale one part of a phase, class by class; none where nothing does. */
export function addSlotLists(list: SectionList, model: Model, phase: number, part: RatePart): number {
  const slots = model.classes.map((_, c) =>
    model.crowding.flatMap((crowding, slot) => (scales(crowding, phase, part, c) ? [slot] : [])),
  );
  if (slots.every((own) => own.length === 0)) return layout.none;
  const starts = [0];
  for (const own of slots) starts.push((starts.at(-1) ?? 0) + own.length);
  return list.add(plain(layout.kindSlotLists, Int32Array.from([...starts, ...slots.flat()]), 'crowding changes'));
}

function scales(crowding: Crowding, phase: number, part: RatePart, c: number): boolean {
  return crowding.changes.some((change) => change.phase === phase && change.part === part && change.classes[c] === 1);
}
