// Rates that are worked out anew every year, and drivers whose years are drawn for them, as records of the year program.
import * as layout from '../../../assembly/layout.ts';
import type { Resampled, Response } from '../../model/chance.ts';
import type { Model } from '../../model/model.ts';
import type { SlotPlan } from '../weather/slots.ts';
import { instructionsOf } from './expression.ts';
import { keyOfName } from './keys.ts';
import { record } from './record.ts';
import { plain, type SectionList } from './section.ts';
import { addEpochs, sharedPatch, type WeatherRecords, type WeatherRequest } from './variation.ts';

/** Nothing of it lasts from year to year. */
export function responseRecords({ list, model, slots }: WeatherRequest): WeatherRecords {
  const { variation } = model;
  if (variation === null || variation.responses.length === 0) return { records: [], weather: 0, work: 0 };
  const { resampled } = variation;
  const slotOf = new Map([
    ...variation.varied.map(({ name }, k): [string, number] => [name, slots.varied[k] ?? layout.none]),
    ...(resampled?.names ?? []).map((name, k): [string, number] => [name, slots.drivers[k] ?? layout.none]),
  ]);
  const attributes = new Map([...variation.attributes.keys()].map((name, i) => [name, i]));
  const values = Float64Array.from([...variation.attributes.values()].flatMap((own) => [...own]));
  const attributeRow = list.add(plain(layout.kindConstants, values, 'attributes of the patches'));
  const years = Array.from({ length: model.steps }, (_, t) => model.firstYear + t);
  const series = [...variation.dated.values()].flatMap((values) => [...values]);
  const dated = new Map([...variation.dated.keys()].map((name, i) => [name, i + 1]));
  const yearRow = list.add(plain(layout.kindConstants, Float64Array.from([...years, ...series]), 'years'));
  const records = variation.responses.map((response, k) => {
    const slot = slots.responses[k] ?? layout.none;
    const first = slots.responses.indexOf(slot) === k;
    const made = instructionsOf(response.expression, { slots: slotOf, attributes, dated });
    if (made === null) throw new Error(`${response.name} is nested too deeply for the kernel.`);
    return record(layout.opResponse, 0, layout.none, [
      list.add(plain(layout.kindExpression, made.words, `expression of ${response.name}`)),
      list.add(plain(layout.kindConstants, made.constants, `expression of ${response.name}`)),
      attributeRow,
      yearRow,
      addBase(list, response),
      slot,
      response.bounds === 'share' ? layout.boundsShare : layout.boundsPositive,
      addPatches(list, model, response, first),
    ]);
  });
  const driven = resampled === null ? [] : [driversRecord(list, resampled, slots)];
  return { records: [...driven, ...records], weather: 0, work: layout.deepestStack };
}

function driversRecord(list: SectionList, { values }: Resampled, { drivers }: SlotPlan): Int32Array {
  return record(layout.opDrivers, keyOfName('condition:drivers') | 0, layout.none, [
    list.add(plain(layout.kindConstants, values, 'drivers')),
    list.add(plain(layout.kindPatchList, Int32Array.from(drivers), 'drivers')),
    list.add(plain(layout.kindColumnKeys, Int32Array.of(sharedPatch), 'names')),
  ]);
}

function addBase(list: SectionList, { base, name }: Response): number {
  return addEpochs(list, base.epochs, {
    kind: layout.kindPatchNumbers,
    epochOf: base.epochOf,
    reads: `mean of ${name}`,
  });
}

/** The first response of a rate also sets the patches in which the rate is no such expression. */
function addPatches(list: SectionList, model: Model, { patches, name }: Response, first: boolean): number {
  const own = first ? model.patches.map((_, p) => p) : patches;
  return list.add(plain(layout.kindPatchList, Int32Array.from(own), `patches of ${name}`));
}
