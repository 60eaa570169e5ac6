// Crowding in the image: a record that reads the count and writes a slot.
import * as layout from '../../../assembly/layout.ts';
import type { Crowding, Model } from '../../model/model.ts';
import type { CrowdingCoefficients, CrowdingForm } from '../coefficients.ts';
import { record } from './record.ts';
import { addRooms } from './slot-lists.ts';
import { plain, type SectionList } from './section.ts';
import { addPatchTable } from './table.ts';

const formCodes: Readonly<Record<CrowdingForm, number>> = {
  none: layout.formNone,
  'beverton-holt': layout.formBevertonHolt,
  ricker: layout.formRicker,
  theta: layout.formTheta,
  hassell: layout.formHassell,
  ceiling: layout.formCeiling,
};

export interface CrowdingRecord {
  readonly model: Model;
  readonly crowding: Crowding;
  readonly coefficients: CrowdingCoefficients;
  /** Position among the crowdings of the model, which is its slot. */
  readonly slot: number;
  readonly key: number;
}

export function crowdingRecord(list: SectionList, crowded: CrowdingRecord): Int32Array {
  const { model, crowding, coefficients, slot, key } = crowded;
  const reads = `crowding ${crowding.name}`;
  const forms = Int32Array.from(coefficients.form, (form) => formCodes[form]);
  return record(layout.opCrowding, key, slot, [
    list.add(plain(layout.kindClassWeights, crowding.counted, reads)),
    list.add(plain(layout.kindPatchForms, forms, `coefficients of ${reads}`)),
    addPatchTable(list, coefficients.coefficient, coefficients.coefficientByYear, `coefficients of ${reads}`),
    list.add(plain(layout.kindPatchNumbers, coefficients.alleeHalf, `coefficients of ${reads}`)),
    slot,
    coefficients.shapeNumber === undefined
      ? layout.none
      : list.add(plain(layout.kindPatchNumbers, Float64Array.of(coefficients.shapeNumber), reads)),
    addRooms(list, model),
  ]);
}
