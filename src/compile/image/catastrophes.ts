// Catastrophes in the image: a record of the year program each.
import * as layout from '../../../assembly/layout.ts';
import type { Strike } from '../../landscape/strikes.ts';
import type { Catastrophe } from '../../model/chance.ts';
import type { CatastropheSlots } from '../weather/slots.ts';
import { keyOfName, keysOfNames } from './keys.ts';
import { record } from './record.ts';
import { plain, type SectionList } from './section.ts';
import type { WeatherRecords, WeatherRequest } from './variation.ts';

export function catastropheRecords({ list, model, landscape, slots, weather }: WeatherRequest): WeatherRecords {
  const keys = keysOfNames(
    'catastrophe',
    model.catastrophes.map(({ name }) => name),
  );
  let lasting = 0;
  const records = model.catastrophes.flatMap((catastrophe, k): Int32Array[] => {
    const [strike, own] = [landscape.strikes?.[k], slots.catastrophes[k]];
    if (strike === undefined || own === undefined) return [];
    const made = { catastrophe, strike, own, key: keys[k] ?? 0, weather: weather + lasting };
    lasting += catastrophe.over === 'landscape' ? 2 : catastrophe.origins.length;
    if (catastrophe.capacity !== null) lasting += model.patches.length;
    return [catastropheRecord(list, made)];
  });
  return { records, weather: lasting, work: records.length > 0 ? 2 * model.patches.length : 0 };
}

interface Made {
  readonly catastrophe: Catastrophe;
  readonly strike: Strike;
  readonly own: CatastropheSlots;
  readonly key: number;
  readonly weather: number;
}

function catastropheRecord(list: SectionList, { catastrophe, strike, own, key, weather }: Made): Int32Array {
  const reads = `catastrophe ${catastrophe.name}`;
  const { chance, lasts, wait, capacity, origins, over } = catastrophe;
  const numbers = Float64Array.of(chance, lasts, wait, capacity?.steps ?? 0);
  const reach =
    strike.reach === null ? layout.none : list.add(plain(layout.kindFactorStart, strike.reach.start, reads));
  if (strike.reach !== null) list.add(plain(layout.kindPatchList, strike.reach.patches, reads));
  const shared = Int32Array.of(keyOfName('patch of the landscape'));
  return record(layout.opCatastrophe, key, layout.none, [
    list.add(plain(layout.kindStrike, numbers, reads)),
    list.add(plain(layout.kindPatchList, Int32Array.from(origins), reads)),
    reach,
    list.add(plain(layout.kindPatchList, Int32Array.from(own.slots), reads)),
    list.add(plain(layout.kindSlotNumbers, Float64Array.from(own.values), reads)),
    list.add(plain(layout.kindSlotNumbers, meansOf(own, strike), reads)),
    weather,
    over === 'landscape' ? layout.overLandscape : layout.overPatches,
    list.add(plain(layout.kindColumnKeys, shared, 'names')),
    own.capacity ? 1 : 0,
  ]);
}

/** Slot by slot, patch by patch: the mean over the years. */
function meansOf({ values, capacity }: CatastropheSlots, { on, lowered }: Strike): Float64Array {
  const means = values.map((value, k) => {
    const share = capacity && k === values.length - 1 ? lowered : on;
    return share.map((struck) => 1 - struck * (1 - value));
  });
  return Float64Array.from(means.flatMap((own) => [...own]));
}
