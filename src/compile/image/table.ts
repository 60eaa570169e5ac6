// Tables of rates in the image, once for each stretch of steps in which they are constant.
import * as layout from '../../../assembly/layout.ts';
import type * as M from '../../model/model.ts';
import { plain, type SectionList } from './section.ts';

/** Adds a table once per epoch, and which epoch holds in each step where there are several. */
export function addTable(list: SectionList, kind: number, table: M.RateTable, reads: string): number {
  const columns = table.epochs[0]?.length ?? 0;
  const data = new Float64Array(columns * table.epochs.length);
  table.epochs.forEach((epoch, i) => data.set(epoch, i * columns));
  const many = table.epochs.length > 1;
  const epochOf = many ? list.add(plain(layout.kindEpochOf, table.epochOf, reads)) : layout.none;
  return list.add({ kind, data, columns, epochOf, reads });
}

/** One number a patch: as it always is, or by year. */
export function addPatchTable(
  list: SectionList,
  always: Float64Array,
  byYear: M.RateTable | undefined,
  reads: string,
): number {
  if (byYear === undefined) return list.add(plain(layout.kindPatchNumbers, always, reads));
  return addTable(list, layout.kindPatchNumbers, byYear, reads);
}
